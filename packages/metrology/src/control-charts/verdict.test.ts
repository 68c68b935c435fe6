import { describe, expect, it } from 'vitest';
import { isUndetermined } from '../result.ts';
import { attributeChart } from './attribute-chart.ts';
import type { AttributeChartInput } from './attribute-chart.ts';
import { controlLimits } from './limits.ts';
import { describePhase, pointsOfPhase } from './phase.ts';
import { chartSeries } from './series.ts';
import type { RunRule } from './rules.ts';
import { judgeProcess } from './verdict.ts';

function seriesOf(values: readonly number[], rules: readonly RunRule[] = ['beyond-three-sigma']) {
  const limits = controlLimits(0, 1);
  const points = values.map((value, index) => ({ point: index + 1, value, size: 1, limits }));
  const series = chartSeries('individual', points, rules);
  if (isUndetermined(series)) throw new Error(series.reason);
  return series;
}
const quiet = Array.from({ length: 20 }, (_, index) => (index % 2 === 0 ? 0.5 : -0.5));

describe('the verdict on a process', () => {
  it('calls twenty points without a signal in control, nineteen too few', () => {
    expect(judgeProcess([seriesOf(quiet)])).toEqual({
      state: 'in-control',
      reasons: ['No signal of 1 rule in 20 points'],
    });
    expect(judgeProcess([seriesOf(quiet.slice(1))])).toEqual({
      state: 'too-few',
      reasons: ['19 points show no signal, but 20 are needed to call a process in control'],
    });
    expect(judgeProcess([seriesOf(quiet.slice(1))], 19).state).toBe('in-control');
    expect(judgeProcess([]).state).toBe('too-few');
  });

  it('counts each rule once over all charts', () => {
    const both = [seriesOf(quiet), seriesOf(quiet, ['beyond-three-sigma', 'six-in-trend'])];
    expect(judgeProcess(both).reasons).toEqual(['No signal of 2 rules in 20 points']);
  });

  it('names chart, rule and points of every signal, however few points there are', () => {
    expect(judgeProcess([seriesOf([0, 4, 0])])).toEqual({
      state: 'not-in-control',
      reasons: ['individual: one point beyond a control limit (3 sigma) at point 2'],
    });
    expect(judgeProcess([seriesOf([4, 0, -4])]).reasons[0]).toMatch(/ at points 1, 3$/);
    expect(judgeProcess([seriesOf(Array<number>(8).fill(4))]).reasons[0]).toMatch(
      /points 1, 2, 3, 4, 5, 6, 7, 8$/,
    );
    expect(judgeProcess([seriesOf(Array<number>(11).fill(4))]).reasons[0]).toMatch(/6, 7, 8 and 3 more$/);
  });

  it('does not overlook a point beyond a limit when that rule was not chosen', () => {
    expect(judgeProcess([seriesOf([0, 4, 0], ['six-in-trend'])])).toEqual({
      state: 'not-in-control',
      reasons: ['individual: beyond a control limit at point 2'],
    });
    expect(judgeProcess([seriesOf([0, 4, 0])]).reasons).toHaveLength(1);
  });
});

describe('limits', () => {
  it('are three sigma about the centre, cut at the ends of the statistic', () => {
    expect(controlLimits(10, 2)).toEqual({
      kind: 'control-limits',
      lower: 4,
      centre: 10,
      upper: 16,
      sigma: 2,
    });
    expect(controlLimits(1, 2, { lowest: 0 })).toMatchObject({ lower: 0, upper: 7 });
    expect(controlLimits(0.9, 0.1, { lowest: 0, highest: 1 })).toMatchObject({ upper: 1 });
    const p = attributeChart({ kind: 'p', counts: [9, 8], sizes: 10 });
    const np = attributeChart({ kind: 'np', counts: [9, 8], sizes: 10 });
    if (isUndetermined(p) || isUndetermined(np)) throw new Error('no chart');
    expect(p.series.points[0]?.limits.upper).toBe(1);
    expect(np.series.points[0]?.limits.upper).toBe(10);
    expect([p.series.statistic, np.series.statistic]).toEqual(['fraction', 'count']);
  });

  it('a point below the lower limit is beyond, one on it is not', () => {
    expect(seriesOf([-3, -3.001, 3, 3.001]).beyond).toEqual([2, 4]);
  });
});

