import { powerOfTen, ratio, ratioToNumber } from '../decimal/index.ts';
import type { Ratio } from '../decimal/index.ts';
import { fUpperTail } from '../distributions/f.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { addFractions, divideFractions, subtractFractions } from './fractions.ts';
import { readExactly } from './readings.ts';
import type { Reading } from './readings.ts';

/** One line of an analysis of variance. */
export interface VarianceSource {
  readonly df: number;
  readonly sumOfSquares: number;
  readonly meanSquare: number;
}

/** One-way analysis of variance, the groups being the levels of one factor. */
export interface OneWayAnova {
  readonly method: 'one-way analysis of variance, exact decimal sums';
  readonly n: number;
  readonly groups: readonly { readonly n: number; readonly mean: number }[];
  readonly between: VarianceSource;
  readonly within: VarianceSource;
  readonly total: { readonly df: number; readonly sumOfSquares: number };
  /** Ratio of the mean squares between and within; undetermined when nothing varies within. */
  readonly f: number | Undetermined;
  /** P(F > f) if all groups had one mean. */
  readonly p: number | Undetermined;
  /** Share of the sum of squares between the groups. */
  readonly rSquared: number | Undetermined;
  /** √(mean square within). */
  readonly residualStandardDeviation: number;
}

const ZERO: Ratio = { numerator: 0n, denominator: 1n };

/** Sum of squares as the fraction of a fraction of squared last decimals. */
function source(squares: Ratio, df: number, unit: bigint): VarianceSource {
  const square = ratio(squares.numerator, squares.denominator * unit * unit);
  return {
    df,
    sumOfSquares: ratioToNumber(square),
    meanSquare: ratioToNumber({ numerator: square.numerator, denominator: square.denominator * BigInt(df) }),
  };
}

/**
 * One-way analysis of variance from decimal readings.
 *
 * SS between = ΣT(j)²/n(j) − T²/N and SS within = Σx² − ΣT(j)²/n(j), with T(j) the sum of group j, are exact fractions of
 * whole numbers, so the certified digits of NIST StRD SmLs01-09 come out although their data share 13 leading digits.
 * F = MS between / MS within with k − 1 and N − k degrees of freedom.
 * @param groups at least two groups of at least one reading, and more readings than groups
 */
export function oneWayAnova(groups: readonly (readonly Reading[])[]): OneWayAnova | Undetermined {
  if (groups.length < 2) return undetermined('too-few', 'An analysis of variance needs at least two groups');
  const empty = groups.findIndex((group) => group.length === 0);
  if (empty >= 0)
    return undetermined('too-few', `Group ${empty + 1} has no readings: enter some or leave it out`);
  const exact = readExactly(groups.flat());
  if ('undetermined' in exact) return exact;
  const n = exact.deviations.length;
  const dfWithin = n - groups.length;
  if (dfWithin === 0) return undetermined('too-few', 'At least one group needs a second reading');
  let next = 0;
  let total = 0n;
  let squares = 0n;
  let ofGroups = ZERO;
  const unit = powerOfTen(exact.scale);
  const described = groups.map((group) => {
    let sum = 0n;
    for (const end = next + group.length; next < end; next += 1) {
      const d = exact.deviations[next] as bigint;
      sum += d;
      squares += d * d;
    }
    total += sum;
    const size = BigInt(group.length);
    ofGroups = addFractions(ofGroups, ratio(sum * sum, size));
    return {
      n: group.length,
      mean: ratioToNumber({ numerator: exact.origin * size + sum, denominator: unit * size }),
    };
  });
  const all = ratio(squares);
  const grand = ratio(total * total, BigInt(n));
  const between = subtractFractions(ofGroups, grand);
  const within = subtractFractions(all, ofGroups);
  const dfBetween = groups.length - 1;
  const flat = undetermined('no-variation', 'Nothing varies within the groups, so the ratio has no value');
  const f =
    within.numerator === 0n ? flat : (ratioToNumber(divideFractions(between, within)) * dfWithin) / dfBetween;
  const whole = addFractions(between, within);
  const withinLine = source(within, dfWithin, unit);
  return {
    method: 'one-way analysis of variance, exact decimal sums',
    n,
    groups: described,
    between: source(between, dfBetween, unit),
    within: withinLine,
    total: { df: n - 1, sumOfSquares: source(whole, 1, unit).sumOfSquares },
    f,
    p: typeof f === 'number' ? fUpperTail(f, dfBetween, dfWithin) : f,
    rSquared:
      whole.numerator === 0n
        ? undetermined('no-variation', 'All readings are equal')
        : ratioToNumber(divideFractions(between, whole)),
    residualStandardDeviation: Math.sqrt(withinLine.meanSquare),
  };
}
