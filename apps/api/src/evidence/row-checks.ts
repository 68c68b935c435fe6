import { roundDecimal, parseDecimal, formatDecimal } from '@trammel/metrology/decimal';
import { compileLimits } from '@trammel/metrology/conformance';
import { isUndetermined } from '@trammel/metrology';
import type { CheckedRow } from '@trammel/shared/checks';
import type { CheckInputs } from './check-inputs.ts';
import type { CharacteristicFacts } from './characteristic-facts.ts';
import { limitsOf } from './decision-rules.ts';
import { overallIndex } from './overall-index.ts';
import { limitCompiler, requiredPieces, type Stream } from './package-context.ts';
import { evaluateRow } from './evaluate-row.ts';
import { sizeBalloonOf } from './characteristic-facts.ts';
import { habitsOf, type ReadingHabits } from './reading-habits.ts';
import { decodeReadings } from './readings-text.ts';
import { emptyRow, type StoredRow } from './stored-row.ts';

/** One characteristic in one stream, with what was stored and what the check says of it. */
export interface JudgedRow {
  readonly facts: CharacteristicFacts;
  readonly stream: Stream;
  readonly stored: StoredRow;
  /** Exact texts by slot, read when asked for: kept for every row they would cost more than judging them. */
  readonly texts: () => readonly (string | null)[];
  readonly habits: ReadingHabits;
  readonly marks: string;
  readonly checked: CheckedRow;
}

/** Judges every characteristic of every stream afresh from the stored texts; what was stored as verdict is not trusted. */
export function judgeRows(inputs: CheckInputs): JudgedRow[] {
  const stored = new Map(inputs.rows.map((row) => [`${row.characteristicId} ${row.streamId}`, row]));
  const textsOf = (facts: CharacteristicFacts, stream: Stream) =>
    decodeReadings(stored.get(`${facts.id} ${stream.id}`)?.readings ?? '');
  const compile = limitCompiler(inputs.rules);
  const judged: JudgedRow[] = [];
  for (const facts of inputs.characteristics.list) {
    const sizeBalloon = sizeBalloonOf(facts);
    const sizeFacts = sizeBalloon === null ? undefined : inputs.characteristics.byBalloon.get(sizeBalloon);
    const required = requiredPieces(facts, inputs.rules);
    for (const stream of inputs.streams) {
      const row = stored.get(`${facts.id} ${stream.id}`) ?? emptyRow(facts, stream.id);
      const own = textsOf(facts, stream);
      const { attributeChecked: checked, attributeFailed: failed } = row;
      const compiled = compile(facts);
      const evaluation = evaluateRow({
        facts,
        compiled,
        texts: own,
        attribute: checked === null ? null : { checked, failed: failed ?? 0 },
        size: sizeFacts ? { facts: sizeFacts, texts: textsOf(sizeFacts, stream) } : null,
        required,
      });
      const { marks, mean, standardDeviation: s, ...numbers } = evaluation;
      const spread =
        mean === null || s === null || s === 0 ? null : { lower: mean - 3 * s, upper: mean + 3 * s };
      judged.push({
        facts,
        stream,
        stored: row,
        texts: () => decodeReadings(row.readings),
        habits: habitsOf(own, facts),
        marks,
        checked: {
          characteristicId: facts.id,
          balloon: facts.balloon,
          streamId: stream.id,
          stream: stream.name,
          required,
          mean,
          standardDeviation: s,
          naturalSpread: spread,
          ...overallIndex(facts, evaluation),
          rounded: inputs.rules.roundingRule === 'astm-e29' ? roundedReadings(own, facts) : [],
          reason: isUndetermined(compiled) ? compiled.reason : null,
          ...numbers,
        },
      });
    }
  }
  return judged;
}

/** Readings that the rounding method changes, raw beside rounded (R09). */
function roundedReadings(texts: readonly (string | null)[], facts: CharacteristicFacts) {
  const compiled = compileLimits(limitsOf(facts), {
    kind: 'simple',
    rounding: 'e29',
    decimals: facts.decimals,
  });
  if (isUndetermined(compiled) || compiled.roundingPlaces === null) return [];
  const changed: { raw: string; rounded: string }[] = [];
  for (const raw of texts) {
    const value = raw === null ? null : parseDecimal(raw);
    if (raw === null || value === null || isUndetermined(value)) continue;
    const rounded = formatDecimal(roundDecimal(value, compiled.roundingPlaces, 'half-even'));
    if (value.scale > compiled.roundingPlaces) changed.push({ raw, rounded });
  }
  return changed;
}
