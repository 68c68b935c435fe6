import { undetermined } from '../../result.ts';
import type { Undetermined } from '../../result.ts';

/** Readings less the natural bound, sorted, with the sums every fit of a positive quantity needs. */
export interface PositiveReadings {
  readonly origin: number;
  readonly n: number;
  /** in rising order, each at least 0 */
  readonly sorted: Float64Array;
  /** natural logarithms in the same order; -Infinity where a reading lies on the bound */
  readonly logs: Float64Array;
  readonly mean: number;
  readonly meanLog: number;
  readonly meanSquare: number;
}

/** Undetermined: fewer than three readings, all alike, not finite, or a reading below the bound. */
export function positiveReadings(values: readonly number[], origin: number): PositiveReadings | Undetermined {
  const n = values.length;
  if (n < 3) return undetermined('too-few', 'A distribution needs at least three readings to be fitted');
  const sorted = Float64Array.from(values, (value) => value - origin).sort();
  if (!sorted.every(Number.isFinite))
    return undetermined('not-finite', 'One of the readings is not a finite number');
  if ((sorted[0] ?? 0) < 0)
    return undetermined('below-bound', `A reading lies below the natural bound ${origin}`);
  if (sorted[0] === sorted[n - 1])
    return undetermined('no-variation', 'All readings are alike, so no distribution can be fitted');
  const logs = sorted.map(Math.log);
  let mean = 0;
  let meanLog = 0;
  let meanSquare = 0;
  for (let index = 0; index < n; index += 1) {
    const value = sorted[index] ?? 0;
    mean += value / n;
    meanLog += (logs[index] ?? 0) / n;
    meanSquare += (value * value) / n;
  }
  return { origin, n, sorted, logs, mean, meanLog, meanSquare };
}

/** The refusal of a distribution that has no density at 0. */
export function onBound(readings: PositiveReadings): Undetermined | undefined {
  return readings.meanLog === -Infinity
    ? undetermined(
        'on-bound',
        'A reading lies on the natural bound, where this distribution has no probability',
      )
    : undefined;
}
