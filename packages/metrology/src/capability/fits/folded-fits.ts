import { findRoot } from '../../distributions/find-root.ts';
import { normalUpperQuantile, normalUpperTail } from '../../distributions/normal.ts';
import type { Undetermined } from '../../result.ts';
import type { Distribution, FittedModel } from './fitted-model.ts';
import { onBound } from './positive-readings.ts';
import type { PositiveReadings } from './positive-readings.ts';

const LOG_TWO_PI = Math.log(2 * Math.PI);

/**
 * Folded normal, |N(mean, deviation)|, by maximum likelihood: what a signed normal deviation becomes when only its size is measured.
 * At the maximum mean^2 + deviation^2 = mean square, so one equation is left: mean = average of x tanh(mean x/deviation^2). Its positive root
 * exists when the fourth moment is under three squared second moments; otherwise the mean is 0 and the half-normal is the answer.
 */
export function fitFoldedNormal(readings: PositiveReadings): FittedModel {
  const { n, sorted, meanSquare, origin } = readings;
  const root = Math.sqrt(meanSquare);
  const fourth = sorted.reduce((sum, x) => sum + x ** 4, 0) / n;
  const gap = (mean: number): number => {
    const ratio = mean / (meanSquare - mean * mean);
    let sum = 0;
    for (const x of sorted) sum += x * Math.tanh(ratio * x);
    return sum / n - mean;
  };
  const mean = fourth < 3 * meanSquare * meanSquare ? positiveRoot(gap, root) : 0;
  const variance = meanSquare - mean * mean;
  const deviation = Math.sqrt(variance);
  let logLikelihood =
    -n * (0.5 * LOG_TWO_PI + Math.log(deviation)) - (n * (meanSquare + mean * mean)) / (2 * variance);
  for (const x of sorted) {
    const t = (mean * x) / variance;
    logLikelihood += t + Math.log1p(Math.exp(-2 * t));
  }
  return {
    family: 'folded-normal',
    method: 'maximum likelihood',
    n,
    origin,
    parameters: { mean, deviation },
    estimated: 2,
    logLikelihood,
  };
}

/** The gap is positive just above 0 and negative at the root of the mean square; sought in the odds of mean/root, which have no ends. */
function positiveRoot(gap: (mean: number) => number, end: number): number {
  const meanAt = (u: number): number => end / (1 + Math.exp(-u));
  return meanAt(findRoot((u) => -gap(meanAt(u)), 1, 0.5));
}

/** Half-normal: the folded normal of mean 0; deviation^2 = mean square. */
export function fitHalfNormal(readings: PositiveReadings): FittedModel {
  const { n, meanSquare, origin } = readings;
  const deviation = Math.sqrt(meanSquare);
  return {
    family: 'half-normal',
    method: 'maximum likelihood',
    n,
    origin,
    parameters: { mean: 0, deviation },
    estimated: 1,
    logLikelihood: n * (Math.LN2 - 0.5 * LOG_TWO_PI - Math.log(deviation) - 0.5),
  };
}

/** Distance from the centre when two independent normal deviations have the same deviation: Rayleigh; deviation^2 = mean square/2. */
export function fitRayleigh(readings: PositiveReadings): FittedModel | Undetermined {
  const refused = onBound(readings);
  if (refused) return refused;
  const { n, meanSquare, meanLog, origin } = readings;
  const variance = meanSquare / 2;
  return {
    family: 'rayleigh',
    method: 'maximum likelihood',
    n,
    origin,
    parameters: { deviation: Math.sqrt(variance) },
    estimated: 1,
    logLikelihood: n * (meanLog - Math.log(variance) - 1),
  };
}

export function rayleighDistribution(deviation: number): Distribution {
  const hazard = (x: number): number => (x / deviation) ** 2 / 2;
  return {
    lowerTail: (x) => (x <= 0 ? 0 : -Math.expm1(-hazard(x))),
    upperTail: (x) => (x <= 0 ? 1 : Math.exp(-hazard(x))),
    lowerQuantile: (p) => deviation * Math.sqrt(-2 * Math.log1p(-p)),
    upperQuantile: (p) => deviation * Math.sqrt(-2 * Math.log(p)),
  };
}

export function foldedNormalDistribution(mean: number, deviation: number): Distribution {
  const upperTail = (x: number): number =>
    x <= 0 ? 1 : normalUpperTail((x - mean) / deviation) + normalUpperTail((x + mean) / deviation);
  // Between the two folds: for small x the difference of two close tails, taken where it does not cancel.
  const lowerTail = (x: number): number => {
    if (x <= 0) return 0;
    const a = (mean - x) / deviation;
    return a > 0 ? normalUpperTail(a) - normalUpperTail((mean + x) / deviation) : 1 - upperTail(x);
  };
  const upperQuantile = (p: number): number => {
    // The single far tail, or both tails when the mean is 0, are good starts.
    const start =
      mean === 0
        ? deviation * normalUpperQuantile(p / 2)
        : Math.max(0, mean + deviation * normalUpperQuantile(p));
    return mean === 0 ? start : Math.abs(findRoot((x) => p - upperTail(Math.abs(x)), start, 0.1 * deviation));
  };
  return {
    lowerTail,
    upperTail,
    upperQuantile,
    lowerQuantile: (p) => {
      if (mean === 0 && p > 0.1) return upperQuantile(1 - p);
      const density = (Math.exp(-0.5 * (mean / deviation) ** 2) * Math.sqrt(2 / Math.PI)) / deviation;
      return Math.exp(
        findRoot(
          (u) => Math.log(lowerTail(Math.exp(u)) / p),
          Math.log(Math.min(p / density, mean + deviation)),
          0.1,
        ),
      );
    },
  };
}
