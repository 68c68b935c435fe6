import {
  gammaQuantile,
  gammaUpperQuantile,
  logGamma,
  regularizedGammaP,
  regularizedGammaQ,
} from '../../distributions/gamma.ts';
import { undetermined } from '../../result.ts';
import type { Undetermined } from '../../result.ts';
import type { Distribution, FittedModel } from './fitted-model.ts';
import { onBound } from './positive-readings.ts';
import type { PositiveReadings } from './positive-readings.ts';

/** Beyond it the tails cost time that grows with the root of the shape, and differ from the normal ones by less than a reading can show. */
const LARGEST_SHAPE = 1e5;

/**
 * Gamma distribution of two parameters by maximum likelihood: the shape k solves ln k - digamma(k) = ln(mean) - mean(ln) by Newton in ln k from
 * Minka's starting value; scale = mean/k. Undetermined with a reading on the bound, and
 * above a shape of 1e5 (a spread under 0.3 % of the mean).
 */
export function fitGamma(readings: PositiveReadings): FittedModel | Undetermined {
  const refused = onBound(readings);
  if (refused) return refused;
  const { n, mean, meanLog, origin } = readings;
  const gap = Math.log(mean) - meanLog;
  if (!(gap > 0))
    return undetermined(
      'no-fit',
      'The readings spread too little around their mean for a gamma distribution',
    );
  let shape = (3 - gap + Math.sqrt((gap - 3) ** 2 + 24 * gap)) / (12 * gap);
  for (let step = 0; step < 50; step += 1) {
    const { value, slope } = logLessDigamma(shape);
    const change = (value - gap) / (shape * slope);
    shape *= Math.exp(-change);
    if (Math.abs(change) < 1e-14) break;
  }
  if (!(shape < LARGEST_SHAPE)) {
    return undetermined(
      'no-fit',
      'The readings spread so little around their mean that gamma is the normal distribution',
    );
  }
  const scale = mean / shape;
  return {
    family: 'gamma',
    method: 'maximum likelihood',
    n,
    origin,
    parameters: { shape, scale },
    estimated: 2,
    logLikelihood: n * ((shape - 1) * meanLog - shape - shape * Math.log(scale) - logGamma(shape)),
  };
}

/** ln k - digamma(k) and its slope, by the recurrence up to 10 and the asymptotic series, without cancellation at large k. */
function logLessDigamma(k: number): { value: number; slope: number } {
  let x = k;
  let sum = 0;
  let slopeSum = 0;
  while (x < 10) {
    sum += 1 / x;
    slopeSum -= 1 / (x * x);
    x += 1;
  }
  const r = 1 / x;
  const s = r * r;
  const tail = r / 2 + s * (1 / 12 - s * (1 / 120 - s * (1 / 252 - s * (1 / 240 - s / 132))));
  const trigammaTail =
    r + s / 2 + r * s * (1 / 6 - s * (1 / 30 - s * (1 / 42 - s * (1 / 30 - (s * 5) / 66))));
  const logs = x === k ? 0 : Math.log(k / x);
  return { value: logs + tail + sum, slope: 1 / k - trigammaTail + slopeSum };
}

export function gammaDistribution(shape: number, scale: number): Distribution {
  return {
    lowerTail: (x) => regularizedGammaP(shape, x / scale),
    upperTail: (x) => regularizedGammaQ(shape, x / scale),
    lowerQuantile: (p) => scale * gammaQuantile(p, shape),
    upperQuantile: (p) => scale * gammaUpperQuantile(p, shape),
  };
}
