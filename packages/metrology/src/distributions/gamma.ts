import { solveDecreasing, solveIncreasing } from './solve.ts';

const HALF_LOG_TWO_PI = 0.9189385332046728;
const TWO_PI = 6.283185307179586;

/** Terms of ln Γ(2 + z) = Σ c_k z^(k+1): 1 − γ, then (−1)^k (ζ(k) − 1)/k, with mpmath. */
const AROUND_TWO = [
  0.42278433509846713, 0.3224670334241132, -0.0673523010531981, 0.020580808427784546, -0.007385551028673986,
  0.0028905103307415234, -0.001192753911703261, 0.0005096695247430425, -0.00022315475845357939,
  0.00009945751278180853, -0.00004492623673813314, 0.00002050721277567069, -0.000009439488275268397,
  0.000004374866789907488, -0.000002039215753801366, 9.55141213040742e-7, -4.492469198764566e-7,
  2.1207184805554665e-7, -1.0043224823968099e-7, 4.7698101693639804e-8, -2.2711094608943164e-8,
  1.0838659214896955e-8, -5.183475041970047e-9, 2.4836745438024785e-9, -1.1921401405860912e-9,
  5.731367241678862e-10, -2.7595228851242334e-10, 1.330476437424449e-10, -6.4229645638381e-11,
  3.1044247747322276e-11, -1.5021384080754142e-11,
];

/** Bernoulli terms B(2k)/(2k(2k−1)) of the Stirling series. */
const STIRLING = [1 / 12, -1 / 360, 1 / 1260, -1 / 1680, 1 / 1188, -691 / 360360, 1 / 156];

function logGammaAroundTwo(z: number): number {
  let sum = 0;
  for (let k = AROUND_TWO.length - 1; k >= 0; k -= 1) sum = sum * z + (AROUND_TWO[k] as number);
  return sum * z;
}

function stirlingSeries(a: number): number {
  const inverseSquare = 1 / (a * a);
  let sum = 0;
  for (let k = STIRLING.length - 1; k >= 0; k -= 1) sum = sum * inverseSquare + (STIRLING[k] as number);
  return sum / a;
}

/** ln Γ(x) for x > 0. Relative error below 1e-14, near the zeros at 1 and 2 as well. */
export function logGamma(x: number): number {
  if (x >= 15) return (x - 0.5) * Math.log(x) - x + HALF_LOG_TWO_PI + stirlingSeries(x);
  if (x < 0.5) return logGamma(x + 1) - Math.log(x);
  if (x < 1.5) return logGammaAroundTwo(x - 1) - Math.log1p(x - 1);
  let product = 1;
  let y = x;
  while (y > 2.5) {
    y -= 1;
    product *= y;
  }
  return Math.log(product) + logGammaAroundTwo(y - 2);
}

/** Γ(x) for x > 0; larger than the largest double above 171.62. */
export function gammaFunction(x: number): number {
  return x > 171.7 ? Infinity : Math.exp(logGamma(x));
}

/** Error of Stirling's formula: ln Γ(a) − [(a − ½) ln a − a + ½ ln 2π], a > 0. */
export function stirlingError(a: number): number {
  if (a >= 15) return stirlingSeries(a);
  return logGamma(a) - ((a - 0.5) * Math.log(a) - a + HALF_LOG_TWO_PI);
}

/**
 * Deviance term a·ln(a/m) + m − a, a ≥ 0, m > 0, without cancellation near a = m.
 * With it the probabilities below keep their digits at large parameters (C. Loader, Fast and accurate computation
 * of binomial probabilities, 2000). `difference` is a − m where the caller knows it better than the subtraction.
 */
export function devianceTerm(a: number, m: number, difference = a - m): number {
  if (a === 0) return m;
  if (Math.abs(difference) >= 0.1 * (a + m)) return a * Math.log(a / m) - difference;
  const v = difference / (a + m);
  const square = v * v;
  let power = 2 * a * v;
  let sum = difference * v;
  for (let k = 3; k < 400; k += 2) {
    power *= square;
    const next = sum + power / k;
    if (next === sum) break;
    sum = next;
  }
  return sum;
}

/** x^a e^(−x) / Γ(a): the factor before the series and the continued fraction. */
export function gammaPrefix(a: number, x: number): number {
  return Math.sqrt(a / TWO_PI) * Math.exp(-stirlingError(a) - devianceTerm(a, x));
}

function lowerSeries(a: number, x: number): number {
  const prefix = gammaPrefix(a, x);
  if (prefix === 0) return 0;
  let term = 1 / a;
  let sum = term;
  for (let k = 1; k < 1_000_000; k += 1) {
    term *= x / (a + k);
    sum += term;
    if (term < sum * 1e-17) break;
  }
  return sum * prefix;
}

function upperFraction(a: number, x: number): number {
  const prefix = gammaPrefix(a, x);
  if (prefix === 0) return 0;
  const tiny = 1e-300;
  let b = x + 1 - a;
  let c = 1 / tiny;
  let d = 1 / (b === 0 ? tiny : b);
  let h = d;
  for (let k = 1; k < 1_000_000; k += 1) {
    const numerator = -k * (k - a);
    b += 2;
    d = numerator * d + b;
    d = 1 / (d === 0 ? tiny : d);
    c = b + numerator / c;
    if (c === 0) c = tiny;
    const factor = c * d;
    h *= factor;
    if (Math.abs(factor - 1) < 1e-16) break;
  }
  return h * prefix;
}

const usesSeries = (a: number, x: number): boolean => (a < 1 ? x < 0.7 : x < a + 1);

/** Regularised lower incomplete gamma function P(a, x) = γ(a, x)/Γ(a); a > 0, x ≥ 0. DLMF 8.2.4, 8.11.4, 8.9.2. */
export function regularizedGammaP(a: number, x: number): number {
  if (x <= 0) return 0;
  if (x === Infinity) return 1;
  return usesSeries(a, x) ? lowerSeries(a, x) : 1 - upperFraction(a, x);
}

/** Regularised upper incomplete gamma function Q(a, x) = 1 − P(a, x), each tail by its own formula. */
export function regularizedGammaQ(a: number, x: number): number {
  if (x <= 0) return 1;
  if (x === Infinity) return 0;
  return usesSeries(a, x) ? 1 - lowerSeries(a, x) : upperFraction(a, x);
}

/** Density of the gamma distribution of shape a > 0 and scale 1 at x > 0. */
export function gammaDensity(x: number, a: number): number {
  return x <= 0 || x === Infinity ? 0 : gammaPrefix(a, x) / x;
}

/** x with P(a, x) = p, 0 < p < 1: Newton on ln P against ln x, bracketed. */
export function gammaQuantile(p: number, a: number): number {
  if (p > 0.5) return gammaUpperQuantile(1 - p, a);
  return solveIncreasing(
    (x) => regularizedGammaP(a, x),
    (x) => gammaDensity(x, a),
    p,
    a,
  );
}

/** x with Q(a, x) = q, 0 < q < 1. */
export function gammaUpperQuantile(q: number, a: number): number {
  if (q > 0.5) return gammaQuantile(1 - q, a);
  return solveDecreasing(
    (x) => regularizedGammaQ(a, x),
    (x) => gammaDensity(x, a),
    q,
    a,
  );
}
