import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { refuseShare } from './intervals.ts';
import { exactTwoSidedFactor, howeFactor, oneSidedFactor } from './tolerance-factors.ts';

/** Both limits, or only an upper or a lower one. */
export type ToleranceSides = 'two' | 'upper' | 'lower';

/** What a normal statistical tolerance interval is computed from. */
export interface ToleranceIntervalInput {
  readonly n: number;
  readonly mean: number;
  /** s with divisor n − 1. */
  readonly standardDeviation: number;
  /** Share of the population to be covered. */
  readonly coverage: number;
  /** Confidence that at least this share is covered. */
  readonly confidence: number;
  readonly sides?: ToleranceSides;
  /** Two-sided only: `exact` (default) or the approximation of Howe. */
  readonly factor?: 'exact' | 'howe';
}

/** A statistical tolerance interval: where the population lies. It is not a tolerance of a drawing. */
export interface ToleranceInterval {
  readonly method: 'normal, exact factor' | 'normal, factor of Howe' | 'normal, non-central t';
  readonly n: number;
  readonly coverage: number;
  readonly confidence: number;
  readonly sides: ToleranceSides;
  readonly factor: number;
  /** Null where the interval has no such end. */
  readonly lower: number | null;
  readonly upper: number | null;
}

/**
 * Interval that holds at least the share `coverage` of a normal population with the stated confidence: x̄ ± k·s.
 *
 * Two-sided k exact (ISO 16269-6:2014) or by Howe; one-sided k from the non-central t distribution, exact.
 * @returns undetermined when n < 2, a share is not between 0 and 1, or mean or deviation is not finite
 */
export function normalToleranceInterval(input: ToleranceIntervalInput): ToleranceInterval | Undetermined {
  const {
    n,
    mean,
    standardDeviation: s,
    coverage,
    confidence,
    sides = 'two',
    factor: choice = 'exact',
  } = input;
  const refused = refuseShare(coverage, 'coverage') ?? refuseShare(confidence, 'confidence');
  if (refused !== null) return refused;
  if (!Number.isInteger(n) || n < 2)
    return undetermined('too-few', 'A tolerance interval needs at least 2 readings');
  if (!Number.isFinite(mean) || !(s >= 0 && s < Infinity))
    return undetermined('not-finite', 'Mean and standard deviation must be finite numbers');
  const common = { n, coverage, confidence, sides };
  if (sides !== 'two') {
    const factor = oneSidedFactor(n, coverage, confidence);
    return {
      method: 'normal, non-central t',
      ...common,
      factor,
      lower: sides === 'lower' ? mean - factor * s : null,
      upper: sides === 'upper' ? mean + factor * s : null,
    };
  }
  const factor = (choice === 'howe' ? howeFactor : exactTwoSidedFactor)(n, coverage, confidence);
  return {
    method: choice === 'howe' ? 'normal, factor of Howe' : 'normal, exact factor',
    ...common,
    factor,
    lower: mean - factor * s,
    upper: mean + factor * s,
  };
}
