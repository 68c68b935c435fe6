import { stirlingError } from './gamma.ts';

/**
 * Integral over u of g(e^u) against the density of u = ln √(χ²_df/df): the spread of an estimated deviation.
 *
 * Both the non-central t and the studentised range are such a mixture. The integrand is entire in u and falls off on
 * both sides, so the trapezoidal rule converges exponentially; its step follows the width at the peak. g must be
 * positive, which keeps every digit in the deep tails. `logScale` is ln g where g itself would underflow.
 */
export function mixOverChi(df: number, logG: (w: number) => number): number {
  const a = df / 2;
  const logConstant = Math.log(2 * Math.sqrt(a / (2 * Math.PI))) - stirlingError(a);
  const logIntegrand = (u: number) => logConstant - a * (Math.expm1(2 * u) - 2 * u) + logG(Math.exp(u));
  const peak = findPeak(logIntegrand, 1 / Math.sqrt(2 * df));
  const top = logIntegrand(peak);
  if (!(top > -745)) return 0;
  const h0 = Math.min(0.05, 0.1 / Math.sqrt(df));
  const curvature = (2 * top - logIntegrand(peak - h0) - logIntegrand(peak + h0)) / (h0 * h0);
  const step = Math.min(0.1, 0.35 / Math.sqrt(Math.max(curvature, 1e-6)));
  let sum = Math.exp(top);
  for (const direction of [step, -step]) {
    for (let k = 1; k < 20_000; k += 1) {
      const value = logIntegrand(peak + k * direction);
      if (value < top - 42) break;
      sum += Math.exp(value);
    }
  }
  return sum * step;
}

/** Highest point of a log-concave function by expanding steps and golden sections; a rough place is enough. */
function findPeak(f: (u: number) => number, width: number): number {
  let step = width;
  let best = 0;
  let value = f(0);
  for (let round = 0; round < 200 && step > width / 8; round += 1) {
    const right = f(best + step);
    const left = f(best - step);
    if (right > value || (value === -Infinity && right > left)) {
      best += step;
      value = right;
      step *= 2;
    } else if (left > value || (value === -Infinity && left > right)) {
      best -= step;
      value = left;
      step *= 2;
    } else step /= 2;
  }
  return best;
}
