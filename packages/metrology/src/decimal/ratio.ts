import { powerOfTen } from './decimal.ts';
import type { Decimal } from './decimal.ts';

/** A fraction of integers; the denominator is above 0. */
export interface Ratio {
  readonly numerator: bigint;
  readonly denominator: bigint;
}

function greatestCommonDivisor(a: bigint, b: bigint): bigint {
  let x = a < 0n ? -a : a;
  let y = b;
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

/** The fraction in lowest terms with a positive denominator. The denominator given must not be 0. */
export function ratio(numerator: bigint, denominator = 1n): Ratio {
  const sign = denominator < 0n ? -1n : 1n;
  const divisor = greatestCommonDivisor(numerator, denominator * sign) || 1n;
  return { numerator: (sign * numerator) / divisor, denominator: (sign * denominator) / divisor };
}

/**
 * A fraction as a decimal with at least `keep` decimals, or null when its decimals never end
 * (the denominator in lowest terms has a prime factor other than 2 and 5).
 */
export function ratioToDecimal(value: Ratio, keep = 0): Decimal | null {
  const { numerator, denominator } = ratio(value.numerator, value.denominator);
  let twos = 0;
  let fives = 0;
  let rest = denominator;
  while (rest % 2n === 0n) {
    rest /= 2n;
    twos += 1;
  }
  while (rest % 5n === 0n) {
    rest /= 5n;
    fives += 1;
  }
  if (rest !== 1n) return null;
  const scale = Math.max(twos, fives, keep);
  return { digits: (numerator * powerOfTen(scale)) / denominator, scale };
}

/** A fraction as the nearest double to 25 significant digits: the error is one rounding. */
export function ratioToNumber(value: Ratio): number {
  const { numerator, denominator } = value;
  if (numerator === 0n) return 0;
  const negative = numerator < 0n;
  const magnitude = negative ? -numerator : numerator;
  const shift = 25 - (magnitude.toString().length - denominator.toString().length);
  const quotient =
    shift >= 0
      ? (magnitude * powerOfTen(shift)) / denominator
      : magnitude / (denominator * powerOfTen(-shift));
  const result = Number(`${quotient}e${-shift}`);
  return negative ? -result : result;
}

/** Largest integer not above the square root of a non-negative integer (Newton's iteration). */
export function integerSquareRoot(value: bigint): bigint {
  if (value < 2n) return value;
  let guess = 1n << BigInt((value.toString(2).length + 1) >> 1);
  for (;;) {
    const next = (guess + value / guess) >> 1n;
    if (next >= guess) return guess;
    guess = next;
  }
}
