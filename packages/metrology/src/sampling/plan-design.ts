import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { accepting, MODEL_NAMES } from './acceptance-probability.ts';
import type { SamplingModel, SinglePlan } from './acceptance-probability.ts';

export interface TwoRiskPoints {
  /** Good quality that should be accepted, as a fraction (or count per piece). */
  readonly goodQuality: number;
  /** Largest probability of refusing good quality. */
  readonly producerRisk: number;
  /** Bad quality that should be refused. */
  readonly badQuality: number;
  /** Largest probability of accepting bad quality. */
  readonly consumerRisk: number;
}

export interface DesignedPlan extends SinglePlan {
  readonly method: string;
  readonly inputs: { readonly points: TwoRiskPoints; readonly model: SamplingModel };
  /** risks the plan really has */
  readonly producerRisk: number;
  readonly consumerRisk: number;
}

const LARGEST_SAMPLE = 1_000_000;

/**
 * Smallest single sampling plan through two risk points: the smallest n, and with it the smallest c, for which good quality is refused with at
 * most the producer's risk and bad quality accepted with at most the consumer's risk. For each c from 0 upwards the smallest n that meets the
 * consumer's risk is found; the smallest c that then also meets the producer's risk is the answer.
 *
 * For a lot, good quality is rounded down and bad quality up to whole pieces, so both promises hold. Undetermined: qualities not in order,
 * risks outside (0, 1), or no plan within the lot (then inspect every piece) or within a million pieces.
 */
export function planFromRiskPoints(points: TwoRiskPoints, model: SamplingModel): DesignedPlan | Undetermined {
  const { producerRisk, consumerRisk } = points;
  const fault = pointsFault(points, model);
  if (fault) return fault;
  const { good, bad } = wholePieces(points, model);
  const largest = model.kind === 'lot' ? model.lotSize : LARGEST_SAMPLE;
  const planAt = (c: number): SinglePlan | undefined => {
    const n = smallestSample(c, bad, consumerRisk, model, largest);
    return n === undefined ? undefined : { sampleSize: n, acceptanceNumber: c };
  };
  // Past the end of the lot no plan is better; there the search may stop as it would at a plan that serves.
  const serves = (c: number): boolean => {
    const plan = planAt(c);
    return !plan || 1 - accepting(plan, good, model) <= producerRisk;
  };
  const plan = planAt(smallestServing(serves, largest));
  if (plan) {
    return {
      ...plan,
      method: `smallest plan through two risk points, ${MODEL_NAMES[model.kind]}`,
      inputs: { points, model },
      producerRisk: 1 - accepting(plan, good, model),
      consumerRisk: accepting(plan, bad, model),
    };
  }
  return undetermined(
    'no-plan',
    `No plan of up to ${largest} pieces keeps both risks; inspect every piece or move the points apart`,
  );
}

export interface ZeroAcceptancePlan extends SinglePlan {
  readonly method: string;
  readonly inputs: {
    readonly limitingQuality: number;
    readonly consumerRisk: number;
    readonly model: SamplingModel;
  };
  /** probability of accepting exactly the limiting quality */
  readonly consumerRisk: number;
  readonly inspectAll: boolean;
}

/**
 * Zero-acceptance plan: the smallest sample that accepts with no nonconforming piece and lets a lot of the limiting quality through with at most
 * the consumer's risk. Process: n = ceil(ln beta / ln(1 - p)); a lot by the exact hypergeometric probability, the limiting quality rounded up to
 * whole pieces. Such a plan says nothing about the producer's risk: good lots with a single nonconforming piece are refused often.
 * @param limitingQuality fraction nonconforming (or nonconformities per piece) that must be caught, above 0
 * @param consumerRisk beta, between 0 and 1 (0.1 and 0.05 are common practice)
 */
