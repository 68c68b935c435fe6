import { binomialCdf } from '../distributions/binomial.ts';
import { hypergeometricCdf } from '../distributions/hypergeometric.ts';
import { poissonCdf } from '../distributions/poisson.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

/** Take `sampleSize` pieces; accept the lot when at most `acceptanceNumber` of them are nonconforming. */
export interface SinglePlan {
  readonly sampleSize: number;
  readonly acceptanceNumber: number;
}

/**
 * What is drawn from what. `lot`: without replacement from one lot (hypergeometric, type A). `process`: from a long run of pieces (binomial,
 * type B). `nonconformities`: counts of nonconformities, of which one piece may have several (Poisson).
 */
export type SamplingModel =
  { readonly kind: 'lot'; readonly lotSize: number } | { readonly kind: 'process' | 'nonconformities' };

export const MODEL_NAMES = {
  lot: 'hypergeometric, one lot without replacement',
  process: 'binomial, pieces of a process',
  nonconformities: 'Poisson, nonconformities per piece',
} as const satisfies Record<SamplingModel['kind'], string>;

/** A refusal when plan and model do not fit together, otherwise nothing. */
export function planFault(plan: SinglePlan, model: SamplingModel): Undetermined | undefined {
  const { sampleSize, acceptanceNumber } = plan;
  if (!Number.isInteger(sampleSize) || sampleSize < 1) {
    return undetermined('sample-size', 'The sample size must be a whole number of at least 1');
  }
  if (!Number.isInteger(acceptanceNumber) || acceptanceNumber < 0) {
    return undetermined('acceptance-number', 'The acceptance number must be a whole number of at least 0');
  }
  if (model.kind === 'lot' && (!Number.isInteger(model.lotSize) || model.lotSize < sampleSize)) {
    return undetermined(
      'lot-size',
      `The lot size must be a whole number of at least the sample size ${sampleSize}`,
    );
  }
  return undefined;
}

/**
 * Probability that a single sampling plan accepts, exact under the chosen model: P(X <= c) with X hypergeometric(N, D, n), binomial(n, p) or
 * Poisson(n p). For `lot` the quality is turned into whole pieces D = quality x lotSize, rounded to the nearest piece.
 * @param quality fraction nonconforming from 0 to 1; for `nonconformities` the mean number per piece, at least 0
 * Undetermined: a plan or model that is not whole, or a quality outside its domain. Tested against the reference case nist-oc-52-3.
 */
export function acceptanceProbability(
  plan: SinglePlan,
  quality: number,
  model: SamplingModel,
): number | Undetermined {
  const fault = planFault(plan, model);
  if (fault) return fault;
  const largest = model.kind === 'nonconformities' ? Number.MAX_VALUE : 1;
  if (!(quality >= 0 && quality <= largest)) {
    return undetermined(
      'quality',
      'The fraction nonconforming must lie between 0 and 1 (a count per piece must not be negative)',
    );
  }
  return accepting(plan, quality, model);
}

/** The same for arguments already checked. */
export function accepting(plan: SinglePlan, quality: number, model: SamplingModel): number {
  const { sampleSize: n, acceptanceNumber: c } = plan;
  if (model.kind === 'lot')
    return hypergeometricCdf(c, model.lotSize, Math.round(quality * model.lotSize), n);
  return model.kind === 'process' ? binomialCdf(c, n, quality) : poissonCdf(c, n * quality);
}
