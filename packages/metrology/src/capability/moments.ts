import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

/** Mean and sums of squares of readings, around the first reading so that 1500.002 loses no digits. */
export interface Moments {
  readonly n: number;
  readonly mean: number;
  /** sample standard deviation, n - 1 */
  readonly deviation: number;
  readonly smallest: number;
  readonly largest: number;
}

/** Checked moments: at least two finite readings that are not all alike. */
export function momentsOf(values: readonly number[]): Moments | Undetermined {
  const n = values.length;
  if (n < 2) return undetermined('too-few', 'At least two readings are needed');
  const origin = values[0] ?? 0;
  let sum = 0;
  let smallest = origin;
  let largest = origin;
  for (const value of values) {
    sum += value - origin;
    if (value < smallest) smallest = value;
    if (value > largest) largest = value;
  }
  if (!Number.isFinite(sum)) return undetermined('not-finite', 'One of the readings is not a finite number');
  const offset = sum / n;
  let squares = 0;
  let rest = 0;
  for (const value of values) {
    const deviation = value - origin - offset;
    squares += deviation * deviation;
    rest += deviation;
  }
  if (smallest === largest)
    return undetermined('no-variation', 'All readings are alike, so there is no spread to compare with');
  return {
    n,
    mean: origin + offset,
    deviation: Math.sqrt((squares - (rest * rest) / n) / (n - 1)),
    smallest,
    largest,
  };
}
