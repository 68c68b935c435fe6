import { erfcx } from './erfcx.ts';

const SQRT_HALF = Math.SQRT1_2;
const ONE_OVER_SQRT_TWO_PI = 0.3989422804014327;
const HALF_LOG_TWO_PI = 0.9189385332046728;
const SQRT_HALF_PI = 1.2533141373155003;

/** exp(−z²/2) without the loss of the rounded square in deep tails: z is split at a multiple of 1/16. */
function gaussian(z: number): number {
  const head = Math.trunc(z * 16) / 16;
  return Math.exp(-0.5 * head * head) * Math.exp(-0.5 * (z - head) * (z + head));
}

/** Density φ(z) of the standard normal distribution; z any number. */
export function normalDensity(z: number): number {
  return Math.abs(z) > 1e8 ? 0 : ONE_OVER_SQRT_TWO_PI * gaussian(z);
}

/** Upper tail Q(z) = P(Z > z) of the standard normal distribution, relative error below 1e-14 while above 1e-308. */
export function normalUpperTail(z: number): number {
  if (z < 0) return 1 - normalUpperTail(-z);
  return z > 40 ? 0 : 0.5 * gaussian(z) * erfcx(z * SQRT_HALF);
}

/** Distribution function Φ(z) = P(Z ≤ z) = Q(−z). */
export function normalCdf(z: number): number {
  return normalUpperTail(-z);
}

/** ln Q(z), finite where Q itself would be 0 (z > 38). */
export function logNormalUpperTail(z: number): number {
  if (z < -1) return Math.log1p(-normalUpperTail(-z));
  if (z < 5) return Math.log(normalUpperTail(z));
  return -0.5 * z * z + Math.log(0.5 * erfcx(z * SQRT_HALF));
}

/** ln Φ(z) = ln Q(−z). */
export function logNormalCdf(z: number): number {
  return logNormalUpperTail(-z);
}

/** ln φ(z). */
export function logNormalDensity(z: number): number {
  return -0.5 * z * z - HALF_LOG_TWO_PI;
}

/** Φ(z) − ½ for small z ≥ 0 to all its digits: φ(z)(z + z³/3 + z⁵/15 + …), DLMF 7.6.2. */
function normalFromCentre(z: number): number {
  let term = z;
  let sum = z;
  for (let k = 3; term > sum * 1e-17; k += 2) {
    term *= (z * z) / k;
    sum += term;
  }
  return normalDensity(z) * sum;
}

/**
 * z with upper tail Q(z) = q, 0 < q < 1.
 *
 * Start: Abramowitz and Stegun 26.2.23 (error below 4.5e-4); then Halley steps. In the tail Q(z) − q is divided by φ(z)
 * as the Mills ratio minus q/φ(z), near the centre Φ(z) − ½ is used, so that both keep their digits.
 */
export function normalUpperQuantile(q: number): number {
  if (q === 0.5) return 0;
  if (q > 0.5) return -normalUpperQuantile(1 - q);
  const central = q > 0.3;
  const t = Math.sqrt(-2 * Math.log(q));
  let z =
    t - (2.515517 + t * (0.802853 + t * 0.010328)) / (1 + t * (1.432788 + t * (0.189269 + t * 0.001308)));
  if (central) z = Math.max(z, 0.5 - q);
  for (let step = 0; step < 3; step += 1) {
    const density = ONE_OVER_SQRT_TWO_PI * gaussian(z);
    const ratio = central
      ? (0.5 - q - normalFromCentre(z)) / density
      : SQRT_HALF_PI * erfcx(z * SQRT_HALF) - q / density;
    z += ratio / (1 + 0.5 * z * ratio);
  }
  return z;
}

/** z with Φ(z) = p, 0 < p < 1. */
export function normalQuantile(p: number): number {
  return p > 0.5 ? normalUpperQuantile(1 - p) : -normalUpperQuantile(p);
}