describe('a phase', () => {
  it('is all points unless told, and says which', () => {
    expect(pointsOfPhase(undefined, 3)).toEqual([0, 1, 2]);
    expect(pointsOfPhase({ from: 2, to: 9, exclude: [3] }, 4)).toEqual([1, 3]);
    expect(describePhase(undefined, 3)).toBe('all points');
    expect(describePhase({ to: 2 }, 3)).toBe('points 1 to 2');
    expect(describePhase({ from: 2 }, 3)).toBe('points 2 to 3');
    expect(describePhase({ to: 9 }, 3)).toBe('all points');
    expect(describePhase({ from: 2, to: 9, exclude: [3, 2] }, 5)).toBe('points 2 to 5 without 2, 3');
  });

  it.each([
    [{ from: 0 }, 'outside-domain'],
    [{ from: 1.5 }, 'outside-domain'],
    [{ to: 2.5 }, 'outside-domain'],
    [{ from: 3, to: 2 }, 'outside-domain'],
    [{ from: 7, to: 8 }, 'too-few'],
    [{ exclude: [1, 2, 3] }, 'too-few'],
  ])('%j is refused as %s', (phase, code) => {
    expect(pointsOfPhase(phase, 3)).toMatchObject({ code });
    expect(pointsOfPhase(undefined, 0)).toMatchObject({ code: 'too-few' });
  });
});

describe('counts', () => {
  const known = (input: AttributeChartInput) => {
    const result = attributeChart(input);
    if (isUndetermined(result)) throw new Error(result.reason);
    return result;
  };

  it('take a frozen centre as it is', () => {
    const chart = known({ kind: 'u', counts: [3, 30], sizes: 2, frozenCentre: 2 });
    expect(chart).toMatchObject({ average: 2, limitsFrom: 'frozen before', method: 'u', samples: 2 });
    expect(chart.series.points.map(({ value }) => value)).toEqual([1.5, 15]);
    expect(chart.series.beyond).toEqual([2]);
    expect(known({ kind: 'c', counts: [3, 4], phase: { to: 1 } }).limitsFrom).toBe('points 1 to 1');
    expect(attributeChart({ kind: 'p', counts: [1, 2], sizes: 9, frozenCentre: 1 })).toMatchObject({
      code: 'no-variation',
    });
  });

  it('measure dispersion between neighbours of the phase only', () => {
    const d2 = 2 / Math.sqrt(Math.PI);
    expect(known({ kind: 'c', counts: [4] }).dispersion).toBeNull();
    // c̄ = 4, σ = 2: the z values are 0, 1, −1, and their moving ranges 1 and 2.
    expect(known({ kind: 'c', counts: [4, 6, 2] }).dispersion).toBeCloseTo(1.5 / d2, 12);
    expect(known({ kind: 'c', counts: [4, 90, 6, 2], phase: { exclude: [2] } }).dispersion).toBeCloseTo(
      2 / d2,
      12,
    );
    expect(attributeChart({ kind: 'u', counts: [4, 4], sizes: 1, laney: true })).toMatchObject({
      code: 'too-few',
    });
    expect(attributeChart({ kind: 'np', counts: [4, 5], sizes: 9, laney: true })).toMatchObject({
      code: 'outside-domain',
    });
  });

  it('apply the rules chosen', () => {
    const chart = known({ kind: 'c', counts: [1, 2, 3, 4, 5, 6], rules: ['six-in-trend'] });
    expect(chart.series.signals).toMatchObject([{ rule: 'six-in-trend', point: 6, side: 'above' }]);
    expect(known({ kind: 'c', counts: [1, 2, 3, 4, 5, 6] }).series.rules).toEqual(['beyond-three-sigma']);
  });

  it.each([0, -1, NaN, Infinity])('refuse a size of %d', (size) => {
    expect(attributeChart({ kind: 'u', counts: [1, 2], sizes: [1, size] })).toMatchObject({
      code: 'outside-domain',
      reason: 'The size of sample 2 must be a number above 0',
    });
    expect(attributeChart({ kind: 'p', counts: [1, 2], sizes: [5, size] })).toMatchObject({
      reason: 'The size of sample 2 must be a whole number above 0',
    });
  });
});
