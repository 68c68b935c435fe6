import { chiSquareQuantile, chiSquareUpperTail } from '../distributions/chi-square.ts';
import { findRoot } from '../distributions/find-root.ts';
import { nonCentralTQuantile } from '../distributions/non-central-t.ts';
import {
  normalDensity,
  normalQuantile,
  normalUpperQuantile,
  normalUpperTail,
} from '../distributions/normal.ts';

/** One-sided factor k1 = t(γ; n − 1, z(p)√n)/√n, non-central t. Exact. ISO 16269-6:2014; NIST e-Handbook 7.2.6.3. */
export function oneSidedFactor(n: number, coverage: number, confidence: number): number {
  const root = Math.sqrt(n);
  return nonCentralTQuantile(confidence, n - 1, normalQuantile(coverage) * root) / root;
}

/** Approximate two-sided factor of W. G. Howe, JASA 64 (1969) 610: z((1+p)/2)·√((1 + 1/n)(n − 1)/χ²(1 − γ; n − 1)). */
export function howeFactor(n: number, coverage: number, confidence: number): number {
  const z = normalUpperQuantile((1 - coverage) / 2);
  return z * Math.sqrt(((1 + 1 / n) * (n - 1)) / chiSquareQuantile(1 - confidence, n - 1));
}

/** Half width r of an interval about m that holds a share p of a standard normal distribution. */
function halfWidth(m: number, coverage: number): number {
  const outside = 1 - coverage;
  let r = m + normalUpperQuantile(outside);
  if (m < 0.5) r = normalUpperQuantile(outside / 2);
  for (let step = 0; step < 50; step += 1) {
    const excess = normalUpperTail(r - m) + normalUpperTail(r + m) - outside;
    const change = excess / (normalDensity(r - m) + normalDensity(r + m));
    r += change;
    if (Math.abs(change) < 1e-14 * r) break;
  }
  return r;
}

/**
 * Exact two-sided factor k: the mean of P(χ²(n−1) > (n − 1)r(m)²/k²) over the sample mean m ~ N(0, 1/n) equals γ, where
 * r(m) is the half width holding the share p about m. ISO 16269-6:2014 annex; D. B. Owen, 1964. The integrand is even and
 * entire in m, so the trapezoidal rule gives all digits.
 */
export function exactTwoSidedFactor(n: number, coverage: number, confidence: number): number {
  const step = 0.125;
  const nodes: { weight: number; square: number }[] = [];
  for (let k = 0; k * step < 9; k += 1) {
    const weight = normalDensity(k * step) * step * (k === 0 ? 1 : 2);
    nodes.push({ weight, square: halfWidth((k * step) / Math.sqrt(n), coverage) ** 2 });
  }
  const df = n - 1;
  const gap = (logK: number) => {
    const perK = df * Math.exp(-2 * logK);
    let shortfall = 0;
    for (const { weight, square } of nodes) shortfall += weight * chiSquareUpperTail(perK * square, df);
    return Math.log(shortfall) - Math.log(confidence);
  };
  return Math.exp(findRoot(gap, Math.log(howeFactor(n, coverage, confidence)), 0.02));
}
