import { isUndetermined, undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { readExactly } from '../statistics/readings.ts';
import type { Reading } from '../statistics/readings.ts';
import { summarize } from '../statistics/summarize.ts';
import { d2, d3 } from './constants.ts';
import { falseAlarmRate } from './false-alarms.ts';
import type { FalseAlarmRate } from './false-alarms.ts';
import { controlLimits } from './limits.ts';
import { describePhase, pointsOfPhase } from './phase.ts';
import type { Phase } from './phase.ts';
import { WESTERN_ELECTRIC_RULES } from './rules.ts';
import type { RunRule } from './rules.ts';
import { chartSeries } from './series.ts';
import type { ChartSeries } from './series.ts';
import type { FrozenProcess } from './subgroup-chart.ts';
import { judgeProcess } from './verdict.ts';
import type { ProcessVerdict } from './verdict.ts';

/** What a chart of single readings is drawn from. */
export interface IndividualsChartInput {
  readonly readings: readonly Reading[];
  readonly phase?: Phase;
  readonly frozen?: FrozenProcess;
  /** Rules of the readings (Western Electric unless told) and of the moving ranges (beyond the limits only). */
  readonly rules?: { readonly individuals?: readonly RunRule[]; readonly movingRanges?: readonly RunRule[] };
}

/** Chart of individuals and moving ranges of two. */
export interface IndividualsChart {
  readonly method: 'individuals-and-moving-range';
  readonly n: number;
  readonly limitsFrom: string;
  readonly centre: number;
  /** Mean of the moving ranges that make the limits. */
  readonly meanMovingRange: number;
  readonly sigmaWithin: number;
  readonly sigmaMethod: 'mean moving range over d2' | 'frozen';
  readonly individuals: ChartSeries;
  readonly movingRanges: ChartSeries;
  readonly verdict: ProcessVerdict;
  /** How often the rules on the chart of readings signal by chance alone, its points taken as normal. */
  readonly falseAlarms: FalseAlarmRate | Undetermined;
}

/** |x(i) − x(i−1)| exactly from the decimals, so that equal steps give equal ranges. */
function movingRangesOf(exact: { readonly deviations: readonly bigint[]; readonly scale: number }): number[] {
  return exact.deviations.slice(1).map((deviation, index) => {
    const difference = deviation - (exact.deviations[index] as bigint);
    return Number(`${difference < 0n ? -difference : difference}e-${exact.scale}`);
  });
}

/**
 * Chart of individual readings and their moving ranges of two.
 *
 * Centre x̄, σ = MR̄/d2(2) with the exact d2 = 2/√π = 1.12838 (tables print 1.128, which moves a limit by 0.03 %), limits
 * x̄ ± 3σ; moving ranges d2σ ± 3d3σ, not below 0. A moving range counts for the limits when both its readings do.
 * Source: ISO 7870-2:2013; NIST/SEMATECH e-Handbook 6.3.2.2.
 * @param input readings in time order, at least 2 in the phase that makes the limits
 */
export function individualsChart(input: IndividualsChartInput): IndividualsChart | Undetermined {
  const { readings, frozen } = input;
  const exact = readExactly(readings);
  if ('undetermined' in exact) return exact;
  const n = readings.length;
  const chosen = pointsOfPhase(input.phase, n);
  if (isUndetermined(chosen)) return chosen;
  const movingRanges = movingRangesOf(exact);
  const inPhase = new Set(chosen);
  const forLimits = movingRanges.filter((_range, index) => inPhase.has(index) && inPhase.has(index + 1));
  if (frozen === undefined && forLimits.length === 0)
    return undetermined('too-few', 'Limits of individuals need at least two readings that follow each other');
  const summary = summarize(chosen.map((index) => readings[index] as Reading));
  if (isUndetermined(summary)) return summary;
  const meanMovingRange = forLimits.reduce((sum, range) => sum + range, 0) / Math.max(1, forLimits.length);
  const sigmaWithin = frozen?.sigmaWithin ?? meanMovingRange / d2(2);
  const centre = frozen?.centre ?? summary.mean;
  if (!Number.isFinite(centre))
    return undetermined('not-finite', 'The frozen centre line is not a finite number');
  if (!(sigmaWithin > 0 && sigmaWithin < Infinity))
    return undetermined(
      'no-variation',
      'No reading differs from the one before: limits at three sigma need some spread',
    );
  const limits = controlLimits(centre, sigmaWithin);
  const rangeLimits = controlLimits(d2(2) * sigmaWithin, d3(2) * sigmaWithin, { lowest: 0 });
  const individuals = chartSeries(
    'individual',
    exact.numbers.map((value, index) => ({ point: index + 1, value, size: 1, limits })),
    input.rules?.individuals ?? WESTERN_ELECTRIC_RULES,
  );
  if (isUndetermined(individuals)) return individuals;
  const ranges = chartSeries(
    'moving-range',
    movingRanges.map((value, index) => ({ point: index + 2, value, size: 2, limits: rangeLimits })),
    input.rules?.movingRanges ?? ['beyond-three-sigma'],
  );
  if (isUndetermined(ranges)) return ranges;
  return {
    method: 'individuals-and-moving-range',
    n,
    limitsFrom: frozen === undefined ? describePhase(input.phase, n) : 'frozen before',
    centre,
    meanMovingRange,
    sigmaWithin,
    sigmaMethod: frozen === undefined ? 'mean moving range over d2' : 'frozen',
    individuals,
    movingRanges: ranges,
    verdict: judgeProcess([individuals, ranges]),
    falseAlarms: falseAlarmRate(individuals.rules),
  };
}
