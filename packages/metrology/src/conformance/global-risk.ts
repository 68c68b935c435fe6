import { normalDensity } from '../distributions/normal.ts';
import type { Undetermined } from '../result.ts';
import { normalShares, refuseNumbers } from './conformance-probability.ts';
import type { NumericLimits, PriorKnowledge } from './conformance-probability.ts';

/** Risks of a decision rule before anything is measured, as probabilities. */
export interface GlobalRisk {
  readonly method: 'normal process and normal measurement error, Gauss–Legendre quadrature';
  /** Probability that an item is accepted and does not conform. */
  readonly consumerRisk: number;
  /** Probability that an item is refused and conforms. */
  readonly producerRisk: number;
  /** Share of non-conforming items among the accepted; null when nothing is accepted. */
  readonly conditionalConsumerRisk: number | null;
  /** Share of conforming items among the refused; null when nothing is refused. */
  readonly conditionalProducerRisk: number | null;
  readonly conformingProbability: number;
  readonly acceptanceProbability: number;
  readonly acceptance: NumericLimits;
}

/** Nodes and weights of Gauss–Legendre quadrature on (−1, 1), 16 points, by Newton's iteration. */
const RULE = gaussLegendre(16);

function gaussLegendre(points: number): readonly (readonly [node: number, weight: number])[] {
  return Array.from({ length: points }, (_, index) => {
    let x = Math.cos((Math.PI * (index + 0.75)) / (points + 0.5));
    let slope = 1;
    for (let step = 0; step < 8; step += 1) {
      let previous = 1;
      let value = x;
      for (let degree = 2; degree <= points; degree += 1)
        [previous, value] = [value, ((2 * degree - 1) * x * value - (degree - 1) * previous) / degree];
      slope = (points * (previous - x * value)) / (1 - x * x);
      x -= value / slope;
    }
    return [x, 2 / ((1 - x * x) * slope * slope)] as const;
  });
}

const REACH = [-38, -20, -12, -9, -7, -5, -4, -3, -2, -1, 0, 1, 2, 3, 4, 5, 7, 9, 12, 20, 38];

/** Integral over [from, to] in panels whose ends follow the process (mean, sd) and the acceptance limits (u). */
function integrate(f: (x: number) => number, from: number, to: number, breaks: readonly number[]): number {
  const ends = [from, ...breaks.filter((x) => x > from && x < to), to];
  let sum = 0;
  for (let panel = 1; panel < ends.length; panel += 1) {
    const [a, b] = [ends[panel - 1] ?? from, ends[panel] ?? to];
    const half = (b - a) / 2;
    const middle = (a + b) / 2;
    for (const [node, weight] of RULE) sum += weight * half * f(middle + half * node);
  }
  return sum;
}

/**
 * Global (unconditional) consumer's and producer's risk of a decision rule, and the conditional ones.
 *
 * Consumer: ∫ over non-conforming η of g(η)·P(accept | η) dη; producer: ∫ over conforming η of g(η)·P(refuse | η) dη,
 * with g normal (process mean and standard deviation) and the measured value normal about η with standard uncertainty u.
 * `acceptance` are the limits the reading must keep (guard bands); absent, the tolerance limits (simple acceptance).
 * Source: JCGM 106:2012 clause 9.5, eqs. 17 to 19; test: reference case global-risk-table. Relative error below 1e-10
 * for u between a hundredth of and ten times the process spread.
 * Undetermined for numbers that are not finite, spreads ≤ 0, no limit, crossed limits.
 */
export function globalRisk(
  limits: NumericLimits,
  process: PriorKnowledge,
  standardUncertainty: number,
  acceptance: NumericLimits = limits,
): GlobalRisk | Undetermined {
  const { mean, standardDeviation: sd } = process;
  const u = standardUncertainty;
  const refusal = refuseNumbers(limits, [mean], [sd, u]) ?? refuseNumbers(acceptance, [], []);
  if (refusal) return refusal;
  const edges = [limits.lower, limits.upper, acceptance.lower, acceptance.upper].filter((x) => x !== null);
  const breaks = [
    ...REACH.map((z) => mean + z * sd),
    ...edges.flatMap((edge) => REACH.map((z) => edge + z * u)),
  ].sort((a, b) => a - b);
  const [first, last] = [mean - 38 * sd, mean + 38 * sd];
  const density = (x: number) => normalDensity((x - mean) / sd) / sd;
  const accepted = (x: number) => density(x) * normalShares(x, u, acceptance).inside;
  const refused = (x: number) => {
    const shares = normalShares(x, u, acceptance);
    return density(x) * (shares.below + shares.above);
  };
  const low = Math.min(Math.max(limits.lower ?? first, first), last);
  const high = Math.max(Math.min(limits.upper ?? last, last), first);
  const consumerRisk =
    (limits.lower === null ? 0 : integrate(accepted, first, low, breaks)) +
    (limits.upper === null ? 0 : integrate(accepted, high, last, breaks));
  const producerRisk = integrate(refused, low, high, breaks);
  const overall = normalShares(mean, Math.hypot(sd, u), acceptance);
  const refusedShare = overall.below + overall.above;
  return {
    method: 'normal process and normal measurement error, Gauss–Legendre quadrature',
    consumerRisk,
    producerRisk,
    conditionalConsumerRisk: overall.inside > 0 ? consumerRisk / overall.inside : null,
    conditionalProducerRisk: refusedShare > 0 ? producerRisk / refusedShare : null,
    conformingProbability: normalShares(mean, sd, limits).inside,
    acceptanceProbability: overall.inside,
    acceptance,
  };
}
