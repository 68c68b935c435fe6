import type { ChartSeries } from './series.ts';
import { RULE_STATEMENTS } from './rules.ts';

/** What a chart allows to say of the process. */
export type ProcessState = 'in-control' | 'not-in-control' | 'too-few';

/** The state with its reasons, each a sentence a person can act on. */
export interface ProcessVerdict {
  readonly state: ProcessState;
  readonly reasons: readonly string[];
}

/** Points from which limits may be trusted to show control: 20, common practice. */
export const POINTS_TO_SHOW_CONTROL = 20;

/** At most this many points are written out in a reason. */
const POINTS_NAMED = 8;

function nameThem(points: readonly number[]): string {
  const shown = points.slice(0, POINTS_NAMED).join(', ');
  const more = points.length - POINTS_NAMED;
  return `${points.length === 1 ? 'point' : 'points'} ${shown}${more > 0 ? ` and ${more} more` : ''}`;
}

function reasonsOf(series: ChartSeries): string[] {
  const reasons: string[] = [];
  for (const rule of series.rules) {
    const points = series.signals.filter((signal) => signal.rule === rule).map(({ point }) => point);
    if (points.length > 0)
      reasons.push(`${series.statistic}: ${RULE_STATEMENTS[rule]} at ${nameThem(points)}`);
  }
  if (!series.rules.includes('beyond-three-sigma') && series.beyond.length > 0)
    reasons.push(`${series.statistic}: beyond a control limit at ${nameThem(series.beyond)}`);
  return reasons;
}

/**
 * The verdict on a process from the charts drawn of it.
 *
 * Any signal on any chart: not in control, however few points there are. No signal but fewer than `pointsNeeded` points
 * (20, common practice): too few to say. Otherwise in control, which means that nothing speaks against it.
 */
export function judgeProcess(
  charts: readonly ChartSeries[],
  pointsNeeded: number = POINTS_TO_SHOW_CONTROL,
): ProcessVerdict {
  const reasons = charts.flatMap(reasonsOf);
  if (reasons.length > 0) return { state: 'not-in-control', reasons };
  const count = charts[0]?.points.length ?? 0;
  if (count < pointsNeeded)
    return {
      state: 'too-few',
      reasons: [
        `${count} points show no signal, but ${pointsNeeded} are needed to call a process in control`,
      ],
    };
  const rules = new Set(charts.flatMap((chart) => chart.rules)).size;
  return {
    state: 'in-control',
    reasons: [`No signal of ${rules} ${rules === 1 ? 'rule' : 'rules'} in ${count} points`],
  };
}
