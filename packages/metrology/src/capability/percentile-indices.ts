import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { quantileOfSorted } from '../statistics/quantile.ts';
import { limitsFault, oneSided } from './capability-limits.ts';
import type { CapabilityLimits } from './capability-limits.ts';
import { distributionOf } from './fits/distribution-of.ts';
import type { KnownDistribution } from './fits/distribution-of.ts';
import type { ExpectedOutside } from './fraction-outside.ts';

/** Share beyond each end of the natural spread, by convention: mean -/+ 3 s of a normal process, rounded. */
export const NATURAL_TAIL = 0.00135;

/** Readings below which an empirical 0.135 % point lies outside the sample: 1/0.00135. */
export const EMPIRICAL_MINIMUM = 741;

export interface PercentileIndices {
  readonly method: string;
  readonly inputs: { readonly limits: CapabilityLimits; readonly distribution: string };
  readonly x0135: number;
  readonly median: number;
  readonly x99865: number;
  /** Pp: band / (x99.865 - x0.135); undetermined with one limit */
  readonly potential: number | Undetermined;
  readonly lowerSide: number | Undetermined;
  readonly upperSide: number | Undetermined;
  /** Ppk: the smaller side */
  readonly minimum: number;
  readonly worstSide: 'lower' | 'upper';
  /** from the distribution's own tails; undetermined for the empirical form */
  readonly expectedOutside: ExpectedOutside | Undetermined;
}

/**
 * Indices of a non-normal characteristic by its percentiles (ISO 22514-2; ISO 22514-4): PpkU = (U - x50)/(x99.865 - x50),
 * PpkL = (x50 - L)/(x50 - x0.135), Pp = (U - L)/(x99.865 - x0.135). For a normal distribution they equal the ordinary indices but for the
 * rounding of 0.00135. One limit: that side only; a natural bound gives no side. The expected fraction outside comes from the distribution.
 * Undetermined: no limits, or a quantile that the distribution does not reach (a power that runs out).
 * Tested against capability-percentile-known.
 */
export function percentileIndices(
  model: KnownDistribution,
  limits: CapabilityLimits,
): PercentileIndices | Undetermined {
  const fault = limitsFault(limits);
  if (fault) return fault;
  const distribution = distributionOf(model);
  const { lower, upper } = limits;
  const belowPpm = lower === undefined ? 0 : 1e6 * distribution.lowerTail(lower);
  const abovePpm = upper === undefined ? 0 : 1e6 * distribution.upperTail(upper);
  return fromPercentiles(
    {
      low: distribution.lowerQuantile(NATURAL_TAIL),
      median: distribution.lowerQuantile(0.5),
      high: distribution.upperQuantile(NATURAL_TAIL),
    },
    limits,
    `percentiles of the ${model.family} distribution`,
    { method: `${model.family} distribution`, belowPpm, abovePpm, totalPpm: belowPpm + abovePpm },
  );
}

/**
 * The same from the readings alone, with no distribution: 0.135 %, 50 % and 99.865 % points by linear interpolation at k/(n + 1) (Hyndman-Fan 6).
 * Refused below 741 readings, where the outer points would lie beyond the sample and the index would flatter (a true 1.00 reads 1.52 at n = 30).
 */
export function empiricalPercentileIndices(
  values: readonly number[],
  limits: CapabilityLimits,
): PercentileIndices | Undetermined {
  const fault = limitsFault(limits);
  if (fault) return fault;
  if (!values.every(Number.isFinite))
    return undetermined('not-finite', 'One of the readings is not a finite number');
  if (values.length < EMPIRICAL_MINIMUM) {
    return undetermined(
      'too-few',
      `Empirical 0.135 % points need ${EMPIRICAL_MINIMUM} readings and there are ${values.length}; fit a distribution instead`,
    );
  }
  const sorted = Float64Array.from(values).sort();
  return fromPercentiles(
    {
      low: quantileOfSorted(sorted, NATURAL_TAIL, 6),
      median: quantileOfSorted(sorted, 0.5, 6),
      high: quantileOfSorted(sorted, 1 - NATURAL_TAIL, 6),
    },
    limits,
    'empirical percentiles',
    undetermined(
      'no-distribution',
      'Without a distribution there is no expected fraction outside; see the fraction observed',
    ),
  );
}

function fromPercentiles(
  points: { low: number; median: number; high: number },
  limits: CapabilityLimits,
  method: string,
  expectedOutside: ExpectedOutside | Undetermined,
): PercentileIndices | Undetermined {
  const { low, median, high } = points;
  const { lower, upper } = limits;
  const wanted = [median, ...(lower === undefined ? [] : [low]), ...(upper === undefined ? [] : [high])];
  if (
    !wanted.every(Number.isFinite) ||
    (upper !== undefined && !(high > median)) ||
    (lower !== undefined && !(median > low))
  ) {
    return undetermined('no-quantile', 'The distribution does not reach the percentiles the index needs');
  }
  const lowerSide = lower === undefined ? noSide('lower') : (median - lower) / (median - low);
  const upperSide = upper === undefined ? noSide('upper') : (upper - median) / (high - median);
  const least = {
    lower: typeof lowerSide === 'number' ? lowerSide : Infinity,
    upper: typeof upperSide === 'number' ? upperSide : Infinity,
  };
  return {
    method,
    inputs: { limits, distribution: method },
    x0135: low,
    median,
    x99865: high,
    potential: lower === undefined || upper === undefined ? oneSided() : (upper - lower) / (high - low),
    lowerSide,
    upperSide,
    minimum: Math.min(least.lower, least.upper),
    worstSide: least.lower < least.upper ? 'lower' : 'upper',
    expectedOutside,
  };
}

function noSide(side: 'lower' | 'upper'): Undetermined {
  return undetermined('no-limit', `There is no ${side} tolerance limit`);
}
