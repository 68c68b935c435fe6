import { logBeta } from '../distributions/beta.ts';
import { logGamma } from '../distributions/gamma.ts';
import { normalDensity, normalUpperTail } from '../distributions/normal.ts';
import { integrate } from '../distributions/gauss-rule.ts';

const kept = new Map<number, number>();

/** Odd n = 2k + 1: variance of the middle value, whose density is φ·Φ^k·Q^k / B(k + 1, k + 1). */
function oddVariance(k: number): number {
  const constant = Math.exp(-logBeta(k + 1, k + 1));
  let variance = 0;
  integrate(-9, 9, 18, (x, weight) => {
    variance +=
      weight * x * x * constant * normalDensity(x) * (normalUpperTail(-x) * normalUpperTail(x)) ** k;
  });
  return variance;
}

/** Even n = 2k: variance of the mean of the two middle values u < v, joint density n!/((k−1)!)² φ(u)φ(v)[Φ(u)Q(v)]^(k−1). */
function evenVariance(k: number): number {
  const constant = Math.exp(logGamma(2 * k + 1) - 2 * logGamma(k));
  let variance = 0;
  integrate(-9, 9, 18, (middle, weight) => {
    integrate(0, 9, 9, (half, inner) => {
      const [u, v] = [middle - half, middle + half];
      const density =
        normalDensity(u) * normalDensity(v) * (normalUpperTail(-u) * normalUpperTail(v)) ** (k - 1);
      variance += 2 * weight * inner * middle * middle * constant * density;
    });
  });
  return variance;
}

/** Deviation of the median of n ≥ 2 independent standard normal readings; for even n the mean of the two middle ones. */
export function medianDeviation(n: number): number {
  const known = kept.get(n);
  if (known !== undefined) return known;
  const value = Math.sqrt(n % 2 === 1 ? oddVariance((n - 1) / 2) : evenVariance(n / 2));
  kept.set(n, value);
  return value;
}
