import { ratio } from '../decimal/index.ts';
import type { Ratio } from '../decimal/index.ts';

/** Exact sum of two fractions. */
export function addFractions(a: Ratio, b: Ratio): Ratio {
  if (a.denominator === b.denominator) return ratio(a.numerator + b.numerator, a.denominator);
  return ratio(a.numerator * b.denominator + b.numerator * a.denominator, a.denominator * b.denominator);
}

/** Exact difference a − b. */
export function subtractFractions(a: Ratio, b: Ratio): Ratio {
  return addFractions(a, { numerator: -b.numerator, denominator: b.denominator });
}

/** Exact quotient a / b, b not 0. */
export function divideFractions(a: Ratio, b: Ratio): Ratio {
  return ratio(a.numerator * b.denominator, a.denominator * b.numerator);
}
