import { c4, d2, d3 } from '../control-charts/constants.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { equivalentDegreesOfFreedom } from './equivalent-degrees.ts';
import { momentsOf } from './moments.ts';
import type { SpreadBasis } from './normal-indices.ts';

/** How a standard deviation was estimated. Within: from subgroups or moving ranges, blind to drift between them. Overall: from all readings. */
export type WithinMethod = 'mean-range' | 'mean-deviation' | 'pooled' | 'pooled-unbiased' | 'moving-range';

export interface SpreadEstimate {
  readonly basis: SpreadBasis;
  /** as a screen names it: Rbar/d2, sbar/c4, pooled s, pooled s/c4, MRbar/d2, s */
  readonly method: string;
  readonly sigma: number;
  readonly n: number;
  readonly subgroups: number;
  /** exact for s and pooled s, Patnaik's equivalent for ranges and mean deviations */
  readonly degreesOfFreedom: number;
}

/** Sample standard deviation of all readings, n - 1: the spread of Pp and Ppk. */
export function overallSpread(values: readonly number[]): SpreadEstimate | Undetermined {
  const moments = momentsOf(values);
  if ('undetermined' in moments) return moments;
  return {
    basis: 'overall',
    method: 's, n - 1',
    sigma: moments.deviation,
    n: moments.n,
    subgroups: 1,
    degreesOfFreedom: moments.n - 1,
  };
}

/**
 * Spread within subgroups: the spread of Cp and Cpk.
 *
 * `mean-range` average of R_i/d2(n_i); `mean-deviation` average of s_i/c4(n_i), both unweighted; `pooled` sqrt(sum of squares/sum(n_i - 1));
 * `pooled-unbiased` the same over c4(degrees + 1). Subgroups may differ in size; those of one reading are left out of all four.
 * Degrees of freedom: sum(n_i - 1) when pooled, otherwise those of a standard deviation that scatters as much (Patnaik).
 * Undetermined: no subgroup of two or more readings, a subgroup above 25 for ranges, no variation, values not finite.
 * Tested against capability-cpk-vs-ppk-piston and chart-unequal-subgroups.
 */
export function withinSpread(
  subgroups: readonly (readonly number[])[],
  method: Exclude<WithinMethod, 'moving-range'>,
): SpreadEstimate | Undetermined {
  const used = subgroups.filter((subgroup) => subgroup.length > 1);
  if (used.length === 0)
    return undetermined('too-few', 'A spread within subgroups needs a subgroup of two or more readings');
  if (!used.every((subgroup) => subgroup.every(Number.isFinite))) {
    return undetermined('not-finite', 'One of the readings is not a finite number');
  }
  if (method === 'mean-range' && used.some((subgroup) => subgroup.length > 25)) {
    return undetermined(
      'subgroup-size',
      'Ranges of more than 25 readings waste what is in between; use the standard deviation',
    );
  }
  const n = used.reduce((sum, subgroup) => sum + subgroup.length, 0);
  const estimate =
    method === 'mean-range' || method === 'mean-deviation' ? averaged(used, method) : pooled(used, method);
  if (!(estimate.sigma > 0))
    return undetermined('no-variation', 'The readings within each subgroup are all alike');
  return { basis: 'within', n, subgroups: used.length, ...estimate };
}

type Estimate = Pick<SpreadEstimate, 'method' | 'sigma' | 'degreesOfFreedom'>;

function averaged(
  subgroups: readonly (readonly number[])[],
  method: 'mean-range' | 'mean-deviation',
): Estimate {
  let sum = 0;
  let variation = 0;
  for (const subgroup of subgroups) {
    const size = subgroup.length;
    if (method === 'mean-range') {
      sum += rangeOf(subgroup) / d2(size);
      variation += (d3(size) / d2(size)) ** 2;
    } else {
      sum += Math.sqrt(squaresOf(subgroup) / (size - 1)) / c4(size);
      variation += 1 / c4(size) ** 2 - 1;
    }
  }
  const k = subgroups.length;
  return {
    method: method === 'mean-range' ? 'Rbar/d2' : 'sbar/c4',
    sigma: sum / k,
    degreesOfFreedom: equivalentDegreesOfFreedom(variation / (k * k)),
  };
}

function pooled(subgroups: readonly (readonly number[])[], method: 'pooled' | 'pooled-unbiased'): Estimate {
  const degreesOfFreedom = subgroups.reduce((sum, subgroup) => sum + subgroup.length - 1, 0);
  const sigma = Math.sqrt(
    subgroups.reduce((sum, subgroup) => sum + squaresOf(subgroup), 0) / degreesOfFreedom,
  );
  return method === 'pooled'
    ? { method: 'pooled s', sigma, degreesOfFreedom }
    : { method: 'pooled s/c4', sigma: sigma / c4(degreesOfFreedom + 1), degreesOfFreedom };
}

/**
 * Spread from moving ranges of two successive readings: mean moving range / d2(2). For single readings in production order. The moving ranges
 * overlap, and their degrees of freedom take that into account: Var(sum) = m (2 - 4/pi) + 2 (m - 1) Cov for m ranges, with
 * Cov = (4/pi)(sqrt(3)/2 + pi/12 - 1) from E|D1 D2| of two normal differences of correlation -1/2.
 */
export function movingRangeSpread(values: readonly number[]): SpreadEstimate | Undetermined {
  const moments = momentsOf(values);
  if ('undetermined' in moments) return moments;
  const m = values.length - 1;
  let sum = 0;
  for (let place = 1; place < values.length; place += 1)
    sum += Math.abs((values[place] ?? 0) - (values[place - 1] ?? 0));
  const squaredFactor = 4 / Math.PI;
  const own = 2 - squaredFactor;
  const shared = squaredFactor * (Math.sqrt(3) / 2 + Math.PI / 12 - 1);
  return {
    basis: 'within',
    method: 'MRbar/d2',
    sigma: sum / m / Math.sqrt(squaredFactor),
    n: values.length,
    subgroups: values.length,
    degreesOfFreedom: equivalentDegreesOfFreedom((m * own + 2 * (m - 1) * shared) / (m * m) / squaredFactor),
  };
}

function rangeOf(values: readonly number[]): number {
  return Math.max(...values) - Math.min(...values);
}

function squaresOf(values: readonly number[]): number {
  const origin = values[0] ?? 0;
  const offset = values.reduce((sum, value) => sum + (value - origin), 0) / values.length;
  return values.reduce((sum, value) => sum + (value - origin - offset) ** 2, 0);
}
