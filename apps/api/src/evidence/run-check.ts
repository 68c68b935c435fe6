import type { CheckedRow, Finding } from '@trammel/shared/checks';
import { weights, type Verdict, type Weight } from '@trammel/shared/status';
import { worstVerdict } from '@trammel/metrology/conformance';
import { canonicalJson, sha256Hex } from '../database/canonical-json.ts';
import type { CheckInputs } from './check-inputs.ts';
import { elementFindings } from './findings/element-findings.ts';
import { gaugeFindings } from './findings/gauge-findings.ts';
import { packageFindings } from './findings/package-findings.ts';
import { readingFindings } from './findings/reading-findings.ts';
import { toleranceFindings } from './findings/tolerance-findings.ts';
import { judgeRows, type JudgedRow } from './row-checks.ts';

/** Raised whenever a rule or a formula changes, so that an old check says by what it was made. */
export const checkMethod = 'package check 1';

export interface CheckCounts {
  stops: number;
  decides: number;
  informs: number;
}

export interface PackageCheck {
  readonly method: string;
  readonly verdict: Verdict;
  readonly counts: CheckCounts;
  readonly findings: Finding[];
  readonly rows: JudgedRow[];
}

/** Judges a package whole. Depends on its inputs alone: run again on the same inputs it says the same. */
export function runCheck(inputs: CheckInputs): PackageCheck {
  const rows = judgeRows(inputs);
  const covered = rows.filter((row) => !row.stream.blocked);
  const findings = [
    ...packageFindings(inputs),
    ...readingFindings(inputs, rows),
    ...toleranceFindings(inputs, covered),
    ...gaugeFindings(inputs, rows),
    ...elementFindings(inputs),
  ].sort(byWeightAndPlace(inputs));
  const verdicts = covered.map((row) => row.checked.verdict).filter((verdict) => verdict !== 'no-verdict');
  return {
    method: checkMethod,
    verdict: worstVerdict(verdicts),
    counts: countFindings(findings),
    findings,
    rows,
  };
}

export function countFindings(findings: readonly Finding[]): CheckCounts {
  const of = (weight: Weight) =>
    findings.reduce((count, finding) => (finding.weight === weight ? count + 1 : count), 0);
  return { stops: of('stops-submission'), decides: of('reviewer-decides'), informs: of('for-information') };
}

function byWeightAndPlace(inputs: CheckInputs): (a: Finding, b: Finding) => number {
  const order = new Map(inputs.characteristics.list.map((facts) => [facts.id, facts.sequence]));
  const streams = new Map(inputs.streams.map((stream) => [stream.id, stream.sequence]));
  const place = (finding: Finding) => [
    weights.indexOf(finding.weight),
    finding.place.characteristicId === null ? -1 : (order.get(finding.place.characteristicId) ?? 0),
    finding.place.streamId === null ? -1 : (streams.get(finding.place.streamId) ?? 0),
  ];
  return (a, b) => {
    const [one, other] = [place(a), place(b)];
    for (let level = 0; level < one.length; level += 1) {
      const difference = (one[level] ?? 0) - (other[level] ?? 0);
      if (difference !== 0) return difference;
    }
    return a.key < b.key ? -1 : a.key > b.key ? 1 : 0;
  };
}

/** What was judged, as one digest: limits, readings, gauges, elements with their files, deviations, warrant facts. */
export function inputsDigest(inputs: CheckInputs): string {
  return sha256Hex(canonicalJson(packageContent(inputs)));
}

/** The package as content: everything a signature covers, nothing that merely describes its handling. */
export function packageContent(inputs: CheckInputs): Record<string, unknown> {
  const { submission, rules, characteristics, streams, pieces, rows, gauges, elements, deviations, warrant } =
    inputs;
  return {
    part: submission.partNumber,
    revision: submission.revisionCode,
    round: submission.round,
    drawing: submission.drawingSha256,
    rules,
    characteristics: characteristics.list,
    streams: streams.map(({ version: _, ...stream }) => stream),
    pieces: pieces.map(({ version: _, ...piece }) => piece),
    rows: rows.map(({ id: _, version: __, mean: ___, standardDeviation: ____, ...row }) => row),
    gauges: [...gauges.values()],
    elements,
    deviations,
    warrant,
  };
}

/** Rows as the answer carries them. */
export function checkedRows(check: PackageCheck): CheckedRow[] {
  return check.rows.map((row) => row.checked);
}
