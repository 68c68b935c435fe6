import { isUndetermined, undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import type { Reading } from '../statistics/readings.ts';
import { c4, d2, d3 } from './constants.ts';
import { falseAlarmRate } from './false-alarms.ts';
import type { FalseAlarmRate } from './false-alarms.ts';
import { controlLimits } from './limits.ts';
import type { ChartPoint } from './limits.ts';
import { medianDeviation } from './median-deviation.ts';
import { describePhase, pointsOfPhase } from './phase.ts';
import type { Phase } from './phase.ts';
import { WESTERN_ELECTRIC_RULES } from './rules.ts';
import type { RunRule } from './rules.ts';
import { chartSeries } from './series.ts';
import type { ChartSeries, Statistic } from './series.ts';
import { describeSubgroups, spreadWithin } from './subgroups.ts';
import type { Subgroup, SubgroupSpread } from './subgroups.ts';
import { judgeProcess } from './verdict.ts';
import type { ProcessVerdict } from './verdict.ts';

/** Centre and within deviation fixed before: limits of a process that was shown in control. */
export interface FrozenProcess {
  readonly centre: number;
  readonly sigmaWithin: number;
}

/** Which pair of charts to draw of subgroups. */
export type SubgroupChartKind = 'mean-and-range' | 'mean-and-deviation' | 'median-and-range';

/** What a chart of subgroups is drawn from. */
export interface SubgroupChartInput {
  readonly kind: SubgroupChartKind;
  readonly subgroups: readonly (readonly Reading[])[];
  /** Points the limits are computed from; all unless told. Not together with `frozen`. */
  readonly phase?: Phase;
  readonly frozen?: FrozenProcess;
  /** Mean and deviation only: s̄/c4 (default) or the pooled deviation, unbiased. */
  readonly estimator?: 'average' | 'pooled';
  /** Rules of the chart of location (Western Electric unless told) and of spread (beyond the limits only). */
  readonly rules?: { readonly location?: readonly RunRule[]; readonly spread?: readonly RunRule[] };
}

/** A control chart of subgroups with what is needed to explain every line on it. */
export interface SubgroupChart {
  readonly method: SubgroupChartKind;
  readonly subgroups: number;
  readonly readings: number;
  readonly limitsFrom: string;
  readonly centre: number;
  readonly sigmaWithin: number;
  readonly sigmaMethod:
    'mean range over d2' | 'mean deviation over c4' | 'pooled deviation, unbiased' | 'frozen';
  /** R̄ or s̄ of the subgroups that make the limits. */
  readonly meanSpread: number;
  /** Null when the limits are frozen. */
  readonly within: SubgroupSpread | null;
  readonly location: ChartSeries;
  readonly spread: ChartSeries;
  readonly verdict: ProcessVerdict;
  /** How often the rules on the chart of location signal by chance alone, its points taken as normal. */
  readonly falseAlarms: FalseAlarmRate | Undetermined;
}

const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;

/** Grand mean weighted by size; the chart of medians takes the plain mean of the medians. */
function centreOf(groups: readonly Subgroup[], kind: SubgroupChartKind): number {
  if (kind === 'median-and-range') return mean(groups.map((group) => group.median));
  const readings = groups.reduce((sum, group) => sum + group.n, 0);
  return groups.reduce((sum, group) => sum + group.n * group.mean, 0) / readings;
}

function sigmaOf(
  within: SubgroupSpread,
  input: SubgroupChartInput,
): Pick<SubgroupChart, 'sigmaWithin' | 'sigmaMethod'> {
  if (input.kind !== 'mean-and-deviation')
    return { sigmaWithin: within.fromRanges ?? NaN, sigmaMethod: 'mean range over d2' };
  return input.estimator === 'pooled'
    ? { sigmaWithin: within.pooledUnbiased, sigmaMethod: 'pooled deviation, unbiased' }
    : { sigmaWithin: within.fromDeviations, sigmaMethod: 'mean deviation over c4' };
}

function locationPoint(
  group: Subgroup,
  index: number,
  kind: SubgroupChartKind,
  centre: number,
  sigma: number,
): ChartPoint {
  const median = kind === 'median-and-range';
  const factor = median ? medianDeviation(group.n) : 1 / Math.sqrt(group.n);
  return {
    point: index + 1,
    value: median ? group.median : group.mean,
    size: group.n,
    limits: controlLimits(centre, factor * sigma),
  };
}

function spreadPoint(group: Subgroup, index: number, kind: SubgroupChartKind, sigma: number): ChartPoint {
  const byRange = kind !== 'mean-and-deviation';
  const centre = byRange ? d2(group.n) : c4(group.n);
  const deviation = byRange ? d3(group.n) : Math.sqrt(1 - c4(group.n) ** 2);
  return {
    point: index + 1,
    value: byRange ? group.range : group.deviation,
    size: group.n,
    limits: controlLimits(centre * sigma, deviation * sigma, { lowest: 0 }),
  };
}

/**
 * Control chart of subgroups: means and ranges, means and deviations, or medians and ranges; sizes may differ.
 *
 * Limits at three sigma of the plotted statistic: mean ± 3σ/√n, median ± 3σ·(deviation of the median of n), range
 * d2σ ± 3d3σ, deviation c4σ ± 3√(1 − c4²)σ, a lower limit of spread never below 0. σ is estimated within subgroups:
 * mean of R/d2, mean of s/c4, or pooled. These are the factors A2, A3, B3, B4, D3, D4 of ISO 7870-2:2013 at full precision.
 * Readings may be text. Points of a subgroup left out of the phase stay on the chart and are judged.
 */
export function subgroupChart(input: SubgroupChartInput): SubgroupChart | Undetermined {
  const { kind, frozen } = input;
  const groups = describeSubgroups(input.subgroups);
  if (isUndetermined(groups)) return groups;
  const large = groups.findIndex((group) => group.n > 25);
  if (large >= 0 && kind !== 'mean-and-deviation')
    return undetermined(
      'outside-table',
      `Subgroup ${large + 1} has more than 25 readings: use the chart of deviations`,
    );
  const chosen = pointsOfPhase(input.phase, groups.length);
  if (isUndetermined(chosen)) return chosen;
  const base = chosen.map((index) => groups[index] as Subgroup);
  const within = frozen === undefined ? spreadWithin(base) : null;
  const { sigmaWithin, sigmaMethod } =
    within === null
      ? { sigmaWithin: frozen?.sigmaWithin ?? NaN, sigmaMethod: 'frozen' as const }
      : sigmaOf(within, input);
  const centre = frozen?.centre ?? centreOf(base, kind);
  if (!Number.isFinite(centre))
    return undetermined('not-finite', 'The frozen centre line is not a finite number');
  if (!(sigmaWithin > 0 && sigmaWithin < Infinity))
    return undetermined(
      'no-variation',
      'Nothing varies within the subgroups: limits at three sigma need some spread',
    );
  const statistic: Statistic = kind === 'median-and-range' ? 'median' : 'mean';
  const location = chartSeries(
    statistic,
    groups.map((group, index) => locationPoint(group, index, kind, centre, sigmaWithin)),
    input.rules?.location ?? WESTERN_ELECTRIC_RULES,
  );
  if (isUndetermined(location)) return location;
  const byRange = kind !== 'mean-and-deviation';
  const spread = chartSeries(
    byRange ? 'range' : 'deviation',
    groups.map((group, index) => spreadPoint(group, index, kind, sigmaWithin)),
    input.rules?.spread ?? ['beyond-three-sigma'],
  );
  if (isUndetermined(spread)) return spread;
  return {
    method: kind,
    subgroups: groups.length,
    readings: groups.reduce((sum, group) => sum + group.n, 0),
    limitsFrom: frozen === undefined ? describePhase(input.phase, groups.length) : 'frozen before',
    centre,
    sigmaWithin,
    sigmaMethod,
    meanSpread: mean(base.map((group) => (byRange ? group.range : group.deviation))),
    within,
    location,
    spread,
    verdict: judgeProcess([location, spread]),
    falseAlarms: falseAlarmRate(location.rules),
  };
}
