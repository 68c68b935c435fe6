import {
  logNormalCdf,
  logNormalUpperTail,
  normalUpperQuantile,
  normalUpperTail,
} from '../../distributions/normal.ts';
import { undetermined } from '../../result.ts';
import type { Undetermined } from '../../result.ts';
import { andersonDarlingStatistic } from '../../statistics/anderson-darling.ts';
import { quantileOfSorted } from '../../statistics/quantile.ts';
import type { Distribution, FittedModel } from './fitted-model.ts';

type Variant = NonNullable<FittedModel['variant']>;

interface Curve {
  readonly variant: Variant;
  readonly gamma: number;
  readonly delta: number;
  readonly xi: number;
  readonly lambda: number;
}

/**
 * Johnson curve from four quantiles at normal scores 3z, z, -z, -3z (Slifker and Shapiro, Technometrics 22, 1980). With m, n, p the outer right,
 * outer left and inner distance, m n/p^2 above 1 calls for the unbounded, below 1 for the bounded, at 1 for the lognormal curve.
 * @param quantiles values at -3z, -z, z, 3z, rising
 */
export function johnsonFromQuantiles(
  quantiles: readonly [number, number, number, number],
  z: number,
): Curve | Undetermined {
  const [farLeft, left, right, farRight] = quantiles;
  const p = right - left;
  const a = (farRight - right) / p;
  const b = (left - farLeft) / p;
  const ratio = a * b;
  const middle = (right + left) / 2;
  if (!(a > 0 && b > 0 && p > 0))
    return undetermined('no-fit', 'Two of the four quantiles are alike, so no Johnson curve fits');
  if (ratio > 1.001) {
    const root = Math.sqrt(ratio - 1);
    const delta = (2 * z) / Math.acosh((a + b) / 2);
    return {
      variant: 'unbounded',
      delta,
      gamma: delta * Math.asinh((b - a) / (2 * root)),
      lambda: (2 * p * root) / ((a + b - 2) * Math.sqrt(a + b + 2)),
      xi: middle + (p * (b - a)) / (2 * (a + b - 2)),
    };
  }
  if (ratio < 0.999) {
    const product = (1 + 1 / a) * (1 + 1 / b);
    const excess = 1 / ratio - 1;
    const delta = z / Math.acosh(Math.sqrt(product) / 2);
    const lambda = (p * Math.sqrt((product - 2) ** 2 - 4)) / excess;
    return {
      variant: 'bounded',
      delta,
      gamma: delta * Math.asinh(((1 / b - 1 / a) * Math.sqrt(product - 4)) / (2 * excess)),
      lambda,
      xi: middle - lambda / 2 + (p * (1 / b - 1 / a)) / (2 * excess),
    };
  }
  if (!(a > 1))
    return undetermined('no-fit', 'The lognormal Johnson curve fits only readings with a long right tail');
  const delta = (2 * z) / Math.log(a);
  return {
    variant: 'lognormal',
    delta,
    gamma: delta * Math.log((a - 1) / (p * Math.sqrt(a))),
    lambda: 1,
    xi: middle - (p / 2) * ((a + 1) / (a - 1)),
  };
}

/** Normal score of a reading, and the derivative's logarithm for the likelihood. */
function score(curve: Curve, x: number): { z: number; logSlope: number } {
  const { variant, gamma, delta, xi, lambda } = curve;
  const u = (x - xi) / lambda;
  if (variant === 'unbounded') {
    return { z: gamma + delta * Math.asinh(u), logSlope: Math.log(delta / lambda) - 0.5 * Math.log1p(u * u) };
  }
  if (variant === 'bounded') {
    return {
      z: gamma + delta * Math.log(u / (1 - u)),
      logSlope: Math.log(delta / lambda) - Math.log(u * (1 - u)),
    };
  }
  return { z: gamma + delta * Math.log(u), logSlope: Math.log(delta) - Math.log(u) };
}

function value(curve: Curve, z: number): number {
  const { variant, gamma, delta, xi, lambda } = curve;
  const u = (z - gamma) / delta;
  if (variant === 'unbounded') return xi + lambda * Math.sinh(u);
  return variant === 'bounded' ? xi + lambda / (1 + Math.exp(-u)) : xi + Math.exp(u);
}

/**
 * Johnson curve of a sample: quantiles by Hazen's definition at scores z from 0.25 in steps of 0.05 as far as the sample reaches, and of all
 * curves that hold every reading the one whose scores lie nearest to the standard normal (Anderson-Darling distance). Four parameters from
 * quantiles, not from likelihood: a description for the percentile method, needing about fifty readings to mean anything.
 * Undetermined: fewer than 20 readings, all alike, or no curve holds them all.
 */
export function fitJohnson(values: readonly number[]): FittedModel | Undetermined {
  const n = values.length;
  if (n < 20) return undetermined('too-few', 'A Johnson curve needs at least 20 readings');
  if (!values.every(Number.isFinite))
    return undetermined('not-finite', 'One of the readings is not a finite number');
  const sorted = Float64Array.from(values).sort();
  const furthest = normalUpperQuantile(0.5 / n) / 3;
  let best: { curve: Curve; distance: number } | undefined;
  for (let z = 0.25; z <= furthest; z += 0.05) {
    const at = (scoreAt: number): number => quantileOfSorted(sorted, normalUpperTail(-scoreAt), 5);
    const curve = johnsonFromQuantiles([at(-3 * z), at(-z), at(z), at(3 * z)], z);
    if ('undetermined' in curve || !holdsAll(curve, sorted)) continue;
    const scores = sorted.map((x) => score(curve, x).z);
    const distance = andersonDarlingStatistic(scores, logNormalCdf, logNormalUpperTail);
    if (!best || distance < best.distance) best = { curve, distance };
  }
  if (!best) return undetermined('no-fit', 'No Johnson curve holds all these readings');
  const { variant, ...parameters } = best.curve;
  let logLikelihood = -0.5 * n * Math.log(2 * Math.PI);
  for (const x of sorted) {
    const { z, logSlope } = score(best.curve, x);
    logLikelihood += logSlope - 0.5 * z * z;
  }
  return {
    family: 'johnson',
    variant,
    method: 'four quantiles (Slifker and Shapiro), nearest to normal',
    n,
    origin: 0,
    parameters,
    estimated: 4,
    logLikelihood,
  };
}

function holdsAll(curve: Curve, sorted: Float64Array): boolean {
  const smallest = sorted[0] ?? NaN;
  const largest = sorted[sorted.length - 1] ?? NaN;
  if (![curve.gamma, curve.delta, curve.xi, curve.lambda].every(Number.isFinite) || !(curve.delta > 0))
    return false;
  if (curve.variant === 'unbounded') return true;
  return smallest > curve.xi && (curve.variant === 'lognormal' || largest < curve.xi + curve.lambda);
}

export function johnsonDistribution(
  variant: Variant,
  parameters: Readonly<Record<string, number>>,
): Distribution {
  const { gamma = NaN, delta = NaN, xi = NaN, lambda = NaN } = parameters;
  const curve: Curve = { variant, gamma, delta, xi, lambda };
  const scoreOf = (x: number): number => {
    if (variant !== 'unbounded' && x <= xi) return -Infinity;
    return variant === 'bounded' && x >= xi + lambda ? Infinity : score(curve, x).z;
  };
  return {
    lowerTail: (x) => normalUpperTail(-scoreOf(x)),
    upperTail: (x) => normalUpperTail(scoreOf(x)),
    lowerQuantile: (p) => value(curve, -normalUpperQuantile(p)),
    upperQuantile: (p) => value(curve, normalUpperQuantile(p)),
  };
}
