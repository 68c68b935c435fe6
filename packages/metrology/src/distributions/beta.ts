import { devianceTerm, logGamma, stirlingError } from './gamma.ts';
import { solveIncreasing } from './solve.ts';

const TWO_PI = 6.283185307179586;

/** ln B(a, b) = ln Γ(a) + ln Γ(b) − ln Γ(a + b); a, b > 0. */
export function logBeta(a: number, b: number): number {
  if (Math.min(a, b) < 15) return logGamma(a) + logGamma(b) - logGamma(a + b);
  const n = a + b;
  return (
    0.5 * Math.log((TWO_PI * n) / (a * b)) +
    a * Math.log(a / n) +
    b * Math.log(b / n) +
    stirlingError(a) +
    stirlingError(b) -
    stirlingError(n)
  );
}

/** x^a y^b / B(a, b) with y = 1 − x given by the caller to all its digits. */
export function betaPrefix(a: number, b: number, x: number, y: number): number {
  const n = a + b;
  // The smaller of x and y carries the digits: the other deviation is its opposite, because a + b = n(x + y).
  const difference = x < y ? a - n * x : n * y - b;
  const deviance = devianceTerm(a, n * x, difference) + devianceTerm(b, n * y, -difference);
  const exponent = stirlingError(n) - stirlingError(a) - stirlingError(b) - deviance;
  return Math.sqrt((a / n) * (b / TWO_PI)) * Math.exp(exponent);
}

/**
 * Continued fraction of A. R. Didonato and A. H. Morris, ACM Transactions on Mathematical Software 18 (1992) 360-373,
 * by the modified Lentz method. It holds a·y − b·x, which DLMF 8.17.22 has only as a difference of nearly equal numbers
 * when a is large and x near 1 (t with many degrees of freedom).
 */
function betaFraction(a: number, b: number, x: number, y: number): number {
  const tiny = 1e-300;
  const lambda = a * y - b * x;
  let h = (a * (lambda + 1)) / (a + 1);
  if (h === 0) h = tiny;
  let c = h;
  let d = 0;
  for (let m = 1; m < 1_000_000; m += 1) {
    const odd = a + 2 * m - 1;
    const numerator = (((a + m - 1) * x) / odd) * ((a + b + m - 1) / odd) * m * (b - m) * x;
    const denominator = m + (m * (b - m) * x) / odd + ((a + m) * (lambda + 1 + m * (1 + y))) / (odd + 2);
    d = denominator + numerator * d;
    d = 1 / (d === 0 ? tiny : d);
    c = denominator + numerator / c;
    if (c === 0) c = tiny;
    const factor = c * d;
    h *= factor;
    if (Math.abs(factor - 1) < 1e-16) break;
  }
  return h;
}

function lowerBeta(x: number, y: number, a: number, b: number): number {
  const prefix = betaPrefix(a, b, x, y);
  return prefix === 0 ? 0 : prefix / betaFraction(a, b, x, y);
}

/**
 * Regularised incomplete beta function I_x(a, b) with x and y = 1 − x both given, so that neither end loses digits.
 * a, b > 0; 0 ≤ x ≤ 1.
 */
export function regularizedBetaPair(x: number, y: number, a: number, b: number): number {
  if (x <= 0) return 0;
  if (y <= 0) return 1;
  if (x * (a + b + 2) < a + 1) return lowerBeta(x, y, a, b);
  return 1 - lowerBeta(y, x, b, a);
}

/** Regularised incomplete beta function I_x(a, b) = P(B ≤ x) for B of the beta distribution. DLMF 8.17.2. */
export function regularizedBeta(x: number, a: number, b: number): number {
  return regularizedBetaPair(x, 1 - x, a, b);
}

/** Density of the beta distribution at 0 < x < 1. */
export function betaDensity(x: number, a: number, b: number): number {
  return x <= 0 || x >= 1 ? 0 : betaPrefix(a, b, x, 1 - x) / (x * (1 - x));
}

/**
 * Quantile of the beta distribution as a pair (x, 1 − x), solved in the odds x/(1 − x), which have no upper end.
 */
function betaOdds(p: number, a: number, b: number): number {
  const at = (odds: number) => regularizedBetaPair(odds / (1 + odds), 1 / (1 + odds), a, b);
  const slope = (odds: number) => betaPrefix(a, b, odds / (1 + odds), 1 / (1 + odds)) / odds;
  return solveIncreasing(at, slope, p, a / b);
}

/** x with I_x(a, b) = p, 0 < p < 1. */
export function betaQuantile(p: number, a: number, b: number): number {
  if (p > 0.5) {
    const odds = betaOdds(1 - p, b, a);
    return 1 / (1 + odds);
  }
  const odds = betaOdds(p, a, b);
  return odds / (1 + odds);
}

/** Odds x/(1 − x) at which the lower tail (p) or, for `upper`, the upper tail of the beta distribution is p. */
export function betaOddsQuantile(p: number, a: number, b: number, upper: boolean): number {
  if (p > 0.5) return betaOddsQuantile(1 - p, a, b, !upper);
  return upper ? 1 / betaOdds(p, b, a) : betaOdds(p, a, b);
}
