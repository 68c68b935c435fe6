import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import type { ChartPoint } from './limits.ts';
import type { RunRule } from './rules.ts';
import { applyRunRules, lineSlack } from './run-rules.ts';
import type { Signal } from './run-rules.ts';

/** What a line of points on a chart shows. */
export type Statistic =
  'mean' | 'median' | 'individual' | 'range' | 'deviation' | 'moving-range' | 'fraction' | 'count' | 'rate';

/** One of the (one or two) charts of a control chart: points, limits and the signals of the rules chosen. */
export interface ChartSeries {
  readonly statistic: Statistic;
  readonly points: readonly ChartPoint[];
  /** Points strictly beyond a control limit; a point on a limit is not beyond it. */
  readonly beyond: readonly number[];
  readonly rules: readonly RunRule[];
  readonly signals: readonly Signal[];
}

/** A point beyond one of its own limits, with room for the last digits of a double. */
function isBeyond({ value, limits }: ChartPoint): boolean {
  const slack = lineSlack(limits.centre, limits.sigma);
  return value > limits.upper + slack || value < limits.lower - slack;
}

/** Applies the rules to points whose limits may differ from point to point. */
export function chartSeries(
  statistic: Statistic,
  points: readonly ChartPoint[],
  rules: readonly RunRule[],
): ChartSeries | Undetermined {
  const beyond = points.filter(isBeyond).map(({ point }) => point);
  const signals = applyRunRules(
    points.map(({ value }) => value),
    { centre: points.map(({ limits }) => limits.centre), sigma: points.map(({ limits }) => limits.sigma) },
    rules,
  );
  if (isUndetermined(signals)) return signals;
  // Moving ranges begin at the second point of the chart, so positions in the list become points of the chart.
  const named = (position: number) => points[position - 1]?.point ?? position;
  return {
    statistic,
    points,
    beyond,
    rules,
    signals: signals.map((signal) => ({
      ...signal,
      point: named(signal.point),
      pattern: signal.pattern.map(named),
    })),
  };
}
