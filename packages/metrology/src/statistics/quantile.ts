import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

/**
 * The nine sample quantiles of Hyndman and Fan, The American Statistician 50 (1996) 361-365, by their numbers.
 * 1 inverse of the empirical distribution function; 2 the same, averaged at its steps; 3 nearest even order statistic;
 * 4 linear in the empirical distribution function; 5 piecewise linear through the middles of its steps (Hazen);
 * 6 linear in the expected positions k/(n+1) (Weibull); 7 linear in (k−1)/(n−1), the usual one of spreadsheets;
 * 8 approximately median-unbiased; 9 approximately unbiased for normal data.
 */
export type QuantileDefinition = 1 | 2 | 3 | 4 | 5 | 6 | 7 | 8 | 9;

/** A sample quantile with what is needed to explain it. */
export interface SampleQuantile {
  readonly method: `Hyndman-Fan type ${QuantileDefinition}`;
  readonly n: number;
  readonly p: number;
  readonly value: number;
}

/** Offset m of types 4 to 9: the position is n·p + m. */
const OFFSETS: Record<4 | 5 | 6 | 7 | 8 | 9, (p: number) => number> = {
  4: () => 0,
  5: () => 0.5,
  6: (p) => p,
  7: (p) => 1 - p,
  8: (p) => (p + 1) / 3,
  9: (p) => p / 4 + 3 / 8,
};

/** n·p is meant as the whole number when the product is one but for the last digits of the double. */
function position(exact: number): { whole: number; part: number } {
  const nearest = Math.round(exact);
  if (Math.abs(exact - nearest) < 4 * Number.EPSILON * Math.max(1, Math.abs(exact)))
    return { whole: nearest, part: 0 };
  const whole = Math.floor(exact);
  return { whole, part: exact - whole };
}

/** Quantile of values sorted in rising order, n ≥ 1, 0 ≤ p ≤ 1. */
export function quantileOfSorted(
  sorted: ArrayLike<number>,
  p: number,
  definition: QuantileDefinition = 7,
): number {
  const n = sorted.length;
  const at = (k: number) => sorted[Math.min(Math.max(k, 1), n) - 1] as number;
  if (definition <= 3) {
    const { whole, part } = position(definition === 3 ? n * p - 0.5 : n * p);
    if (part > 0) return at(whole + 1);
    if (definition === 2) return (at(whole) + at(whole + 1)) / 2;
    return definition === 3 && whole % 2 !== 0 ? at(whole + 1) : at(whole);
  }
  const { whole, part } = position(n * p + OFFSETS[definition as 4](p));
  return part === 0 ? at(whole) : at(whole) + part * (at(whole + 1) - at(whole));
}

/**
 * Sample quantile by a named definition.
 * @param values finite numbers in any order, at least one
 * @param p share below, 0 to 1
 * @param definition Hyndman-Fan type; 7 unless told
 */
export function quantile(
  values: readonly number[],
  p: number,
  definition: QuantileDefinition = 7,
): SampleQuantile | Undetermined {
  if (values.length === 0) return undetermined('too-few', 'There are no values');
  if (!values.every(Number.isFinite))
    return undetermined('not-finite', 'One of the values is not a finite number');
  if (!(p >= 0 && p <= 1))
    return undetermined('outside-domain', 'The share below must be a number from 0 to 1');
  const sorted = Float64Array.from(values).sort();
  return {
    method: `Hyndman-Fan type ${definition}`,
    n: values.length,
    p,
    value: quantileOfSorted(sorted, p, definition),
  };
}

/** Median of a sample: the middle value, or the mean of the two middle ones (all definitions but 1, 3 and 4 agree). */
export function median(values: readonly number[]): SampleQuantile | Undetermined {
  return quantile(values, 0.5, 7);
}
