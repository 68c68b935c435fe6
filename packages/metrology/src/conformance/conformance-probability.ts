import { normalCdf, normalUpperTail } from '../distributions/normal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

/** Limits as numbers, for probabilities only; null where a side has none. A natural bound is not a limit: pass null. */
export interface NumericLimits {
  readonly lower: number | null;
  readonly upper: number | null;
}

/** A measured value with its standard uncertainty, both in the unit of the limits. */
export interface MeasuredValue {
  readonly value: number;
  /** Standard uncertainty u > 0 (expanded uncertainty divided by its coverage factor). */
  readonly standardUncertainty: number;
}

/** What is known of the characteristic before it is measured: the process it comes from. */
export interface PriorKnowledge {
  readonly mean: number;
  readonly standardDeviation: number;
}

/** How probable it is that the true value lies inside the limits, given the measured one. */
export interface ConformanceProbability {
  readonly method: 'normal measurement result' | 'normal measurement result with a normal prior';
  readonly probability: number;
  readonly belowLower: number;
  readonly aboveUpper: number;
  /** Centre and standard deviation of what is believed of the true value. */
  readonly estimate: number;
  readonly standardDeviation: number;
  readonly limits: NumericLimits;
}

/** Probabilities of a normal variable below, inside and above two limits, each without cancellation. */
export function normalShares(mean: number, sd: number, limits: NumericLimits) {
  const low = limits.lower === null ? -Infinity : (limits.lower - mean) / sd;
  const high = limits.upper === null ? Infinity : (limits.upper - mean) / sd;
  const below = low === -Infinity ? 0 : normalCdf(low);
  const above = high === Infinity ? 0 : normalUpperTail(high);
  const inside =
    low > 0 ? normalUpperTail(low) - above : high < 0 ? normalCdf(high) - below : 1 - below - above;
  return { below, inside, above };
}

/** Refuses limits or a spread no probability can be taken from. */
export function refuseNumbers(limits: NumericLimits, numbers: readonly number[], spreads: readonly number[]) {
  const { lower, upper } = limits;
  const all = [
    ...numbers,
    ...spreads,
    ...(lower === null ? [] : [lower]),
    ...(upper === null ? [] : [upper]),
  ];
  if (!all.every(Number.isFinite))
    return undetermined('not-finite', 'A value, limit or spread is not a finite number: correct it');
  if (!spreads.every((spread) => spread > 0))
    return undetermined(
      'spread-not-positive',
      'A standard deviation or uncertainty is not above 0: enter it',
    );
  if (lower === null && upper === null)
    return undetermined('no-limits', 'There is no tolerance limit: enter at least one');
  if (lower !== null && upper !== null && lower > upper)
    return undetermined(
      'limits-crossed',
      'The lower limit is above the upper limit: exchange or correct them',
    );
  return null;
}

/**
 * Probability that the true value conforms, given one measured value with normal measurement error.
 *
 * p = Φ((T_U − y)/u) − Φ((T_L − y)/u), one-sided with one term; y measured value, u standard uncertainty > 0, T_L and
 * T_U tolerance limits. With `prior` (the process, normal with mean and standard deviation) y and u are those of the
 * posterior: 1/u² adds, means are weighted by 1/u². Source: JCGM 106:2012 clauses 7.2 to 7.4, annex A; tests: reference
 * cases jcgm106-zener, jcgm106-z-table, conformance-probability-rows. Tails keep their digits.
 * Undetermined for numbers that are not finite, u ≤ 0, no limit, crossed limits.
 */
export function conformanceProbability(
  measured: MeasuredValue,
  limits: NumericLimits,
  prior?: PriorKnowledge,
): ConformanceProbability | Undetermined {
  const { value, standardUncertainty } = measured;
  const refusal = refuseNumbers(
    limits,
    prior ? [value, prior.mean] : [value],
    prior ? [standardUncertainty, prior.standardDeviation] : [standardUncertainty],
  );
  if (refusal) return refusal;
  let estimate = value;
  let sd = standardUncertainty;
  if (prior) {
    const [measuredWeight, priorWeight] = [standardUncertainty ** -2, prior.standardDeviation ** -2];
    estimate = (value * measuredWeight + prior.mean * priorWeight) / (measuredWeight + priorWeight);
    sd = (measuredWeight + priorWeight) ** -0.5;
  }
  const { below, inside, above } = normalShares(estimate, sd, limits);
  return {
    method: prior ? 'normal measurement result with a normal prior' : 'normal measurement result',
    probability: inside,
    belowLower: below,
    aboveUpper: above,
    estimate,
    standardDeviation: sd,
    limits,
  };
}

/** Risk of one decision already taken on one measured value. */
export interface SpecificRisk {
  readonly method: 'specific risk, normal measurement error';
  /** `consumer`: an accepted item does not conform; `producer`: a refused item conforms. */
  readonly bearer: 'consumer' | 'producer';
  readonly risk: number;
  readonly conformance: ConformanceProbability;
}

/**
 * Specific risk of accepting or refusing one item: consumer's 1 − p when accepted, producer's p when refused, with p
 * of `conformanceProbability`. Source: JCGM 106:2012 clause 9.3.2 (specific risk). Undetermined as there.
 */
export function specificRisk(
  measured: MeasuredValue,
  limits: NumericLimits,
  accepted: boolean,
  prior?: PriorKnowledge,
): SpecificRisk | Undetermined {
  const conformance = conformanceProbability(measured, limits, prior);
  if ('undetermined' in conformance) return conformance;
  return {
    method: 'specific risk, normal measurement error',
    bearer: accepted ? 'consumer' : 'producer',
    risk: accepted ? conformance.belowLower + conformance.aboveUpper : conformance.probability,
    conformance,
  };
}
