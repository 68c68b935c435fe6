import { undetermined } from '../../result.ts';
import type { Undetermined } from '../../result.ts';
import type { Distribution, FittedModel } from './fitted-model.ts';
import { onBound } from './positive-readings.ts';
import type { PositiveReadings } from './positive-readings.ts';

/**
 * Weibull distribution of two parameters by maximum likelihood. The shape k solves
 * sum(x^k ln x)/sum(x^k) - 1/k - mean(ln x) = 0, which rises in k and has one root (Newton from the moment estimate 1.2825/s of the logarithms);
 * scale = (mean x^k)^(1/k). Powers are taken of x/largest, so none overflows. Undetermined with a reading on the bound.
 */
export function fitWeibull(readings: PositiveReadings): FittedModel | Undetermined {
  const refused = onBound(readings);
  if (refused) return refused;
  const { n, logs, meanLog, origin } = readings;
  const top = logs[n - 1] ?? 0;
  const spread = Math.sqrt(logs.reduce((sum, log) => sum + (log - meanLog) ** 2, 0) / n);
  let shape = 1.2825 / spread;
  let meanPower = 1;
  for (let step = 0; step < 100; step += 1) {
    let s0 = 0;
    let s1 = 0;
    let s2 = 0;
    for (const log of logs) {
      const y = log - top;
      const power = Math.exp(shape * y);
      s0 += power;
      s1 += power * y;
      s2 += power * y * y;
    }
    meanPower = s0 / n;
    const ratio = s1 / s0;
    const value = ratio - 1 / shape - (meanLog - top);
    const slope = s2 / s0 - ratio * ratio + 1 / (shape * shape);
    const next = Math.max(shape / 3, shape - value / slope);
    const done = Math.abs(next - shape) < 1e-14 * shape;
    shape = next;
    if (done) break;
  }
  const logScale = top + Math.log(meanPower) / shape;
  if (!Number.isFinite(logScale))
    return undetermined('no-fit', 'The Weibull distribution could not be fitted to these readings');
  return {
    family: 'weibull',
    method: 'maximum likelihood',
    n,
    origin,
    parameters: { shape, scale: Math.exp(logScale) },
    estimated: 2,
    logLikelihood: n * (Math.log(shape) - shape * logScale + (shape - 1) * meanLog - 1),
  };
}

export function weibullDistribution(shape: number, scale: number): Distribution {
  const hazard = (x: number): number => (x / scale) ** shape;
  return {
    lowerTail: (x) => (x <= 0 ? 0 : -Math.expm1(-hazard(x))),
    upperTail: (x) => (x <= 0 ? 1 : Math.exp(-hazard(x))),
    lowerQuantile: (p) => scale * (-Math.log1p(-p)) ** (1 / shape),
    upperQuantile: (p) => scale * (-Math.log(p)) ** (1 / shape),
  };
}
