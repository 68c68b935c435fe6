import { binomialCdf } from '../distributions/binomial.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { refuseShare } from './intervals.ts';
import type { ToleranceSides } from './tolerance-interval.ts';

/** A tolerance interval between two readings, valid for any continuous distribution. */
export interface DistributionFreeInterval {
  readonly method: 'distribution-free, order statistics';
  readonly n: number;
  readonly coverage: number;
  readonly confidence: number;
  readonly sides: ToleranceSides;
  /** Readings left outside, in all: 0 when the interval ends at the extremes. */
  readonly outside: number;
  readonly lower: number | null;
  readonly upper: number | null;
  /** The confidence this interval has, not below the one asked for. */
  readonly attainedConfidence: number;
}

/** P(at least the share p lies between two order statistics with m = n + 1 − (their distance) left out) = P(Bin(n, p) ≤ n − m). */
const attained = (n: number, coverage: number, m: number) => binomialCdf(n - m, n, coverage);

/** Smallest n at which the extremes (both, or the one of a one-sided interval) suffice; S. S. Wilks 1941, ISO 16269-6. */
export function distributionFreeSampleSize(
  coverage: number,
  confidence: number,
  sides: ToleranceSides = 'two',
): number | Undetermined {
  const refused = refuseShare(coverage, 'coverage') ?? refuseShare(confidence, 'confidence');
  if (refused !== null) return refused;
  const m = sides === 'two' ? 2 : 1;
  let low = m - 1;
  let high = m;
  while (attained(high, coverage, m) < confidence) {
    low = high;
    high *= 2;
    if (high > 1e8)
      return undetermined('outside-domain', 'No practical number of readings shows this coverage');
  }
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (attained(middle, coverage, m) >= confidence) high = middle;
    else low = middle;
  }
  return high;
}

/**
 * Interval between two readings that holds at least the share `coverage` of the population, whatever its (continuous)
 * distribution, with at least the stated confidence. As many readings as the confidence allows are left outside, the
 * same number at both ends (one more at the upper end when it is odd would be arbitrary, so it stays inside).
 * @returns undetermined with the number of readings needed when there are too few
 */
export function distributionFreeTolerance(
  values: readonly number[],
  coverage: number,
  confidence: number,
  sides: ToleranceSides = 'two',
): DistributionFreeInterval | Undetermined {
  if (!values.every(Number.isFinite))
    return undetermined('not-finite', 'One of the values is not a finite number');
  const needed = distributionFreeSampleSize(coverage, confidence, sides);
  if (typeof needed !== 'number') return needed;
  const n = values.length;
  if (n < needed)
    return undetermined('too-few', `This coverage and confidence need ${needed} readings: there are ${n}`);
  const each = sides === 'two' ? 2 : 1;
  let rank = 1;
  while (attained(n, coverage, each * (rank + 1)) >= confidence) rank += 1;
  const sorted = Float64Array.from(values).sort();
  return {
    method: 'distribution-free, order statistics',
    n,
    coverage,
    confidence,
    sides,
    outside: each * (rank - 1),
    lower: sides === 'upper' ? null : (sorted[rank - 1] as number),
    upper: sides === 'lower' ? null : (sorted[n - rank] as number),
    attainedConfidence: attained(n, coverage, each * rank),
  };
}
