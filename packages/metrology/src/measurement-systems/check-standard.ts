import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

/** One day on which the check standard was measured `repeats` times. */
export interface CheckDay {
  readonly mean: number;
  readonly standardDeviation: number;
}

export interface CheckStandardStudy {
  readonly method: string;
  readonly n: number;
  readonly inputs: { readonly runs: number; readonly daysPerRun: number; readonly repeatsPerDay: number };
  /** repeatability: within a day, pooled over all days; and by run */
  readonly level1: number;
  readonly level1ByRun: readonly number[];
  /** reproducibility from day to day: standard deviation of the day means within a run, pooled; and by run */
  readonly level2: number;
  readonly level2ByRun: readonly number[];
  /** stability from run to run: standard deviation of the run means */
  readonly level3: number;
  readonly runMeans: readonly number[];
  /** variances that belong to days and to runs alone, before negative ones are set to 0 */
  readonly dayVarianceBeforeClipping: number;
  readonly runVarianceBeforeClipping: number;
  readonly dayVariance: number;
  readonly runVariance: number;
  /** standard deviation of one reading on any day of any run */
  readonly singleReading: number;
}

/**
 * Three-level nested study of a check standard: repeats in days in runs (NIST/SEMATECH e-Handbook 2.4.4).
 *
 * s1^2 = mean of the day variances; s2^2 = pooled variance of the day means within runs; s3^2 = variance of the run means.
 * Day component s2^2 - s1^2/J, run component s3^2 - s2^2/K, J repeats a day, K days a run; negative ones are set to 0 and shown.
 * Undetermined: unbalanced, fewer than two of any level, or values that are not finite. Tested against nist-gauge-check-standard-140.
 */
export function checkStandardStudy(
  runs: readonly (readonly CheckDay[])[],
  repeatsPerDay: number,
): CheckStandardStudy | Undetermined {
  const daysPerRun = runs[0]?.length ?? 0;
  if (runs.length < 2 || daysPerRun < 2 || !Number.isInteger(repeatsPerDay) || repeatsPerDay < 2) {
    return undetermined(
      'too-few',
      'A check-standard study needs two or more runs, days in each and repeats a day',
    );
  }
  if (runs.some((run) => run.length !== daysPerRun))
    return undetermined('unbalanced', 'Every run needs the same number of days');
  if (
    !runs
      .flat()
      .every(
        (day) =>
          Number.isFinite(day.mean) && day.standardDeviation >= 0 && Number.isFinite(day.standardDeviation),
      )
  ) {
    return undetermined('not-finite', 'Every day needs a mean and a standard deviation');
  }
  const level1ByRun = runs.map((run) => Math.sqrt(meanOf(run.map((day) => day.standardDeviation ** 2))));
  const level2ByRun = runs.map((run) => deviation(run.map((day) => day.mean)));
  const runMeans = runs.map((run) => meanOf(run.map((day) => day.mean)));
  const level1 = rootMeanSquare(level1ByRun);
  const level2 = rootMeanSquare(level2ByRun);
  const level3 = deviation(runMeans);
  const day = level2 ** 2 - level1 ** 2 / repeatsPerDay;
  const run = level3 ** 2 - level2 ** 2 / daysPerRun;
  return {
    method: 'nested check standard: repeats in days in runs',
    n: runs.length * daysPerRun * repeatsPerDay,
    inputs: { runs: runs.length, daysPerRun, repeatsPerDay },
    level1,
    level1ByRun,
    level2,
    level2ByRun,
    level3,
    runMeans,
    dayVarianceBeforeClipping: day,
    runVarianceBeforeClipping: run,
    dayVariance: Math.max(0, day),
    runVariance: Math.max(0, run),
    singleReading: Math.sqrt(level1 ** 2 + Math.max(0, day) + Math.max(0, run)),
  };
}

function meanOf(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

function rootMeanSquare(values: readonly number[]): number {
  return Math.sqrt(meanOf(values.map((value) => value * value)));
}

function deviation(values: readonly number[]): number {
  const mean = meanOf(values);
  return Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1));
}
