import { stirlingError } from '../distributions/gamma.ts';
import { normalRangeUpperTail } from '../distributions/normal-range.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { integrate } from '../distributions/gauss-rule.ts';
import { medianDeviation } from './median-deviation.ts';

/** Constants of the range of n normal readings; each is computed once and kept. */
const rangeMoments = new Map<number, { readonly mean: number; readonly deviation: number }>();

/** E(W) = ∫P(W > x)dx and E(W²) = 2∫x·P(W > x)dx by Gauss's rule on panels of width 1. */
function momentsOfRange(n: number): { readonly mean: number; readonly deviation: number } {
  const kept = rangeMoments.get(n);
  if (kept !== undefined) return kept;
  let mean = 0;
  let square = 0;
  integrate(0, 18, 18, (x, weight) => {
    const tail = normalRangeUpperTail(x, n);
    mean += weight * tail;
    square += 2 * weight * x * tail;
  });
  const moments = { mean, deviation: Math.sqrt(square - mean * mean) };
  rangeMoments.set(n, moments);
  return moments;
}

/** d2(n) = E(W)/σ, the mean range of n ≥ 2 independent normal readings. ISO 7870-2:2013; ASTM E2587. */
export function d2(n: number): number {
  return momentsOfRange(n).mean;
}

/** d3(n) = deviation of the range W of n ≥ 2 normal readings, in σ. */
export function d3(n: number): number {
  return momentsOfRange(n).deviation;
}

/** c4(n) = E(s)/σ = √(2/(n − 1))·Γ(n/2)/Γ((n − 1)/2), n ≥ 2, s with divisor n − 1; real n allowed. */
export function c4(n: number): number {
  const a = (n - 1) / 2;
  // Γ(a + ½)/Γ(a) by Stirling errors, so that large n keeps its digits.
  return Math.exp(a * Math.log1p(0.5 / a) - 0.5 + stirlingError(a + 0.5) - stirlingError(a));
}

/** The constants of control charts with limits at three sigma, for subgroups of n. */
export interface ChartConstants {
  readonly n: number;
  readonly d2: number;
  readonly d3: number;
  readonly c4: number;
  /** Means: ± A·σ, ± A2·R̄, ± A3·s̄. */
  readonly A: number;
  readonly A2: number;
  readonly A3: number;
  /** Medians: ± A6·R̄, 3·(deviation of the median)/d2. */
  readonly A6: number;
  /** s: B3·s̄, B4·s̄; B5·σ, B6·σ. */
  readonly B3: number;
  readonly B4: number;
  readonly B5: number;
  readonly B6: number;
  /** R: D1·σ, D2·σ; D3·R̄, D4·R̄. */
  readonly D1: number;
  readonly D2: number;
  readonly D3: number;
  readonly D4: number;
  /** Individuals: ± E2·R̄, ± E3·s̄. */
  readonly E2: number;
  readonly E3: number;
}

const notBelowZero = (value: number) => Math.max(0, value);

/**
 * Constants for subgroups of n, computed from their definitions to at least 10 significant digits and not typed from a
 * table: d2 and d3 are the mean and deviation of the range of n standard normal values, c4 that of s.
 * A = 3/√n, A2 = 3/(d2√n), A3 = 3/(c4√n), B3, B4 = 1 ∓ 3√(1 − c4²)/c4, B5, B6 = c4 ∓ 3√(1 − c4²), D1, D2 = d2 ∓ 3d3,
 * D3, D4 = 1 ∓ 3d3/d2, E2 = 3/d2, E3 = 3/c4; a lower factor below 0 is 0.
 * @param n subgroup size, a whole number from 2 to 25: beyond, a chart of ranges wastes too much of the readings
 */
export function chartConstants(n: number): ChartConstants | Undetermined {
  if (!Number.isInteger(n) || n < 2 || n > 25)
    return undetermined('outside-table', 'Chart constants are defined for subgroups of 2 to 25 readings');
  const [mean, deviation, unbiasing, root] = [d2(n), d3(n), c4(n), Math.sqrt(n)];
  const spread = Math.sqrt(1 - unbiasing * unbiasing);
  return {
    n,
    d2: mean,
    d3: deviation,
    c4: unbiasing,
    A: 3 / root,
    A2: 3 / (mean * root),
    A3: 3 / (unbiasing * root),
    A6: (3 * medianDeviation(n)) / mean,
    B3: notBelowZero(1 - (3 * spread) / unbiasing),
    B4: 1 + (3 * spread) / unbiasing,
    B5: notBelowZero(unbiasing - 3 * spread),
    B6: unbiasing + 3 * spread,
    D1: notBelowZero(mean - 3 * deviation),
    D2: mean + 3 * deviation,
    D3: notBelowZero(1 - (3 * deviation) / mean),
    D4: 1 + (3 * deviation) / mean,
    E2: 3 / mean,
    E3: 3 / unbiasing,
  };
}