export function zeroAcceptancePlan(
  limitingQuality: number,
  consumerRisk: number,
  model: SamplingModel,
): ZeroAcceptancePlan | Undetermined {
  const points = { goodQuality: 0, producerRisk: 0.5, badQuality: limitingQuality, consumerRisk };
  const fault = pointsFault(points, model);
  if (fault) return fault;
  const { bad } = wholePieces(points, model);
  const largest = model.kind === 'lot' ? model.lotSize : LARGEST_SAMPLE;
  const n = smallestSample(0, bad, consumerRisk, model, largest);
  if (n === undefined)
    return undetermined('no-plan', `No sample of up to ${largest} pieces keeps the consumer's risk`);
  const plan = { sampleSize: n, acceptanceNumber: 0 };
  return {
    ...plan,
    method: `zero acceptance, ${MODEL_NAMES[model.kind]}`,
    inputs: { limitingQuality, consumerRisk, model },
    consumerRisk: accepting(plan, bad, model),
    inspectAll: model.kind === 'lot' && n >= model.lotSize,
  };
}

function pointsFault(points: TwoRiskPoints, model: SamplingModel): Undetermined | undefined {
  const { goodQuality, producerRisk, badQuality, consumerRisk } = points;
  if (model.kind === 'lot' && (!Number.isInteger(model.lotSize) || model.lotSize < 1)) {
    return undetermined('lot-size', 'The lot size must be a whole number of at least 1');
  }
  const largest = model.kind === 'nonconformities' ? Number.MAX_VALUE : 1;
  if (!(goodQuality >= 0 && badQuality > goodQuality && badQuality <= largest)) {
    return undetermined(
      'quality',
      'Good quality must be at least 0 and bad quality greater than good quality, as fractions',
    );
  }
  if (!(producerRisk > 0 && producerRisk < 1 && consumerRisk > 0 && consumerRisk < 1)) {
    return undetermined('risk', 'Both risks must lie between 0 and 1');
  }
  return undefined;
}

/** The two qualities as fractions, which for a lot are whole pieces on the safe side. */
function wholePieces(points: TwoRiskPoints, model: SamplingModel): { good: number; bad: number } {
  if (model.kind !== 'lot') return { good: points.goodQuality, bad: points.badQuality };
  const { lotSize } = model;
  // A fraction such as 0.07 x 100 may come out a hair above its whole number; that hair is not a piece.
  const hair = 1e-9;
  return {
    good: Math.floor(points.goodQuality * lotSize + hair) / lotSize,
    bad: Math.max(1, Math.ceil(points.badQuality * lotSize - hair)) / lotSize,
  };
}

/** Acceptance numbers tried one by one before the search takes longer steps. */
const ONE_BY_ONE = 100;

/**
 * The smallest acceptance number that serves. The producer's risk falls as the number grows but for the jitter of whole pieces, so beyond the
 * first hundred it is bracketed by doubling and halved, and then followed down while the number before serves too.
 */
function smallestServing(serves: (c: number) => boolean, largest: number): number {
  for (let c = 0; c <= Math.min(ONE_BY_ONE, largest); c += 1) if (serves(c)) return c;
  let low = ONE_BY_ONE;
  let high = ONE_BY_ONE * 2;
  while (high < largest && !serves(high)) {
    low = high;
    high *= 2;
  }
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (serves(middle)) high = middle;
    else low = middle;
  }
  while (high > ONE_BY_ONE && serves(high - 1)) high -= 1;
  return high;
}

/** Acceptance falls as the sample grows, so the smallest sample is found by halving. */
function smallestSample(
  acceptanceNumber: number,
  bad: number,
  risk: number,
  model: SamplingModel,
  largest: number,
): number | undefined {
  const passes = (sampleSize: number): boolean =>
    accepting({ sampleSize, acceptanceNumber }, bad, model) <= risk;
  if (!passes(largest)) return undefined;
  let low = acceptanceNumber;
  let high = largest;
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (passes(middle)) high = middle;
    else low = middle;
  }
  return high;
}
