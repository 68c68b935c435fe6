import { normalDensity, normalUpperTail } from './normal.ts';

/** Nodes and weights of the 16-point Gauss-Legendre rule on (0, 1), half of them: the rule is symmetric. */
const GAUSS: readonly (readonly [number, number])[] = [
  [0.09501250983763744, 0.1894506104550685],
  [0.2816035507792589, 0.1826034150449236],
  [0.45801677765722737, 0.16915651939500254],
  [0.6178762444026438, 0.14959598881657674],
  [0.755404408355003, 0.12462897125553388],
  [0.8656312023878318, 0.09515851168249279],
  [0.9445750230732326, 0.062253523938647894],
  [0.9894009349916499, 0.02715245941175409],
];

/** Φ(z) − Φ(z − x) for x ≥ 0 to all its digits: by quadrature of the density where the difference would cancel. */
function normalBetween(z: number, x: number): number {
  if (x < 1.5) {
    const half = x / 2;
    const middle = z - half;
    let sum = 0;
    for (const [node, weight] of GAUSS)
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
