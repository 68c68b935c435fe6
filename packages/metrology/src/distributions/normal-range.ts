import { GAUSS_RULE } from './gauss-rule.ts';
import { normalDensity, normalUpperTail } from './normal.ts';

/** Φ(z) − Φ(z − x) for x ≥ 0 to all its digits: by quadrature of the density where the difference would cancel. */
function normalBetween(z: number, x: number): number {
  if (x < 1.5) {
    const half = x / 2;
    const middle = z - half;
    let sum = 0;
    for (const [node, weight] of GAUSS_RULE)
      sum += weight * (normalDensity(middle - half * node) + normalDensity(middle + half * node));
    return sum * half;
  }
  if (z < x / 2) return normalUpperTail(-z) - normalUpperTail(x - z);
  return normalUpperTail(z - x) - normalUpperTail(z);
}

/** Sum of g over a trapezoidal grid wide and fine enough for samples of n standard normal values. */
function overNormal(n: number, upTo: number, g: (z: number) => number): number {
  const step = Math.min(0.25, 0.8 / Math.sqrt(n));
  const reach = 9.5;
  const last = Math.ceil((Math.min(upTo, 60) + 2 * reach) / step);
  let sum = 0;
  for (let k = 0; k <= last; k += 1) {
    const z = k * step - reach;
    sum += g(z);
  }
  return sum * step;
}

/**
 * P(W ≤ x) for the range W of n ≥ 2 independent standard normal values:
 * n ∫ φ(z)[Φ(z) − Φ(z − x)]^(n−1) dz (H. O. Hartley, Biometrika 32 (1942) 334).
 */
export function normalRangeCdf(x: number, n: number): number {
  if (x <= 0) return 0;
  if (x > 80) return 1;
  return n * overNormal(n, 0, (z) => normalDensity(z) * normalBetween(z, x) ** (n - 1));
}

/** P(W > x): the difference of the powers is taken without cancelling, so that deep tails keep their digits. */
export function normalRangeUpperTail(x: number, n: number): number {
  if (x <= 0) return 1;
  if (x > 80) return 0;
  const m = n - 1;
  return (
    n *
    overNormal(n, x, (z) => {
      const below = normalUpperTail(-z);
      if (below === 0) return 0;
      const share = Math.min(1, normalUpperTail(x - z) / below);
      return normalDensity(z) * below ** m * -Math.expm1(m * Math.log1p(-share));
    })
  );
}
