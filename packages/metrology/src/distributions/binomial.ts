import { regularizedBetaPair } from './beta.ts';
import { devianceTerm, stirlingError } from './gamma.ts';

const TWO_PI = 6.283185307179586;

/** P(X = k) of X successes in n trials of probability p; q = 1 − p may be given to all its digits. */
export function binomialProbability(k: number, n: number, p: number, q = 1 - p): number {
  if (k < 0 || k > n) return 0;
  if (p === 0) return k === 0 ? 1 : 0;
  if (q === 0) return k === n ? 1 : 0;
  if (k === 0) return Math.exp(n * (p < 0.1 ? Math.log1p(-p) : Math.log(q)));
  if (k === n) return Math.exp(n * (q < 0.1 ? Math.log1p(-q) : Math.log(p)));
  const difference = p < q ? k - n * p : n * q - (n - k);
  const deviance = devianceTerm(k, n * p, difference) + devianceTerm(n - k, n * q, -difference);
  const exponent = stirlingError(n) - stirlingError(k) - stirlingError(n - k) - deviance;
  return Math.sqrt(n / (TWO_PI * k * (n - k))) * Math.exp(exponent);
}

/** P(X ≤ k) = I_(1−p)(n − k, k + 1). */
export function binomialCdf(k: number, n: number, p: number): number {
  const whole = Math.floor(k);
  if (whole < 0) return 0;
  return whole >= n ? 1 : regularizedBetaPair(1 - p, p, n - whole, whole + 1);
}

/** P(X > k) = I_p(k + 1, n − k). */
export function binomialUpperTail(k: number, n: number, p: number): number {
  const whole = Math.floor(k);
  if (whole < 0) return 1;
  return whole >= n ? 0 : regularizedBetaPair(p, 1 - p, whole + 1, n - whole);
}
