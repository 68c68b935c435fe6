import { tUpperQuantile, tUpperTail } from '../distributions/student-t.ts';
import { isUndetermined, undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import type { Reading } from './readings.ts';
import { summarize } from './summarize.ts';

/** Which end may hold the outlier: either, only the largest, only the smallest. */
export type GrubbsSide = 'either' | 'maximum' | 'minimum';

/** Grubbs' test for one outlier. */
export interface GrubbsTest {
  readonly method: 'Grubbs';
  readonly side: GrubbsSide;
  readonly n: number;
  readonly alpha: number;
  readonly mean: number;
  readonly standardDeviation: number;
  /** 1-based position, in the order given, of the reading tested. */
  readonly point: number;
  readonly statistic: number;
  readonly critical: number;
  /** Bonferroni bound of the p value: exact while it is small (below about 0.1). */
  readonly p: number;
  readonly isOutlier: boolean;
}

/**
 * Grubbs' test that the most extreme reading belongs to the others, taken as normal.
 *
 * G = max|x − x̄|/s (or one-sided), s with divisor n − 1; critical value (n − 1)/√n · √(t²/(n − 2 + t²)) with t the upper
 * α/(2n) point (either side) or α/n point (one side) of Student's t with n − 2 degrees of freedom.
 * Source: F. E. Grubbs, Technometrics 11 (1969) 1-21; NIST/SEMATECH e-Handbook 1.3.5.17.1. A reading is never removed here:
 * an outlier needs a cause before it is left out.
 * @param alpha level of the test, 0 < α < 1
 */
export function grubbsTest(
  readings: readonly Reading[],
  side: GrubbsSide = 'either',
  alpha = 0.05,
): GrubbsTest | Undetermined {
  if (!(alpha > 0 && alpha < 1)) return undetermined('outside-domain', 'The level must lie between 0 and 1');
  const n = readings.length;
  if (n < 3)
    return undetermined('too-few', `The test for an outlier needs at least 3 readings: there are ${n}`);
  const summary = summarize(readings);
  if (isUndetermined(summary)) return summary;
  const s = summary.standardDeviation;
  if (typeof s !== 'number') return s;
  if (s === 0) return undetermined('no-variation', 'All readings are equal: none stands out');
  const distance = readings.map((reading) => {
    const deviation = Number(reading) - summary.mean;
    return side === 'maximum' ? deviation : side === 'minimum' ? -deviation : Math.abs(deviation);
  });
  const largest = distance.reduce((a, b) => Math.max(a, b));
  const statistic = largest / s;
  const tests = side === 'either' ? 2 * n : n;
  const t = tUpperQuantile(alpha / tests, n - 2);
  const critical = ((n - 1) / Math.sqrt(n)) * Math.sqrt((t * t) / (n - 2 + t * t));
  const square = n * statistic * statistic;
  const rest = (n - 1) ** 2 - square;
  const observed = rest > 0 ? Math.sqrt((square * (n - 2)) / rest) : Infinity;
  return {
    method: 'Grubbs',
    side,
    n,
    alpha,
    mean: summary.mean,
    standardDeviation: s,
    point: distance.indexOf(largest) + 1,
    statistic,
    critical,
    p: Math.min(1, tests * tUpperTail(observed, n - 2)),
    isOutlier: statistic > critical,
  };
}
