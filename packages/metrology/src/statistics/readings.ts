import { digitsAtScale, parseDecimal } from '../decimal/index.ts';
import type { Decimal } from '../decimal/index.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

/**
 * A reading as typed, or a number. A number stands for the shortest decimal that names it: 1000000.2 is read as
 * 1000000.2 and not as the double 1000000.19999999995…, because that is what was measured.
 */
export type Reading = string | number;

/** Readings as whole numbers of one unit: reading = (origin + deviation)·10^(−scale). */
export interface ExactReadings {
  readonly scale: number;
  readonly origin: bigint;
  readonly deviations: readonly bigint[];
  /** Largest |deviation|, as a double for choosing the arithmetic. */
  readonly largest: number;
  /** The readings as the nearest doubles, in their order. */
  readonly numbers: readonly number[];
  /** The readings as decimals, in their order. */
  readonly decimals: readonly Decimal[];
}

function readOne(reading: Reading): Decimal | Undetermined {
  if (typeof reading === 'string') return parseDecimal(reading);
  if (!Number.isFinite(reading))
    return undetermined(
      'not-finite',
      `${String(reading)} is not a measured value: enter the reading or leave it out`,
    );
  return parseDecimal(String(reading), { exponent: true });
}

/** Reads all readings exactly and shifts them to the first, so that sums of powers stay small. */
export function readExactly(readings: readonly Reading[]): ExactReadings | Undetermined {
  const decimals: Decimal[] = [];
  let scale = 0;
  for (let index = 0; index < readings.length; index += 1) {
    const decimal = readOne(readings[index] as Reading);
    if ('undetermined' in decimal)
      return undetermined(decimal.code, `Reading ${index + 1}: ${decimal.reason}`);
    decimals.push(decimal);
    if (decimal.scale > scale) scale = decimal.scale;
  }
  const first = decimals[0];
  const origin = first === undefined ? 0n : digitsAtScale(first, scale);
  const deviations: bigint[] = [];
  const numbers: number[] = [];
  let largest = 0;
  for (let index = 0; index < decimals.length; index += 1) {
    const deviation = digitsAtScale(decimals[index] as Decimal, scale) - origin;
    const size = Math.abs(Number(deviation));
    if (size > largest) largest = size;
    deviations.push(deviation);
    numbers.push(Number(readings[index]));
  }
  return { scale, origin, deviations, largest, numbers, decimals };
}
