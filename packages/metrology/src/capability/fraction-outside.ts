import { normalUpperTail } from '../distributions/normal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { limitsFault } from './capability-limits.ts';
import type { CapabilityLimits } from './capability-limits.ts';
import { exactProportion } from './proportion-interval.ts';
import type { Proportion } from './proportion-interval.ts';

/** Parts per million expected beyond each limit; 0 on a side that has no limit. */
export interface ExpectedOutside {
  readonly method: string;
  readonly belowPpm: number;
  readonly abovePpm: number;
  readonly totalPpm: number;
}

/** Readings found beyond each limit, with the exact limits of the shares. A reading equal to a limit conforms. */
export interface ObservedOutside {
  readonly method: string;
  readonly n: number;
  readonly below: number;
  readonly above: number;
  readonly total: number;
  readonly belowPpm: number;
  readonly abovePpm: number;
  readonly totalPpm: number;
  /** share outside on either side, with its confidence limits: nothing found in 100 readings still allows 3.6 % */
  readonly share: Proportion | Undetermined;
}

/**
 * Fraction a normal process puts beyond its limits: 1e6 Phi(-(mean - L)/sigma) and 1e6 Phi(-(U - mean)/sigma), each tail by itself so that
 * 1e-9 ppm keeps its digits. Holds for a stable and normal process only.
 * Undetermined: no limits, spread not above 0. Tested against capability-ppm-table and capability-cpm-two-processes.
 */
export function normalFractionOutside(
  mean: number,
  sigma: number,
  limits: CapabilityLimits,
): ExpectedOutside | Undetermined {
  const fault = limitsFault(limits);
  if (fault) return fault;
  if (!Number.isFinite(mean) || !(sigma > 0 && Number.isFinite(sigma))) {
    return undetermined('no-variation', 'The spread must be greater than 0 and the mean a number');
  }
  const { lower, upper } = limits;
  const belowPpm = lower === undefined ? 0 : 1e6 * normalUpperTail((mean - lower) / sigma);
  const abovePpm = upper === undefined ? 0 : 1e6 * normalUpperTail((upper - mean) / sigma);
  return { method: 'normal distribution', belowPpm, abovePpm, totalPpm: belowPpm + abovePpm };
}

/** Counts readings beyond the limits. Undetermined without readings or limits. */
export function observedFractionOutside(
  values: readonly number[],
  limits: CapabilityLimits,
  confidence = 0.95,
): ObservedOutside | Undetermined {
  const fault = limitsFault(limits);
  if (fault) return fault;
  const n = values.length;
  if (n === 0) return undetermined('too-few', 'There are no readings');
  if (!values.every(Number.isFinite))
    return undetermined('not-finite', 'One of the readings is not a finite number');
  const { lower = -Infinity, upper = Infinity } = limits;
  const below = values.filter((value) => value < lower).length;
  const above = values.filter((value) => value > upper).length;
  return {
    method: 'counted, exact limits for the share',
    n,
    below,
    above,
    total: below + above,
    belowPpm: (1e6 * below) / n,
    abovePpm: (1e6 * above) / n,
    totalPpm: (1e6 * (below + above)) / n,
    share: exactProportion(below + above, n, confidence),
  };
}

/**
 * Defects per million at a sigma level when the mean has moved towards one limit (six-sigma convention, shift 1.5; common practice).
 * Near tail 1e6 Q(level - shift), far tail 1e6 Q(level + shift). Tested against capability-sigma-level.
 */
export function shiftedDefectsPerMillion(
  sigmaLevel: number,
  shift = 1.5,
): { readonly nearTail: number; readonly bothTails: number } | Undetermined {
  if (!Number.isFinite(sigmaLevel) || !Number.isFinite(shift))
    return undetermined('not-finite', 'Level and shift must be numbers');
  const nearTail = 1e6 * normalUpperTail(sigmaLevel - shift);
  return { nearTail, bothTails: nearTail + 1e6 * normalUpperTail(sigmaLevel + shift) };
}
