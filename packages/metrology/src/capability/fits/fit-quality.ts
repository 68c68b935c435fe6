import { andersonDarlingP, andersonDarlingStatistic } from '../../statistics/anderson-darling.ts';
import { FIT_TEST_POINTS, FIT_TEST_TAILS } from '../../tables/fit-test-points.ts';
import type { FitTestColumn } from '../../tables/fit-test-points.ts';
import { distributionOf } from './distribution-of.ts';
import type { FittedModel } from './fitted-model.ts';

export interface FitQuality {
  readonly method: string;
  /** Anderson-Darling distance of the readings from the fitted distribution */
  readonly squaredDistance: number;
  /** share of samples from such a distribution that would lie at least as far; simulated tables say no more than 0.9 */
  readonly p: number;
  /** p below 0.05 */
  readonly rejected: boolean;
}

/**
 * How well a fitted distribution describes its readings. Normal, lognormal and the powers of Box-Cox by the normal formula; Weibull, gamma,
 * half-normal, folded normal and Rayleigh by simulated points (tables/fit-test-points.ts). For Box-Cox and Johnson the p value does not know
 * that the shape was chosen to fit, so it flatters; the method says so.
 */
export function judgeFit(model: FittedModel, values: readonly number[]): FitQuality {
  const sorted = Float64Array.from(values).sort();
  const { lowerTail, upperTail } = distributionOf(model);
  const squared = andersonDarlingStatistic(sorted, logOf(lowerTail), logOf(upperTail));
  const { p, method } = pValue(model, squared, sorted.length);
  return { method, squaredDistance: squared, p, rejected: p < 0.05 };
}

/** A tail of 0 counts as the smallest double: the distance is then huge, not endless. */
function logOf(tail: (x: number) => number): (x: number) => number {
  return (x) => Math.log(Math.max(tail(x), Number.MIN_VALUE));
}

function pValue(model: FittedModel, squared: number, n: number): { p: number; method: string } {
  const { family, parameters } = model;
  const { p } = andersonDarlingP(squared, n, 'normal');
  if (family === 'normal' || family === 'lognormal')
    return { p, method: "Anderson-Darling, D'Agostino and Stephens" };
  if (family === 'box-cox' || family === 'johnson')
    return { p, method: 'Anderson-Darling after transformation, optimistic' };
  const shape =
    family === 'gamma'
      ? (parameters['shape'] ?? 0)
      : (parameters['mean'] ?? 0) / (parameters['deviation'] ?? 1);
  return {
    p: simulatedTail(family, shape, squared),
    method: 'Anderson-Darling, simulated points at n = 100',
  };
}

/** Share of samples whose distance from their own fit is larger, from the simulated points; `shape` as tables/fit-test-points.ts says. */
export function simulatedTail(family: keyof typeof FIT_TEST_POINTS, shape: number, squared: number): number {
  return interpolated(FIT_TEST_POINTS[family], shape, squared);
}

/** Between two columns the p values are mixed by the place of the shape between theirs; beyond the ends the end column holds. */
function interpolated(columns: readonly FitTestColumn[], shape: number, squared: number): number {
  const next = columns.findIndex((column) => column.shape >= shape);
  const upper = columns[next < 0 ? columns.length - 1 : next];
  const lower = next > 0 ? columns[next - 1] : upper;
  if (!upper || !lower || upper === lower) return upper ? tailOf(upper.points, squared) : 1;
  const weight = (shape - lower.shape) / (upper.shape - lower.shape);
  return (1 - weight) * tailOf(lower.points, squared) + weight * tailOf(upper.points, squared);
}

/** Linear in ln p between the points, and beyond the last by the slope of the last piece, as the tail is exponential. */
function tailOf(points: readonly number[], squared: number): number {
  const last = points.length - 1;
  const above = points.findIndex((point) => point > squared);
  const right = above < 0 ? last : above;
  if (right === 0) return FIT_TEST_TAILS[0];
  const [x0 = 0, x1 = 1] = [points[right - 1], points[right]];
  const [p0 = 1, p1 = 1] = [FIT_TEST_TAILS[right - 1], FIT_TEST_TAILS[right]];
  return Math.exp(Math.log(p0) + ((squared - x0) / (x1 - x0)) * Math.log(p1 / p0));
}
