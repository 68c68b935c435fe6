import { normalUpperQuantile } from '../distributions/normal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { normalShares, refuseNumbers } from './conformance-probability.ts';
import type { NumericLimits } from './conformance-probability.ts';

/** Limits a reading must keep so that the true value conforms with a stated probability. */
export interface AcceptanceBand {
  readonly method: 'guard band from a conformance probability, normal measurement error';
  readonly lower: number | null;
  readonly upper: number | null;
  /** Guard band g = distance from the tolerance limit, and the multiplier z = g/u. */
  readonly guardBand: number;
  readonly multiplier: number;
  readonly probability: number;
}

/**
 * Acceptance limits for a required conformance probability p (0.5 < p < 1): every reading inside has at least p.
 *
 * One limit: g = z·u with z the normal quantile of p (JCGM 106:2012 clause 7.3; for p = 0.95 z = 1.645, the default of
 * ISO 14253-1:2017). Two limits: the larger g for which Φ((T_U − y)/u) − Φ((T_L − y)/u) = p at y = T_U − g, found by
 * halving, which matters when the band is only a few u wide.
 * Undetermined (`uncertainty-too-large`) when not even a reading in the middle reaches p; otherwise as
 * `conformanceProbability`.
 */
export function acceptanceBand(
  limits: NumericLimits,
  standardUncertainty: number,
  probability: number,
): AcceptanceBand | Undetermined {
  const refusal = refuseNumbers(limits, [probability], [standardUncertainty]);
  if (refusal) return refusal;
  if (probability <= 0.5 || probability >= 1)
    return undetermined(
      'probability-outside',
      'The conformance probability is not between 0.5 and 1: enter it, e.g. 0.95',
    );
  const { lower, upper } = limits;
  const u = standardUncertainty;
  let multiplier = normalUpperQuantile(1 - probability);
  if (lower !== null && upper !== null) {
    const width = upper - lower;
    const reached = (z: number) => normalShares(0, 1, { lower: z - width / u, upper: z }).inside;
    let high = width / (2 * u);
    if (reached(high) < probability)
      return undetermined(
        'uncertainty-too-large',
        'No reading can show conformity with this probability: the uncertainty is too large for the band',
      );
    let low = Math.min(multiplier, high);
    for (let step = 0; step < 200 && high - low > 1e-15 * high; step += 1) {
      const middle = (low + high) / 2;
      if (reached(middle) < probability) low = middle;
      else high = middle;
    }
    multiplier = high;
  }
  const guardBand = multiplier * u;
  return {
    method: 'guard band from a conformance probability, normal measurement error',
    lower: lower === null ? null : lower + guardBand,
    upper: upper === null ? null : upper - guardBand,
    guardBand,
    multiplier,
    probability,
  };
}

/** How fine a measurement is against its tolerance. */
export interface MeasurementCapability {
  readonly method: 'C_m = (T_U − T_L) / (4·u)';
  readonly index: number;
  readonly tolerance: number;
  readonly standardUncertainty: number;
}

/**
 * Measurement capability index C_m = (T_U − T_L)/(4·u) = T/(2·U) with U = 2·u.
 *
 * T_L, T_U tolerance limits, u standard uncertainty > 0, same unit. At C_m = 4 the uncertainty U is an eighth of the
 * band. Source: JCGM 106:2012 clause 7.6.3. Undetermined for a one-sided tolerance (there is no width) and as
 * `conformanceProbability`.
 */
export function measurementCapabilityIndex(
  limits: NumericLimits,
  standardUncertainty: number,
): MeasurementCapability | Undetermined {
  const refusal = refuseNumbers(limits, [], [standardUncertainty]);
  if (refusal) return refusal;
  if (limits.lower === null || limits.upper === null)
    return undetermined(
      'one-sided',
      'A one-sided tolerance has no width to compare with: there is no capability index',
    );
  const tolerance = limits.upper - limits.lower;
  return {
    method: 'C_m = (T_U − T_L) / (4·u)',
    index: tolerance / (4 * standardUncertainty),
    tolerance,
    standardUncertainty,
  };
}
