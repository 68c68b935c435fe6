import { boxCoxDistribution } from './box-cox-fit.ts';
import { foldedNormalDistribution, rayleighDistribution } from './folded-fits.ts';
import { gammaDistribution } from './gamma-fit.ts';
import { johnsonDistribution } from './johnson-fit.ts';
import { lognormalDistribution, normalDistribution } from './normal-fits.ts';
import { weibullDistribution } from './weibull-fit.ts';
import type { Distribution, FittedModel } from './fitted-model.ts';

/** What `distributionOf` needs of a model: a fitted one, or one whose parameters are known. */
export type KnownDistribution = Pick<FittedModel, 'family' | 'parameters'> &
  Partial<Pick<FittedModel, 'origin' | 'variant'>>;

/**
 * The functions of a distribution named by family and parameters: normal {mean, deviation}, lognormal {meanLog, deviationLog},
 * weibull and gamma {shape, scale}, folded-normal and half-normal {mean, deviation} of the unfolded normal, rayleigh {deviation} of one axis,
 * box-cox {lambda, scale, mean, deviation}, johnson {gamma, delta, xi, lambda} with its variant. A missing parameter gives NaN throughout.
 */
export function distributionOf(model: KnownDistribution): Distribution {
  const origin = model.origin ?? 0;
  const standard = atZero(model);
  if (origin === 0) return standard;
  return {
    lowerTail: (x) => standard.lowerTail(x - origin),
    upperTail: (x) => standard.upperTail(x - origin),
    lowerQuantile: (p) => origin + standard.lowerQuantile(p),
    upperQuantile: (p) => origin + standard.upperQuantile(p),
  };
}

function atZero({ family, parameters, variant }: KnownDistribution): Distribution {
  const { mean = NaN, deviation = NaN, shape = NaN, scale = NaN, lambda = NaN } = parameters;
  switch (family) {
    case 'normal':
      return normalDistribution(mean, deviation);
    case 'lognormal':
      return lognormalDistribution(parameters['meanLog'] ?? NaN, parameters['deviationLog'] ?? NaN);
    case 'weibull':
      return weibullDistribution(shape, scale);
    case 'gamma':
      return gammaDistribution(shape, scale);
    case 'half-normal':
      return foldedNormalDistribution(0, deviation);
    case 'folded-normal':
      return foldedNormalDistribution(mean, deviation);
    case 'rayleigh':
      return rayleighDistribution(deviation);
    case 'box-cox':
      return boxCoxDistribution(lambda, scale, mean, deviation);
    case 'johnson':
      return johnsonDistribution(variant ?? 'unbounded', parameters);
  }
}
