import type { RowResult, SheetCharacteristic } from '@trammel/shared/measurements';
import type { CharacteristicFacts } from './characteristic-facts.ts';
import { requiredPieces, type JudgingRules, type Piece } from './package-context.ts';
import { decodeReadings } from './readings-text.ts';
import type { StoredRow } from './stored-row.ts';

/** Slots of each stream's pieces, in the order in which they are shown. */
export function slotsByStream(pieces: readonly Piece[]): Map<string, number[]> {
  const slots = new Map<string, number[]>();
  for (const piece of pieces) {
    const list = slots.get(piece.streamId);
    if (list) list.push(piece.slot);
    else slots.set(piece.streamId, [piece.slot]);
  }
  return slots;
}

export function presentRow(row: StoredRow, slots: ReadonlyMap<string, readonly number[]>): RowResult {
  const texts = decodeReadings(row.readings);
  const shown = slots.get(row.streamId) ?? [];
  const { attributeChecked: checked, attributeFailed: failed } = row;
  return {
    characteristicId: row.characteristicId,
    streamId: row.streamId,
    readings: shown.map((slot) => texts[slot] ?? null),
    marks: shown.map((slot) => row.marks[slot] ?? 'n').join(''),
    attribute: checked === null ? null : { checked, failed: failed ?? 0 },
    gaugeId: row.gaugeId,
    measuredOn: row.measuredOn,
    note: row.note,
    n: row.n,
    minimum: row.minimum,
    maximum: row.maximum,
    mean: row.mean,
    standardDeviation: row.standardDeviation,
    outCount: row.outCount,
    undecidedCount: row.undecidedCount,
    verdict: row.verdict,
    version: row.version,
  };
}

export function presentCharacteristic(facts: CharacteristicFacts, rules: JudgingRules): SheetCharacteristic {
  const { controlledBy: _, pieces: __, ...shown } = facts;
  return { ...shown, pieces: requiredPieces(facts, rules) };
}
