import { normalUpperQuantile, normalUpperTail } from '../../distributions/normal.ts';
import type { Undetermined } from '../../result.ts';
import { momentsOf } from '../moments.ts';
import type { Distribution, FittedModel } from './fitted-model.ts';
import { onBound } from './positive-readings.ts';
import type { PositiveReadings } from './positive-readings.ts';

const LOG_TWO_PI = Math.log(2 * Math.PI);

/**
 * Normal distribution by mean and sample standard deviation (n - 1), so that the percentile method agrees with the ordinary formula; the
 * likelihood is taken at its own maximum, which divides by n.
 */
export function fitNormal(values: readonly number[]): FittedModel | Undetermined {
  const moments = momentsOf(values);
  if ('undetermined' in moments) return moments;
  const { n, mean, deviation } = moments;
  const likeliest = deviation * Math.sqrt((n - 1) / n);
  return {
    family: 'normal',
    method: 'mean and sample standard deviation',
    n,
    origin: 0,
    parameters: { mean, deviation },
    estimated: 2,
    logLikelihood: -0.5 * n * (LOG_TWO_PI + 1) - n * Math.log(likeliest),
  };
}

export function normalDistribution(mean: number, deviation: number): Distribution {
  return {
    lowerTail: (x) => normalUpperTail((mean - x) / deviation),
    upperTail: (x) => normalUpperTail((x - mean) / deviation),
    lowerQuantile: (p) => mean - deviation * normalUpperQuantile(p),
    upperQuantile: (p) => mean + deviation * normalUpperQuantile(p),
  };
}

/** Lognormal distribution of two parameters by maximum likelihood: mean and deviation (n) of the natural logarithms. */
export function fitLognormal(readings: PositiveReadings): FittedModel | Undetermined {
  const refused = onBound(readings);
  if (refused) return refused;
  const { n, logs, meanLog, origin } = readings;
  const deviationLog = Math.sqrt(logs.reduce((sum, log) => sum + (log - meanLog) ** 2, 0) / n);
  return {
    family: 'lognormal',
    method: 'maximum likelihood',
    n,
    origin,
    parameters: { meanLog, deviationLog },
    estimated: 2,
    logLikelihood: -0.5 * n * (LOG_TWO_PI + 1) - n * Math.log(deviationLog) - n * meanLog,
  };
}

export function lognormalDistribution(meanLog: number, deviationLog: number): Distribution {
  const normal = normalDistribution(meanLog, deviationLog);
  return {
    lowerTail: (x) => (x <= 0 ? 0 : normal.lowerTail(Math.log(x))),
    upperTail: (x) => (x <= 0 ? 1 : normal.upperTail(Math.log(x))),
    lowerQuantile: (p) => Math.exp(normal.lowerQuantile(p)),
    upperQuantile: (p) => Math.exp(normal.upperQuantile(p)),
  };
}
