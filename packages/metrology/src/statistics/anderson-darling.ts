import { logNormalCdf, logNormalUpperTail } from '../distributions/normal.ts';
import { isUndetermined, undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { andersonDarlingKnownUpperTail } from './anderson-darling-known.ts';
import type { Reading } from './readings.ts';
import { summarize } from './summarize.ts';

/** Which parameters were estimated from the same readings: it decides the distribution of A² under the model. */
export type FittedFamily = 'known' | 'normal' | 'weibull';

/** The test of Anderson and Darling with what is needed to explain it. */
export interface AndersonDarling {
  readonly method: 'Anderson-Darling';
  readonly family: FittedFamily;
  readonly n: number;
  readonly statistic: number;
  /** The statistic adjusted to n, from which p is read; the same as `statistic` where no adjustment is defined. */
  readonly adjustedStatistic: number;
  readonly p: number;
  /** Where the p value comes from. */
  readonly source: string;
}

/**
 * A² = −n − (1/n) Σ (2i − 1)[ln F(x(i)) + ln(1 − F(x(n+1−i)))], x in rising order.
 * Logarithms of both tails are asked for, because an extreme reading has a tail that is 0 as 1 − F.
 */
export function andersonDarlingStatistic(
  sorted: ArrayLike<number>,
  logCdf: (x: number) => number,
  logUpperTail: (x: number) => number,
): number {
  const n = sorted.length;
  let sum = 0;
  for (let i = 0; i < n; i += 1)
    sum += (2 * i + 1) * (logCdf(sorted[i] as number) + logUpperTail(sorted[n - 1 - i] as number));
  return -n - sum / n;
}

/**
 * p value of the adjusted statistic A²* = A²(1 + 0.75/n + 2.25/n²) when mean and deviation are estimated:
 * the four branches of R. B. D'Agostino and M. A. Stephens, Goodness-of-Fit Techniques (1986), table 4.9, case 3.
 * Above A²* = 13, where the fitted parabola would turn, the p value of 13 (3e-31) stands as an upper bound.
 */
export function andersonDarlingNormalP(adjusted: number): number {
  const a = Math.min(adjusted, 13);
  if (a >= 0.6) return Math.exp(1.2937 - 5.709 * a + 0.0186 * a * a);
  if (a >= 0.34) return Math.exp(0.9177 - 4.279 * a - 1.38 * a * a);
  if (a >= 0.2) return 1 - Math.exp(-8.318 + 42.796 * a - 59.938 * a * a);
  return 1 - Math.exp(-13.436 + 101.14 * a - 223.73 * a * a);
}

/** p value for each family, with its adjustment to n. */
export function andersonDarlingP(statistic: number, n: number, family: FittedFamily) {
  if (family === 'normal') {
    const adjusted = statistic * (1 + 0.75 / n + 2.25 / (n * n));
    return {
      adjusted,
      p: andersonDarlingNormalP(adjusted),
      source: "D'Agostino and Stephens 1986, table 4.9",
    };
  }
  if (family === 'weibull') {
    const adjusted = statistic * (1 + 0.2 / Math.sqrt(n));
    // Fitted to the percentage points of Stephens, Biometrika 64 (1977) 583; from memory, tested against them.
    const p = 1 / (1 + Math.exp(-0.1 + 1.24 * Math.log(adjusted) + 4.48 * adjusted));
    return { adjusted, p, source: 'Stephens 1977, both parameters estimated' };
  }
  return {
    adjusted: statistic,
    p: andersonDarlingKnownUpperTail(statistic),
    source: 'Anderson and Darling 1952, limiting distribution, nothing estimated',
  };
}

/**
 * Anderson-Darling test that readings come from a normal distribution whose mean and deviation (divisor n − 1) are
 * estimated from them.
 * @param readings at least 8, not all equal (the p value is not fitted below 8)
 */
export function andersonDarlingNormal(readings: readonly Reading[]): AndersonDarling | Undetermined {
  if (readings.length < 8)
    return undetermined(
      'too-few',
      `The test of normality needs at least 8 readings: there are ${readings.length}`,
    );
  const summary = summarize(readings);
  if (isUndetermined(summary)) return summary;
  const s = summary.standardDeviation;
  if (typeof s !== 'number') return s;
  if (s === 0) return undetermined('no-variation', 'All readings are equal: normality cannot be tested');
  const z = Float64Array.from(readings, (reading) => (Number(reading) - summary.mean) / s).sort();
  const statistic = andersonDarlingStatistic(z, logNormalCdf, logNormalUpperTail);
  const { adjusted, p, source } = andersonDarlingP(statistic, z.length, 'normal');
  return {
    method: 'Anderson-Darling',
    family: 'normal',
    n: z.length,
    statistic,
    adjustedStatistic: adjusted,
    p,
    source,
  };
}

/**
 * Anderson-Darling test against a distribution given by its two logarithmic tails.
 *
 * `known`: nothing was estimated from these readings. `normal`: the argument is already on the scale on which two
 * parameters of a normal distribution were fitted (a lognormal or Box-Cox fit: pass the tails of z). `weibull`: scale
 * and shape of a Weibull distribution were fitted by maximum likelihood.
 */
export function andersonDarling(
  values: readonly number[],
  tails: { readonly logCdf: (x: number) => number; readonly logUpperTail: (x: number) => number },
  family: FittedFamily,
): AndersonDarling | Undetermined {
  if (values.length < 8)
    return undetermined('too-few', `The test of fit needs at least 8 values: there are ${values.length}`);
  if (!values.every(Number.isFinite))
    return undetermined('not-finite', 'One of the values is not a finite number');
  const sorted = Float64Array.from(values).sort();
  const statistic = andersonDarlingStatistic(sorted, tails.logCdf, tails.logUpperTail);
  if (!Number.isFinite(statistic))
    return undetermined(
      'outside-support',
      'A value lies where the distribution cannot: the fit is refuted by it',
    );
  const { adjusted, p, source } = andersonDarlingP(statistic, sorted.length, family);
  return {
    method: 'Anderson-Darling',
    family,
    n: sorted.length,
    statistic,
    adjustedStatistic: adjusted,
    p,
    source,
  };
}
