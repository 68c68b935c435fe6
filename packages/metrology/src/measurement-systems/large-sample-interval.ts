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
 */
export function largeSampleInterval(terms: readonly WeightedSquare[], alpha: number): Interval {
  const plus = terms.filter((term) => term.weight > 0);
  const minus = terms.filter((term) => term.weight < 0).map((term) => ({ ...term, weight: -term.weight }));
  const estimate = combine(plus) - combine(minus);
  const below = variance(plus, minus, alpha, lowDeparture, highDeparture, alpha);
  const above = variance(plus, minus, alpha, highDeparture, lowDeparture, 1 - alpha);
  return {
    lower: Math.max(0, estimate - Math.sqrt(Math.max(0, below))),
    upper: Math.max(0, estimate + Math.sqrt(Math.max(0, above))),
  };
}

type Departure = (degrees: number, alpha: number) => number;

function combine(terms: readonly WeightedSquare[]): number {
  return terms.reduce((sum, term) => sum + term.weight * term.meanSquare, 0);
}

/** G = 1 - 1/F(alpha; n, infinity), with the upper alpha point: how far a mean square may lie above its expectation. */
function lowDeparture(degrees: number, alpha: number): number {
  return 1 - degrees / chiSquareUpperQuantile(alpha, degrees);
}

/** H = 1/F(1 - alpha; n, infinity) - 1: how far it may lie below. */
function highDeparture(degrees: number, alpha: number): number {
  return degrees / chiSquareQuantile(alpha, degrees) - 1;
}

/**
 * The squared half-width. For the lower bound positive terms enter with G and negative ones with H, for the upper bound the reverse, and the
 * ratio of two mean squares enters with the upper alpha (lower bound) or upper 1 - alpha (upper bound) point of F.
 */
function variance(
  plus: readonly WeightedSquare[],
  minus: readonly WeightedSquare[],
  alpha: number,
  plusDeparture: Departure,
  minusDeparture: Departure,
  ratioTail: number,
): number {
  let sum = 0;
  for (const term of plus)
    sum += (plusDeparture(term.degreesOfFreedom, alpha) * term.weight * term.meanSquare) ** 2;
  for (const term of minus)
    sum += (minusDeparture(term.degreesOfFreedom, alpha) * term.weight * term.meanSquare) ** 2;
  for (const positive of plus) {
    for (const negative of minus) {
      const f = fUpperQuantile(ratioTail, positive.degreesOfFreedom, negative.degreesOfFreedom);
      const g = plusDeparture(positive.degreesOfFreedom, alpha);
      const h = minusDeparture(negative.degreesOfFreedom, alpha);
      const cross = ((f - 1) ** 2 - (g * f) ** 2 - h ** 2) / f;
      sum += cross * positive.weight * negative.weight * positive.meanSquare * negative.meanSquare;
    }
  }
  const sameSide = ratioTail === alpha ? plus : minus;
  return minus.length > 0 ? sum + amongLowSide(sameSide, alpha) : sum;
}

/** The cross terms G* between terms whose departure is G; they vanish when there is only one such term. */
function amongLowSide(terms: readonly WeightedSquare[], alpha: number): number {
  let sum = 0;
  for (const [place, first] of terms.entries()) {
    for (const second of terms.slice(place + 1)) {
      const a = first.degreesOfFreedom;
      const b = second.degreesOfFreedom;
      const joint = lowDeparture(a + b, alpha) ** 2 * ((a + b) ** 2 / (a * b));
      const own = lowDeparture(a, alpha) ** 2 * (a / b) + lowDeparture(b, alpha) ** 2 * (b / a);
      sum +=
        ((joint - own) / (terms.length - 1)) *
        first.weight *
        second.weight *
        first.meanSquare *
        second.meanSquare;
    }
  }
  return sum;
}
