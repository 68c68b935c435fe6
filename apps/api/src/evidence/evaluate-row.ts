import {
  evaluateCompiled,
  judgeAttribute,
  judgeGeometric,
  VERDICT_CODE,
  type CompiledLimits,
} from '@trammel/metrology/conformance';
import { isUndetermined, type Undetermined } from '@trammel/metrology';
import type { Verdict } from '@trammel/shared/status';
import {
  hasVerdict,
  sizeBalloonOf,
  takesAttribute,
  type CharacteristicFacts,
} from './characteristic-facts.ts';
import { limitsOf } from './decision-rules.ts';
import { endsInFigure, readEntry } from './reading-entry.ts';

export interface RowInput {
  readonly facts: CharacteristicFacts;
  readonly compiled: CompiledLimits | Undetermined;
  /** Texts by slot of the stream's pieces; a slot without a piece holds null. */
  readonly texts: readonly (string | null)[];
  readonly attribute: { checked: number; failed: number } | null;
  /** Readings of the size characteristic that gives the bonus, by the same slots, with that characteristic. */
  readonly size: { facts: CharacteristicFacts; texts: readonly (string | null)[] } | null;
  /** Pieces asked for in this stream. */
  readonly required: number;
}

export interface RowEvaluation {
  readonly marks: string;
  readonly n: number;
  readonly minimum: string | null;
  readonly maximum: string | null;
  readonly mean: number | null;
  readonly standardDeviation: number | null;
  readonly outCount: number;
  readonly undecidedCount: number;
  readonly verdict: Verdict;
}

const letterOf: readonly string[] = ['n', 'i', 'o', 'u'];
const unmeasured = { minimum: null, maximum: null, mean: null, standardDeviation: null } as const;

/** Judges one characteristic in one stream; every comparison is exact decimal arithmetic. */
export function evaluateRow(input: RowInput): RowEvaluation {
  const { facts, texts } = input;
  if (facts.kind === 'attribute' || facts.kind === 'note') return evaluateAttribute(input, texts);
  const entries = readTexts(texts, facts);
  if (entries.words && takesAttribute(facts)) return evaluateAttribute(input, texts);
  if (isUndetermined(input.compiled)) return withoutLimits(input, entries.numbers);
  const summary = evaluateCompiled(entries.numbers, input.compiled);
  const shared = {
    n: summary.n,
    minimum: summary.min,
    maximum: summary.max,
    mean: summary.mean,
    standardDeviation: summary.standardDeviation,
  };
  if (!hasVerdict(facts)) {
    return {
      ...shared,
      marks: marksOf(summary.verdicts, 'x'),
      outCount: 0,
      undecidedCount: 0,
      verdict: 'no-verdict',
    };
  }
  if (summary.n === 0 && input.attribute !== null) return evaluateAttribute(input, texts);
  const codes = sizeBalloonOf(facts) === null ? summary.verdicts : withBonus(input, entries.numbers);
  const outCount = countOf(codes, VERDICT_CODE.outOfTolerance);
  const undecidedCount = countOf(codes, VERDICT_CODE.undecided);
  return {
    ...shared,
    marks: marksOf(codes),
    outCount,
    undecidedCount,
    verdict: rowVerdict(outCount, undecidedCount, summary.n, input.required),
  };
}

/** The part takes the worst of its readings; fewer than asked for is not measured, however good they are. */
function rowVerdict(out: number, undecided: number, n: number, required: number): Verdict {
  if (out > 0) return 'out-of-tolerance';
  if (undecided > 0) return 'undecided';
  return n === 0 || n < required ? 'not-measured' : 'in-tolerance';
}

function readTexts(texts: readonly (string | null)[], facts: CharacteristicFacts) {
  let words = false;
  let converted: (string | null)[] | null = null;
  for (let slot = 0; slot < texts.length; slot += 1) {
    const text = texts[slot] ?? null;
    if (text === null || endsInFigure(text)) continue;
    converted ??= [...texts];
    const entry = readEntry(text, facts);
    if (entry.kind === 'pass' || entry.kind === 'fail') words = true;
    converted[slot] = entry.kind === 'number' ? entry.text : null;
  }
  return { numbers: converted ?? texts, words };
}

function withBonus(input: RowInput, texts: readonly (string | null)[]): Uint8Array {
  const { facts, size } = input;
  const codes = new Uint8Array(texts.length);
  const sizes = size === null ? null : readTexts(size.texts, size.facts).numbers;
  for (let slot = 0; slot < texts.length; slot += 1) {
    const reading = texts[slot] ?? null;
    if (reading === null) continue;
    const judged = judgeGeometric({
      reading,
      tolerance: facts.upperLimit ?? '0',
      modifier: facts.geometric?.modifier ?? 'RFS',
      feature: facts.geometric?.feature === 'external' ? 'shaft' : 'hole',
      sizeLimits: size === null ? null : limitsOf(size.facts),
      actualSize: sizes?.[slot] ?? null,
    });
    const verdict = isUndetermined(judged) ? 'undecided' : judged.verdict;
    codes[slot] =
      verdict === 'in-tolerance'
        ? VERDICT_CODE.inTolerance
        : verdict === 'out-of-tolerance'
          ? VERDICT_CODE.outOfTolerance
          : verdict === 'undecided'
            ? VERDICT_CODE.undecided
            : VERDICT_CODE.notMeasured;
  }
  return codes;
}

/** Counts handed in as such, or pass and fail noted piece by piece: one failed piece fails the row (R18). */
function evaluateAttribute(input: RowInput, texts: readonly (string | null)[]): RowEvaluation {
  let marks = '';
  let passed = 0;
  let failed = 0;
  for (const text of texts) {
    const word = text === null ? null : readEntry(text, input.facts);
    if (word?.kind === 'fail') failed += 1;
    else if (word !== null && word.kind !== 'refused') passed += 1;
    marks += word === null || word.kind === 'refused' ? 'n' : word.kind === 'fail' ? 'o' : 'i';
  }
  const byPiece = passed + failed > 0;
  const counts = byPiece
    ? { checked: passed + failed, failed }
    : (input.attribute ?? { checked: 0, failed: 0 });
  const judged = judgeAttribute(counts);
  const short = counts.checked < input.required && counts.failed === 0;
  return {
    ...unmeasured,
    marks,
    n: counts.checked,
    outCount: counts.failed,
    undecidedCount: 0,
    verdict: isUndetermined(judged) || short ? 'not-measured' : judged.verdict,
  };
}

/** A variable row whose limits cannot be read is never passed: it waits for a person. */
function withoutLimits(input: RowInput, texts: readonly (string | null)[]): RowEvaluation {
  const n = texts.reduce((count, text) => (text === null ? count : count + 1), 0);
  const plain = hasVerdict(input.facts);
  return {
    ...unmeasured,
    marks: texts.map((text) => (text === null ? 'n' : plain ? 'u' : 'x')).join(''),
    n,
    outCount: 0,
    undecidedCount: plain ? n : 0,
    verdict: plain ? (n === 0 ? 'not-measured' : 'undecided') : 'no-verdict',
  };
}

function countOf(codes: Uint8Array, wanted: number): number {
  let count = 0;
  for (const code of codes) if (code === wanted) count += 1;
  return count;
}

function marksOf(codes: Uint8Array, measured?: string): string {
  let marks = '';
  for (const code of codes) marks += code === 0 ? 'n' : (measured ?? letterOf[code] ?? 'n');
  return marks;
}
