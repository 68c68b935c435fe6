import { normalQuantile } from '../distributions/normal.ts';
import { isUndetermined, undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { ppccCriticalValue } from '../tables/ppcc-critical-values.ts';
import type { Reading } from './readings.ts';
import { summarize } from './summarize.ts';

/** Normal probability plot: points for drawing, their correlation and the verdict on it. */
export interface NormalProbabilityPlot {
  readonly method: 'normal probability plot correlation, Filliben medians';
  readonly n: number;
  readonly correlation: number;
  /** Smallest correlation that 95 % of normal samples of this size exceed; undetermined outside the table. */
  readonly critical: number | Undetermined;
  readonly isNormal: boolean | Undetermined;
  /** Readings in rising order with the standard normal value expected there. */
  readonly points: readonly { readonly expected: number; readonly value: number }[];
}

/** Filliben's medians of uniform order statistics: 0.5^(1/n) at the ends, (i − 0.3175)/(n + 0.365) between. */
function fillibenMedian(i: number, n: number): number {
  if (i === n) return 0.5 ** (1 / n);
  return i === 1 ? 1 - 0.5 ** (1 / n) : (i - 0.3175) / (n + 0.365);
}

/**
 * Correlation of the ordered readings with the normal values expected there, and its comparison with the 5 % point.
 * Source: J. J. Filliben, Technometrics 17 (1975) 111-117; critical values by simulation (tables/ppcc-critical-values.ts).
 * @param readings at least 3, not all equal
 */
export function normalProbabilityPlot(readings: readonly Reading[]): NormalProbabilityPlot | Undetermined {
  const n = readings.length;
  if (n < 3) return undetermined('too-few', `A probability plot needs at least 3 readings: there are ${n}`);
  const summary = summarize(readings);
  if (isUndetermined(summary)) return summary;
  if (summary.sumOfSquares === 0)
    return undetermined('no-variation', 'All readings are equal: the plot is a line');
  const values = Float64Array.from(readings, Number).sort();
  const expected = Array.from({ length: n }, (_, index) => normalQuantile(fillibenMedian(index + 1, n)));
  let product = 0;
  let square = 0;
  expected.forEach((z, index) => {
    product += z * ((values[index] as number) - summary.mean);
    square += z * z;
  });
  const correlation = product / Math.sqrt(square * summary.sumOfSquares);
  const critical = ppccCriticalValue(n, 0.05);
  return {
    method: 'normal probability plot correlation, Filliben medians',
    n,
    correlation,
    critical,
    isNormal: typeof critical === 'number' ? correlation >= critical : critical,
    points: expected.map((z, index) => ({ expected: z, value: values[index] as number })),
  };
}
