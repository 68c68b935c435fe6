import { isUndetermined } from '../../result.ts';
import type { Undetermined } from '../../result.ts';
import { fitBoxCox } from './box-cox-fit.ts';
import { judgeFit } from './fit-quality.ts';
import type { FitQuality } from './fit-quality.ts';
import type { Family, FittedModel } from './fitted-model.ts';
import { fitFoldedNormal, fitHalfNormal, fitRayleigh } from './folded-fits.ts';
import { fitGamma } from './gamma-fit.ts';
import { fitJohnson } from './johnson-fit.ts';
import { fitLognormal, fitNormal } from './normal-fits.ts';
import { positiveReadings } from './positive-readings.ts';
import { fitWeibull } from './weibull-fit.ts';

/**
 * Fits one distribution to readings. Families of positive quantities (all but normal and Johnson) count from `origin`, the natural bound.
 * Undetermined with the reason of the family: too few readings, all alike, below or on the bound, no fit.
 */
export function fitDistribution(
  values: readonly number[],
  family: Family,
  origin = 0,
): FittedModel | Undetermined {
  if (family === 'normal') return fitNormal(values);
  if (family === 'johnson') return fitJohnson(values);
  const readings = positiveReadings(values, origin);
  if (isUndetermined(readings)) return readings;
  const fits = {
    lognormal: fitLognormal,
    weibull: fitWeibull,
    gamma: fitGamma,
    'folded-normal': fitFoldedNormal,
    'half-normal': fitHalfNormal,
    rayleigh: fitRayleigh,
    'box-cox': fitBoxCox,
  };
  return fits[family](readings);
}

export interface JudgedFit {
  readonly model: FittedModel;
  readonly quality: FitQuality;
  /** Akaike's criterion, 2 parameters - 2 ln likelihood: the smaller the better */
  readonly criterion: number;
}

export interface FitComparison {
  readonly method: string;
  /** fits in order of the criterion, best first */
  readonly fits: readonly JudgedFit[];
  readonly failed: readonly { readonly family: Family; readonly why: Undetermined }[];
  /** best fit that its own test does not reject; without one, the best all the same */
  readonly chosen: JudgedFit | null;
  /** true when every fit was rejected at 5 %: the figures then rest on a distribution that does not describe the readings */
  readonly allRejected: boolean;
}

/** Candidates for a quantity with a natural bound: flatness, runout, position, roughness. */
export const BOUNDED_FAMILIES: readonly Family[] = [
  'half-normal',
  'folded-normal',
  'rayleigh',
  'weibull',
  'gamma',
  'lognormal',
];

/** Candidates without one. */
export const UNBOUNDED_FAMILIES: readonly Family[] = ['normal', 'johnson'];

/**
 * Fits all candidates and puts them in order of Akaike's information criterion (IEEE Trans. Autom. Control 19, 1974), each judged by its
 * Anderson-Darling p value. Chosen is the first that is not rejected at 5 %. The choice is a proposal: with 30 readings several distributions
 * fit alike and their far quantiles differ, which is why all of them are shown.
 */
export function compareFits(
  values: readonly number[],
  families: readonly Family[],
  origin = 0,
): FitComparison {
  const failed: { family: Family; why: Undetermined }[] = [];
  const fits: JudgedFit[] = [];
  for (const family of families) {
    const model = fitDistribution(values, family, origin);
    if (isUndetermined(model)) failed.push({ family, why: model });
    else
      fits.push({
        model,
        quality: judgeFit(model, values),
        criterion: 2 * model.estimated - 2 * model.logLikelihood,
      });
  }
  fits.sort((a, b) => a.criterion - b.criterion);
  const standing = fits.find((fit) => !fit.quality.rejected);
  return {
    method: 'maximum likelihood fits in order of the Akaike criterion, first not rejected at 5 %',
    fits,
    failed,
    chosen: standing ?? fits[0] ?? null,
    allRejected: fits.length > 0 && !standing,
  };
}
