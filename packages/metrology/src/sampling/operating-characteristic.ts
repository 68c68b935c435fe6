import { findRoot } from '../distributions/find-root.ts';
import { isUndetermined, undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { accepting, acceptanceProbability, MODEL_NAMES, planFault } from './acceptance-probability.ts';
import type { SamplingModel, SinglePlan } from './acceptance-probability.ts';

export interface CharacteristicPoint {
  /** incoming quality; for a lot the fraction that a whole number of pieces makes */
  readonly quality: number;
  readonly acceptance: number;
  /** average outgoing quality when rejected lots are sorted and nonconforming pieces replaced */
  readonly outgoingQuality: number;
  /** average total inspection per lot; undetermined without a lot size */
  readonly totalInspection: number | Undetermined;
}

export interface OperatingCharacteristic {
  readonly method: string;
  readonly inputs: {
    readonly plan: SinglePlan;
    readonly model: SamplingModel;
    readonly lotSize: number | null;
  };
  readonly points: readonly CharacteristicPoint[];
}

export interface CharacteristicOptions {
  /** Pieces per lot, for average outgoing quality and total inspection. The model `lot` brings its own. */
  readonly lotSize?: number;
}

/**
 * Operating characteristic of any single plan: acceptance, average outgoing quality and average total inspection at each quality.
 *
 * Pa as `acceptanceProbability`; AOQ = p Pa (N - n)/N, or p Pa when no lot size is given (the limit of a large lot); ATI = n + (1 - Pa)(N - n).
 * Rectifying inspection: a rejected lot is sorted and every nonconforming piece found is replaced.
 * Source: NIST/SEMATECH e-Handbook 6.2.3.2. Its printed AOQ column leaves the factor (N - n)/N out although its formula has it.
 * Tested against the reference case nist-oc-52-3.
 */
export function operatingCharacteristic(
  plan: SinglePlan,
  qualities: readonly number[],
  model: SamplingModel,
  options: CharacteristicOptions = {},
): OperatingCharacteristic | Undetermined {
  const lotSize = model.kind === 'lot' ? model.lotSize : options.lotSize;
  if (lotSize !== undefined && !(lotSize >= plan.sampleSize)) {
    return undetermined('lot-size', 'The lot size must be at least the sample size');
  }
  const points: CharacteristicPoint[] = [];
  for (const asked of qualities) {
    const acceptance = acceptanceProbability(plan, asked, model);
    if (typeof acceptance !== 'number') return acceptance;
    const quality = model.kind === 'lot' ? Math.round(asked * model.lotSize) / model.lotSize : asked;
    points.push({
      quality,
      acceptance,
      outgoingQuality: outgoing(quality, acceptance, plan, lotSize),
      totalInspection:
        lotSize === undefined
          ? undetermined('no-lot-size', 'Average total inspection needs the lot size')
          : plan.sampleSize + (1 - acceptance) * (lotSize - plan.sampleSize),
    });
  }
  return { method: MODEL_NAMES[model.kind], inputs: { plan, model, lotSize: lotSize ?? null }, points };
}

function outgoing(
  quality: number,
  acceptance: number,
  plan: SinglePlan,
  lotSize: number | undefined,
): number {
  return quality * acceptance * (lotSize === undefined ? 1 : (lotSize - plan.sampleSize) / lotSize);
}

/**
 * Quality a plan accepts with a given probability: the producer's risk quality at 1 - alpha, the indifference quality at 0.5, the limiting
 * quality at beta. Solves Pa(p) = probability for the continuous models; for a lot it is the largest whole number of nonconforming pieces still
 * accepted with at least that probability, divided by the lot size.
 * @param probability strictly between 0 and 1
 */
export function qualityAtAcceptance(
  plan: SinglePlan,
  probability: number,
  model: SamplingModel,
): number | Undetermined {
  const fault = planFault(plan, model);
  if (fault) return fault;
  if (!(probability > 0 && probability < 1)) {
    return undetermined('probability', 'The probability of acceptance must lie between 0 and 1');
  }
  const { sampleSize: n, acceptanceNumber: c } = plan;
  if (model.kind === 'lot') {
    let low = 0;
    let high = model.lotSize + 1;
    while (high - low > 1) {
      const middle = Math.floor((low + high) / 2);
      if (accepting(plan, middle / model.lotSize, model) >= probability) low = middle;
      else high = middle;
    }
    return low / model.lotSize;
  }
  if (model.kind === 'process' && c >= n) {
    return undetermined(
      'accepts-all',
      'A plan that accepts as many nonconforming pieces as it draws accepts every lot',
    );
  }
  // The odds of p, or the rate itself, on a log scale: both run over the whole line, so the root is always bracketed.
  const qualityOf = (u: number): number => (model.kind === 'process' ? 1 / (1 + Math.exp(-u)) : Math.exp(u));
  return qualityOf(
    findRoot((u) => probability - accepting(plan, qualityOf(u), model), Math.log((c + 0.7) / n), 0.5),
  );
}

export interface OutgoingQualityLimit {
  readonly method: string;
  /** highest average outgoing quality */
  readonly limit: number;
  /** incoming quality at which it is reached */
  readonly at: number;
  readonly inputs: {
    readonly plan: SinglePlan;
    readonly model: SamplingModel;
    readonly lotSize: number | null;
  };
}

/**
 * Average outgoing quality limit: the maximum over the incoming quality of p Pa (N - n)/N (without the factor when no lot size is given).
 * The curve of a single plan rises to one peak; for a lot the peak is sought among whole numbers of nonconforming pieces.
 */
export function outgoingQualityLimit(
  plan: SinglePlan,
  model: SamplingModel,
  options: CharacteristicOptions = {},
): OutgoingQualityLimit | Undetermined {
  const fault = planFault(plan, model);
  if (fault) return fault;
  const lotSize = model.kind === 'lot' ? model.lotSize : options.lotSize;
  if (lotSize !== undefined && !(lotSize >= plan.sampleSize)) {
    return undetermined('lot-size', 'The lot size must be at least the sample size');
  }
  const aoq = (quality: number): number => outgoing(quality, accepting(plan, quality, model), plan, lotSize);
  const far = qualityAtAcceptance(plan, 1e-6, model);
  if (isUndetermined(far)) return far;
  const at =
    model.kind === 'lot'
      ? wholePeak(aoq, Math.round(far * model.lotSize) + 1, model.lotSize)
      : peak(aoq, far);
  return {
    method: MODEL_NAMES[model.kind],
    limit: aoq(at),
    at,
    inputs: { plan, model, lotSize: lotSize ?? null },
  };
}

/** The same among whole pieces 0 to `end` of a lot; near the top, where neighbours may be alike, each is looked at. */
function wholePeak(value: (quality: number) => number, end: number, lotSize: number): number {
  let low = 0;
  let high = Math.min(end, lotSize);
  while (high - low > 8) {
    const third = Math.floor((high - low) / 3);
    if (value((low + third) / lotSize) < value((high - third) / lotSize)) low += third;
    else high -= third;
  }
  let best = low;
  for (let pieces = low + 1; pieces <= high; pieces += 1) {
    if (value(pieces / lotSize) > value(best / lotSize)) best = pieces;
  }
  return best / lotSize;
}

/** Place of the maximum of a one-peaked function on (0, end), by golden section. */
function peak(value: (x: number) => number, end: number): number {
  const ratio = (Math.sqrt(5) - 1) / 2;
  let low = 0;
  let high = end;
  while (high - low > 1e-9 * high) {
    const left = high - ratio * (high - low);
    const right = low + ratio * (high - low);
    if (value(left) < value(right)) low = left;
    else high = right;
  }
  return (low + high) / 2;
}
