import { betaOddsQuantile, regularizedBetaPair } from './beta.ts';
import { devianceTerm, stirlingError } from './gamma.ts';
import { normalCdf, normalDensity, normalUpperQuantile, normalUpperTail } from './normal.ts';

const ONE_OVER_SQRT_TWO_PI = 0.3989422804014327;

/** Density of Student's t with df > 0 degrees of freedom (Infinity is the normal distribution). */
export function tDensity(t: number, df: number): number {
  if (df === Infinity) return normalDensity(t);
  const half = df / 2;
  const constant = stirlingError(half + 0.5) - stirlingError(half) - devianceTerm(half, half + 0.5);
  const growth = Math.abs(t) > 1e150 ? 2 * Math.log(Math.abs(t)) - Math.log(df) : Math.log1p((t * t) / df);
  return ONE_OVER_SQRT_TWO_PI * Math.exp(constant - (half + 0.5) * growth);
}

/** P(T > t) for Student's t with df > 0 degrees of freedom: half of I_x(df/2, ½) with x = df/(df + t²), t ≥ 0. */
export function tUpperTail(t: number, df: number): number {
  if (df === Infinity) return normalUpperTail(t);
  if (t < 0) return 1 - tUpperTail(-t, df);
  if (t > 1e150) return 0;
  const square = t * t;
  return 0.5 * regularizedBetaPair(df / (df + square), square / (df + square), df / 2, 0.5);
}

/** P(T ≤ t) for Student's t with df > 0 degrees of freedom. */
export function tCdf(t: number, df: number): number {
  return df === Infinity ? normalCdf(t) : tUpperTail(-t, df);
}

/** t with P(T > t) = q, 0 < q < 1. The odds of t²/df are those of a beta distribution with ½ and df/2. */
export function tUpperQuantile(q: number, df: number): number {
  if (df === Infinity) return normalUpperQuantile(q);
  if (q === 0.5) return 0;
  if (q > 0.5) return -tUpperQuantile(1 - q, df);
  const odds =
    q > 0.25
      ? betaOddsQuantile(2 * (0.5 - q), 0.5, df / 2, false)
      : betaOddsQuantile(2 * q, 0.5, df / 2, true);
  return Math.sqrt(df * odds);
}

/** t with P(T ≤ t) = p, 0 < p < 1. */
export function tQuantile(p: number, df: number): number {
  return p > 0.5 ? tUpperQuantile(1 - p, df) : -tUpperQuantile(p, df);
}
