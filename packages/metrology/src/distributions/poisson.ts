import { devianceTerm, regularizedGammaP, regularizedGammaQ, stirlingError } from './gamma.ts';

/** P(X = k) of a Poisson count with mean λ ≥ 0. */
export function poissonProbability(k: number, mean: number): number {
  if (k < 0) return 0;
  if (mean === 0) return k === 0 ? 1 : 0;
  if (k === 0) return Math.exp(-mean);
  return Math.exp(-stirlingError(k) - devianceTerm(k, mean)) / Math.sqrt(2 * Math.PI * k);
}

/** P(X ≤ k) = Q(k + 1, λ). */
export function poissonCdf(k: number, mean: number): number {
  const whole = Math.floor(k);
  return whole < 0 ? 0 : regularizedGammaQ(whole + 1, mean);
}

/** P(X > k) = P(k + 1, λ). */
export function poissonUpperTail(k: number, mean: number): number {
  const whole = Math.floor(k);
  return whole < 0 ? 1 : regularizedGammaP(whole + 1, mean);
}
