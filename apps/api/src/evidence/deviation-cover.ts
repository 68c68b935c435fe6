import { compareDecimals, parseDecimal, type Decimal } from '@trammel/metrology/decimal';
import { isUndetermined } from '@trammel/metrology';
import type { CharacteristicFacts } from './characteristic-facts.ts';
import { readEntry } from './reading-entry.ts';

/** The readings of a row that lie outside, as numbers in the characteristic's unit. */
export function outReadings(row: {
  facts: CharacteristicFacts;
  texts: readonly (string | null)[];
  marks: string;
}): Decimal[] {
  const out: Decimal[] = [];
  row.texts.forEach((text, slot) => {
    if (text === null || row.marks[slot] !== 'o') return;
    const entry = readEntry(text, row.facts);
    const value = entry.kind === 'number' ? parseDecimal(entry.text) : null;
    if (value !== null && !isUndetermined(value)) out.push(value);
  });
  return out;
}

/**
 * Whether a deviation reaches every reading found outside. A side left open in the request keeps the drawn limit.
 * Attribute rows have no range to compare; the request as such covers them.
 */
export function deviationCovers(
  deviation: { rangeLower: string | null; rangeUpper: string | null },
  facts: Pick<CharacteristicFacts, 'lowerLimit' | 'upperLimit'>,
  readings: readonly Decimal[],
): boolean {
  const lowest = bound(deviation.rangeLower ?? facts.lowerLimit);
  const highest = bound(deviation.rangeUpper ?? facts.upperLimit);
  return readings.every(
    (value) =>
      (lowest === null || compareDecimals(value, lowest) >= 0) &&
      (highest === null || compareDecimals(value, highest) <= 0),
  );
}

function bound(text: string | null): Decimal | null {
  const value = text === null ? null : parseDecimal(text);
  return value === null || isUndetermined(value) ? null : value;
}
