import { binomialProbability } from './binomial.ts';

/**
 * P(X = k) marked pieces in a sample of n without replacement from a lot of N of which M are marked.
 * Written as a ratio of binomial probabilities with p = n/N, which keeps the digits at large lots.
 */
export function hypergeometricProbability(k: number, lot: number, marked: number, sample: number): number {
  if (k < Math.max(0, sample - (lot - marked)) || k > Math.min(sample, marked)) return 0;
  const p = sample / lot;
  const q = (lot - sample) / lot;
  return (
    (binomialProbability(k, marked, p, q) * binomialProbability(sample - k, lot - marked, p, q)) /
    binomialProbability(sample, lot, p, q)
  );
}

/** Sum of the probabilities from k towards one end; terms by their ratio, so one probability is computed. */
function sumFrom(k: number, lot: number, marked: number, sample: number, step: 1 | -1): number {
  let term = hypergeometricProbability(k, lot, marked, sample);
  let sum = term;
  for (let j = k; term > sum * 1e-18; j += step) {
    const rise = step > 0 ? j : j - 1;
    const factor = ((marked - rise) * (sample - rise)) / ((rise + 1) * (lot - marked - sample + rise + 1));
    term = step > 0 ? term * factor : term / factor;
    if (!(term > 0 && Number.isFinite(term))) break;
    sum += term;
  }
  return sum;
}

/** P(X ≤ k); below the mean by summing the lower tail, above it as 1 minus the upper tail. */
export function hypergeometricCdf(k: number, lot: number, marked: number, sample: number): number {
  const whole = Math.floor(k);
  if (whole < Math.max(0, sample - (lot - marked))) return 0;
  if (whole >= Math.min(sample, marked)) return 1;
  if (whole > (sample * marked) / lot) return 1 - sumFrom(whole + 1, lot, marked, sample, 1);
  return sumFrom(whole, lot, marked, sample, -1);
}

/** P(X > k). */
export function hypergeometricUpperTail(k: number, lot: number, marked: number, sample: number): number {
  const whole = Math.floor(k);
  if (whole < Math.max(0, sample - (lot - marked))) return 1;
  if (whole >= Math.min(sample, marked)) return 0;
  if (whole > (sample * marked) / lot) return sumFrom(whole + 1, lot, marked, sample, 1);
  return 1 - sumFrom(whole, lot, marked, sample, -1);
}
