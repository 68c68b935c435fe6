import { compareDecimals, parseDecimal, type Decimal } from '@trammel/metrology/decimal';
import { isUndetermined } from '@trammel/metrology';
import type { CharacteristicFacts } from '../../evidence/characteristic-facts.ts';
import type { FieldError } from '../../http/problems.ts';

const read = (text: string | null): Decimal | null => {
  const value = text === null ? null : parseDecimal(text);
  return value === null || isUndetermined(value) ? null : value;
};

/** A deviation widens the drawn limits; a range inside them, or one turned round, asks for nothing. */
export function rangeFaults(
  asked: { rangeLower: string | null; rangeUpper: string | null },
  facts: Pick<CharacteristicFacts, 'lowerLimit' | 'upperLimit' | 'unit'>,
): FieldError[] {
  const faults: FieldError[] = [];
  const [low, high] = [read(asked.rangeLower), read(asked.rangeUpper)];
  const [lower, upper] = [read(facts.lowerLimit), read(facts.upperLimit)];
  if (low && high && compareDecimals(low, high) > 0) {
    faults.push({
      pointer: '/rangeLower',
      detail: 'The lowest value is above the highest. Exchange the two.',
    });
  }
  if (low && lower && compareDecimals(low, lower) >= 0) {
    faults.push({
      pointer: '/rangeLower',
      detail: `${asked.rangeLower ?? ''} is within the drawn limit ${facts.lowerLimit ?? ''} ${facts.unit}. Give a value below it, or leave it empty.`,
    });
  }
  if (high && upper && compareDecimals(high, upper) <= 0) {
    faults.push({
      pointer: '/rangeUpper',
      detail: `${asked.rangeUpper ?? ''} is within the drawn limit ${facts.upperLimit ?? ''} ${facts.unit}. Give a value above it, or leave it empty.`,
    });
  }
  return faults;
}
