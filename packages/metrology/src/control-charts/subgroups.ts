import { isUndetermined, undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { median } from '../statistics/quantile.ts';
import type { Reading } from '../statistics/readings.ts';
import { summarize } from '../statistics/summarize.ts';
import { c4, d2 } from './constants.ts';

/** One subgroup: readings taken together, in the short time in which only common causes act. */
export interface Subgroup {
  readonly n: number;
  readonly mean: number;
  readonly median: number;
  readonly range: number;
  /** s with divisor n − 1. */
  readonly deviation: number;
}

/** Describes each subgroup with exact sums; names the subgroup and the reading it cannot use. */
export function describeSubgroups(subgroups: readonly (readonly Reading[])[]): Subgroup[] | Undetermined {
  const described: Subgroup[] = [];
  for (let index = 0; index < subgroups.length; index += 1) {
    const readings = subgroups[index] ?? [];
    const where = `Subgroup ${index + 1}`;
    if (readings.length < 2)
      return undetermined('too-few', `${where} has ${readings.length} readings: it needs at least 2`);
    const summary = summarize(readings);
    if (isUndetermined(summary)) return undetermined(summary.code, `${where}, ${summary.reason}`);
    const middle = median(readings.map(Number));
    if (isUndetermined(summary.standardDeviation) || isUndetermined(middle))
      return undetermined('too-few', `${where} has no standard deviation`);
    described.push({
      n: summary.n,
      mean: summary.mean,
      median: middle.value,
      range: summary.range,
      deviation: summary.standardDeviation,
    });
  }
  return described;
}

/** Estimates of the deviation within subgroups, each named; sizes may differ. */
export interface SubgroupSpread {
  readonly subgroups: number;
  /** Σ(n − 1), the degrees of freedom of the pooled deviation. */
  readonly degreesOfFreedom: number;
  /** Unweighted mean of R/d2(n). Null where a subgroup is larger than 25. */
  readonly fromRanges: number | null;
  /** Unweighted mean of s/c4(n). */
  readonly fromDeviations: number;
  /** √(Σ(n − 1)s²/Σ(n − 1)). */
  readonly pooled: number;
  /** The pooled deviation divided by c4(degrees of freedom + 1). */
  readonly pooledUnbiased: number;
}

/** Within-subgroup deviation of subgroups already described, at least one. */
export function spreadWithin(groups: readonly Subgroup[]): SubgroupSpread {
  const mean = (of: (group: Subgroup) => number) =>
    groups.reduce((sum, group) => sum + of(group), 0) / groups.length;
  const degreesOfFreedom = groups.reduce((sum, group) => sum + group.n - 1, 0);
  const squares = groups.reduce((sum, group) => sum + (group.n - 1) * group.deviation ** 2, 0);
  const pooled = Math.sqrt(squares / degreesOfFreedom);
  return {
    subgroups: groups.length,
    degreesOfFreedom,
    fromRanges: groups.some((group) => group.n > 25) ? null : mean((group) => group.range / d2(group.n)),
    fromDeviations: mean((group) => group.deviation / c4(group.n)),
    pooled,
    pooledUnbiased: pooled / c4(degreesOfFreedom + 1),
  };
}

/**
 * Deviation within subgroups by every common estimator: R̄/d2, s̄/c4, pooled, and pooled made unbiased.
 * Subgroups may differ in size; the averages of R/d2 and s/c4 are then unweighted, as is usual.
 */
export function subgroupSpread(subgroups: readonly (readonly Reading[])[]): SubgroupSpread | Undetermined {
  if (subgroups.length === 0) return undetermined('too-few', 'There are no subgroups');
  const groups = describeSubgroups(subgroups);
  return isUndetermined(groups) ? groups : spreadWithin(groups);
}
