import { formatDecimal, powerOfTen, ratioToNumber } from '../decimal/index.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { powerSums } from './power-sums.ts';
import type { PowerSums } from './power-sums.ts';
import { readExactly } from './readings.ts';
import type { ExactReadings, Reading } from './readings.ts';

/** Description of a sample. A figure that needs more readings, or some variation, says so in its own place. */
export interface Summary {
  readonly method: 'exact decimal sums';
  readonly n: number;
  readonly mean: number;
  /** Σ(x − x̄)², rounded once. */
  readonly sumOfSquares: number;
  /** s² with divisor n − 1. */
  readonly variance: number | Undetermined;
  /** s with divisor n − 1. */
  readonly standardDeviation: number | Undetermined;
  readonly minimum: number;
  readonly maximum: number;
  /** The smallest and largest reading as they were typed. */
  readonly minimumText: string;
  readonly maximumText: string;
  readonly range: number;
  /** g1 = m3/m2^1.5 with central moments of divisor n. */
  readonly skewness: number | Undetermined;
  /** G1 = g1·√(n(n−1))/(n−2), the adjusted Fisher-Pearson coefficient. */
  readonly adjustedSkewness: number | Undetermined;
  /** g2 = m4/m2² − 3: 0 for a normal distribution. */
  readonly excessKurtosis: number | Undetermined;
  /** G2 = (n−1)/((n−2)(n−3))·((n+1)g2 + 6). */
  readonly adjustedExcessKurtosis: number | Undetermined;
  /** r1 = Σ(x(i)−x̄)(x(i+1)−x̄)/Σ(x−x̄)² in the order of the readings. */
  readonly lag1Autocorrelation: number | Undetermined;
}

const fraction = (numerator: bigint, denominator: bigint) => ratioToNumber({ numerator, denominator });

const tooFew = (needed: number) => undetermined('too-few', `This needs at least ${needed} readings`);
const noVariation = () => undetermined('no-variation', 'All readings are equal, so this has no value');

function shape(sums: PowerSums, spread: bigint) {
  const { n, s1, s2, s3, s4 } = sums;
  const count = Number(n);
  const third = n * n * s3 - 3n * n * s1 * s2 + 2n * s1 * s1 * s1;
  const fourth = n * n * n * s4 - 4n * n * n * s1 * s3 + 6n * n * s1 * s1 * s2 - 3n * s1 ** 4n;
  // n³·m3 over n³·m2^1.5: the squared ratio is exact, its root is taken once.
  const square = Math.sqrt(fraction(third * third, spread * spread * spread));
  const skewness = third < 0n ? -square : square;
  const excess = fraction(fourth - 3n * spread * spread, spread * spread);
  return {
    skewness,
    adjustedSkewness: count < 3 ? tooFew(3) : (skewness * Math.sqrt(count * (count - 1))) / (count - 2),
    excessKurtosis: excess,
    adjustedExcessKurtosis:
      count < 4 ? tooFew(4) : ((count - 1) / ((count - 2) * (count - 3))) * ((count + 1) * excess + 6),
  };
}

function neighbourCorrelation(sums: PowerSums, readings: ExactReadings, spread: bigint): number {
  const { n, s1, neighbours } = sums;
  const last = readings.deviations[readings.deviations.length - 1] ?? 0n;
  // Σ(d(i)−d̄)(d(i+1)−d̄) times n²; the first deviation is 0 because the origin is the first reading.
  const product = n * n * neighbours - n * s1 * (2n * s1 - last) + (n - 1n) * s1 * s1;
  return fraction(product, n * spread);
}

/** Summary of readings already read. n ≥ 1. */
export function summarizeExact(readings: ExactReadings): Summary {
  const sums = powerSums(readings);
  const { n, s1, s2 } = sums;
  const unit = powerOfTen(readings.scale);
  const spread = n * s2 - s1 * s1;
  const count = Number(n);
  let low = 0;
  let high = 0;
  readings.deviations.forEach((deviation, index) => {
    if (deviation < (readings.deviations[low] as bigint)) low = index;
    if (deviation > (readings.deviations[high] as bigint)) high = index;
  });
  const decimalText = (index: number) => {
    const decimal = readings.decimals[index];
    return decimal === undefined ? '' : formatDecimal(decimal);
  };
  const least = readings.deviations[low] ?? 0n;
  const most = readings.deviations[high] ?? 0n;
  const variance = count < 2 ? tooFew(2) : fraction(spread, n * (n - 1n) * unit * unit);
  const flat = spread === 0n;
  const blank = count < 2 ? tooFew(2) : noVariation();
  const forms = flat
    ? { skewness: blank, adjustedSkewness: blank, excessKurtosis: blank, adjustedExcessKurtosis: blank }
    : shape(sums, spread);
  return {
    method: 'exact decimal sums',
    n: count,
    mean: fraction(n * readings.origin + s1, n * unit),
    sumOfSquares: fraction(spread, n * unit * unit),
    variance,
    standardDeviation: typeof variance === 'number' ? Math.sqrt(variance) : variance,
    minimum: fraction(readings.origin + least, unit),
    maximum: fraction(readings.origin + most, unit),
    minimumText: decimalText(low),
    maximumText: decimalText(high),
    range: fraction(most - least, unit),
    ...forms,
    lag1Autocorrelation: flat ? blank : neighbourCorrelation(sums, readings, spread),
  };
}

/**
 * Describes a sample with sums that are exact.
 *
 * Readings are decimal text (or numbers, read as the decimal they print as), so Σx, Σx² … are whole numbers of the last
 * decimal; each figure is one fraction of whole numbers, rounded once. NIST StRD NumAcc1-4 come out to 15 digits.
 * @param readings at least one reading; the order matters to the autocorrelation only
 * @returns the summary, or undetermined: `too-few` when empty, or the reason of the first reading refused
 */
export function summarize(readings: readonly Reading[]): Summary | Undetermined {
  if (readings.length === 0) return undetermined('too-few', 'There are no readings');
  const exact = readExactly(readings);
  return 'undetermined' in exact ? exact : summarizeExact(exact);
}
