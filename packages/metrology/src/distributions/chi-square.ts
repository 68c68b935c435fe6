import {
  gammaDensity,
  gammaQuantile,
  gammaUpperQuantile,
  regularizedGammaP,
  regularizedGammaQ,
} from './gamma.ts';

/** Density of χ² with df > 0 degrees of freedom at x. */
export function chiSquareDensity(x: number, df: number): number {
  return 0.5 * gammaDensity(x / 2, df / 2);
}

/** P(χ² ≤ x) = P(df/2, x/2). */
export function chiSquareCdf(x: number, df: number): number {
  return regularizedGammaP(df / 2, x / 2);
}

/** P(χ² > x) = Q(df/2, x/2). */
export function chiSquareUpperTail(x: number, df: number): number {
  return regularizedGammaQ(df / 2, x / 2);
}

/** x with P(χ² ≤ x) = p, 0 < p < 1. */
export function chiSquareQuantile(p: number, df: number): number {
  return 2 * gammaQuantile(p, df / 2);
}

/** x with P(χ² > x) = q, 0 < q < 1. */
export function chiSquareUpperQuantile(q: number, df: number): number {
  return 2 * gammaUpperQuantile(q, df / 2);
}
