import { d2 } from '../control-charts/constants.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { isUsableReading } from './usable-reading.ts';
import type { GaugeTolerance } from './variance-shares.ts';

export interface SingleAppraiserStudy {
  readonly method: string;
  readonly n: number;
  readonly inputs: { readonly parts: number; readonly trials: number; readonly multiplier: number };
  readonly mean: number;
  readonly meanRange: number;
  /** mean range / d2 */
  readonly repeatability: number;
  /** multiplier x repeatability / tolerance, as a fraction */
  readonly precisionToTolerance: number | Undetermined;
  /** variance of all readings, n - 1 */
  readonly totalVariance: number;
  /** total less repeatability variance, not below 0 */
  readonly partVariance: number;
  /** part variance in the total variance */
  readonly partShare: number | Undetermined;
}

/**
 * Repeatability of a gauge in one pair of hands: every part read two or more times by one person.
 * s_gauge = Rbar/d2(trials); P/T = multiplier s_gauge/(upper - lower); part variance = variance of all readings - s_gauge^2
 * (Montgomery, Introduction to Statistical Quality Control, ch. 8). It says nothing about other people: reproducibility is not in it.
 * @param readings `readings[part][trial]`, balanced, at least two parts and 2 to 25 trials
 * Tested against the reference case grr-single-operator (printed d2 1.128 where this uses the exact one).
 */
export function singleAppraiserStudy(
  readings: readonly (readonly number[])[],
  options: { readonly tolerance?: GaugeTolerance; readonly multiplier?: number } = {},
): SingleAppraiserStudy | Undetermined {
  const trials = readings[0]?.length ?? 0;
  if (readings.length < 2 || trials < 2 || trials > 25)
    return undetermined('study-size', 'The study needs two or more parts, each read 2 to 25 times');
  if (readings.some((row) => row.length !== trials))
    return undetermined('unbalanced', `Every part needs ${trials} readings`);
  const all = readings.flat();
  if (!all.every(isUsableReading)) return undetermined('not-finite', 'A reading is not a number');
  const factor = d2(trials);
  const multiplier = options.multiplier ?? 6;
  const origin = all[0] ?? 0;
  const offset = all.reduce((sum, value) => sum + (value - origin), 0) / all.length;
  const totalVariance =
    all.reduce((sum, value) => sum + (value - origin - offset) ** 2, 0) / (all.length - 1);
  const meanRange =
    readings.reduce((sum, row) => sum + Math.max(...row) - Math.min(...row), 0) / readings.length;
  const repeatability = meanRange / factor;
  const partVariance = Math.max(0, totalVariance - repeatability ** 2);
  const { lower, upper } = options.tolerance ?? {};
  return {
    method: 'one appraiser, mean range / d2',
    n: all.length,
    inputs: { parts: readings.length, trials, multiplier },
    mean: origin + offset,
    meanRange,
    repeatability,
    precisionToTolerance:
      lower !== undefined && upper !== undefined && upper > lower
        ? (multiplier * repeatability) / (upper - lower)
        : undetermined('no-tolerance', 'Precision to tolerance needs a lower and a greater upper limit'),
    totalVariance,
    partVariance,
    partShare:
      totalVariance > 0
        ? partVariance / totalVariance
        : undetermined('no-variation', 'All readings are alike'),
  };
}
