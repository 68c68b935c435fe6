import { chiSquareQuantile, chiSquareUpperQuantile } from '../distributions/chi-square.ts';
import { fUpperQuantile } from '../distributions/f.ts';

/** One mean square of a linear combination: its weight (any sign), its value and its degrees of freedom. */
export interface WeightedSquare {
  readonly weight: number;
  readonly meanSquare: number;
  readonly degreesOfFreedom: number;
}

export interface Interval {
  readonly lower: number;
  readonly upper: number;
}

/**
 * Modified large-sample interval for a linear combination of expected mean squares, gamma = sum c_q theta_q with weights of either sign:
 * Graybill and Wang (J. Am. Stat. Assoc. 75, 1980) where all weights are positive; Ting, Burdick, Graybill, Jeyaratnam and Lu
 * (J. Stat. Comput. Simul. 35, 1990) where some are negative, as in Burdick, Borror and Montgomery, J. Qual. Technol. 35 (2003).
 * Exact for a single mean square. Formulas from memory, their coverage checked by simulation (testing/fixtures/gauge-intervals.py).
 *
 * Bounds below 0 are set to 0, as a variance has no negative values. Terms of weight 0 are left out.
 * @param alpha error of each side, 0 < alpha < 0.5 (0.025 for a two-sided 95 % interval)
 * @param quantiles of the same alpha, to share between the intervals of one study
 */
export function largeSampleInterval(
  terms: readonly WeightedSquare[],
  alpha: number,
  quantiles: IntervalQuantiles = intervalQuantiles(alpha),
): Interval {
  const plus = terms.filter((term) => term.weight > 0);
  const minus = terms.filter((term) => term.weight < 0).map((term) => ({ ...term, weight: -term.weight }));
  const estimate = combine(plus) - combine(minus);
  const below = variance(plus, minus, quantiles, 'lower');
  const above = variance(plus, minus, quantiles, 'upper');
  return {
    lower: Math.max(0, estimate - Math.sqrt(Math.max(0, below))),
    upper: Math.max(0, estimate + Math.sqrt(Math.max(0, above))),
  };
}

/** The quantiles that intervals of one alpha need; each is computed once. */
export interface IntervalQuantiles {
  /** G = 1 - 1/F(alpha; n, infinity), with the upper alpha point: how far a mean square may lie above its expectation. */
  readonly above: (degrees: number) => number;
  /** H = 1/F(1 - alpha; n, infinity) - 1: how far it may lie below. */
  readonly below: (degrees: number) => number;
  /** point of F for the ratio of two mean squares: the upper alpha point for a lower bound, the upper 1 - alpha point for an upper one */
  readonly ratio: (bound: 'lower' | 'upper', numerator: number, denominator: number) => number;
}

export function intervalQuantiles(alpha: number): IntervalQuantiles {
  const known = new Map<string, number>();
  const once = (key: string, compute: () => number): number => {
    const value = known.get(key) ?? compute();
    known.set(key, value);
    return value;
  };
  return {
    above: (n) => once(`above ${n}`, () => 1 - n / chiSquareUpperQuantile(alpha, n)),
    below: (n) => once(`below ${n}`, () => n / chiSquareQuantile(alpha, n) - 1),
    ratio: (bound, n, m) =>
      once(`${bound} ${n} ${m}`, () => fUpperQuantile(bound === 'lower' ? alpha : 1 - alpha, n, m)),
  };
}

function combine(terms: readonly WeightedSquare[]): number {
  return terms.reduce((sum, term) => sum + term.weight * term.meanSquare, 0);
}

/**
 * The squared half-width. For the lower bound positive terms enter with G and negative ones with H, for the upper bound the reverse.
 */
function variance(
  plus: readonly WeightedSquare[],
  minus: readonly WeightedSquare[],
  { above, below, ratio }: IntervalQuantiles,
  bound: 'lower' | 'upper',
): number {
  const [ofPlus, ofMinus] = bound === 'lower' ? [above, below] : [below, above];
  let sum = 0;
  for (const term of plus) sum += (ofPlus(term.degreesOfFreedom) * term.weight * term.meanSquare) ** 2;
  for (const term of minus) sum += (ofMinus(term.degreesOfFreedom) * term.weight * term.meanSquare) ** 2;
  for (const positive of plus) {
    for (const negative of minus) {
      const f = ratio(bound, positive.degreesOfFreedom, negative.degreesOfFreedom);
      const g = ofPlus(positive.degreesOfFreedom);
      const h = ofMinus(negative.degreesOfFreedom);
      const cross = ((f - 1) ** 2 - (g * f) ** 2 - h ** 2) / f;
      sum += cross * positive.weight * negative.weight * positive.meanSquare * negative.meanSquare;
    }
  }
  return minus.length > 0 ? sum + amongThoseAbove(bound === 'lower' ? plus : minus, above) : sum;
}

/** The cross terms G* between terms whose departure is G; they vanish when there is only one such term. */
function amongThoseAbove(terms: readonly WeightedSquare[], above: IntervalQuantiles['above']): number {
  let sum = 0;
  for (const [place, first] of terms.entries()) {
    for (const second of terms.slice(place + 1)) {
      const a = first.degreesOfFreedom;
      const b = second.degreesOfFreedom;
      const joint = above(a + b) ** 2 * ((a + b) ** 2 / (a * b));
      const own = above(a) ** 2 * (a / b) + above(b) ** 2 * (b / a);
      const star = (joint - own) / (terms.length - 1);
      sum += star * first.weight * second.weight * first.meanSquare * second.meanSquare;
    }
  }
  return sum;
}
