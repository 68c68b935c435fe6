import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import bottle from '../testing/reference/chart-bottle-strength.json';
import moisture from '../testing/reference/chart-ishikawa-moisture.json';
import piston from '../testing/reference/chart-piston-ring.json';
import plug from '../testing/reference/chart-plug-radius.json';
import unequal from '../testing/reference/chart-unequal-subgroups.json';
import flow from '../testing/reference/nist-imr-flowrate.json';
import { relativeError } from '../testing/relative-error.ts';
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { summarize } from '../statistics/summarize.ts';
import { individualsChart } from './individuals-chart.ts';
import { subgroupChart } from './subgroup-chart.ts';
import type { SubgroupChartInput } from './subgroup-chart.ts';
import { subgroupSpread } from './subgroups.ts';

function known<T>(result: T | Undetermined): T {
  if (isUndetermined(result)) throw new Error(result.reason);
  return result;
}
const near = (found: number | null | undefined, expected: number, tolerance = 1e-9) =>
  expect(relativeError(found ?? NaN, expected)).toBeLessThan(tolerance);
const chart = (input: SubgroupChartInput) => known(subgroupChart(input));

interface Expected {
  grand_mean: number;
  r_bar: number;
  s_bar: number;
  sigma_from_r: number;
  sigma_from_s: number;
  pooled_s: number;
  xbar_r: { ucl: number; lcl: number };
  r: { ucl: number; cl: number; lcl: number };
  xbar_s: { ucl: number; lcl: number };
  s?: { ucl: number; cl: number; lcl: number };
  xbar_beyond_r_limits_1based: number[];
  range_beyond_limits_1based: number[];
}

const cases: [string, number[][], Expected, number[]][] = [
  ['bottle strength', bottle.inputs.data, bottle.expected, []],
  ['Ishikawa moisture', moisture.inputs.data, moisture.expected, []],
  ['piston ring', piston.inputs.data, piston.expected, []],
  ['plug radius, first pass', plug.inputs.data, plug.expected.first_pass, []],
];

describe.each(cases)('%s', (_name, subgroups, expected) => {
  it('means and ranges', () => {
    const result = chart({ kind: 'mean-and-range', subgroups });
    near(result.centre, expected.grand_mean);
    near(result.meanSpread, expected.r_bar);
    near(result.sigmaWithin, expected.sigma_from_r);
    near(result.location.points[0]?.limits.upper, expected.xbar_r.ucl);
    near(result.location.points[0]?.limits.lower, expected.xbar_r.lcl);
    near(result.spread.points[0]?.limits.upper, expected.r.ucl);
    expect(result.spread.points[0]?.limits.lower).toBe(expected.r.lcl);
    expect(result.location.beyond).toEqual(expected.xbar_beyond_r_limits_1based);
    expect(result.spread.beyond).toEqual(expected.range_beyond_limits_1based);
  });

  it('means and deviations', () => {
    const result = chart({ kind: 'mean-and-deviation', subgroups });
    near(result.meanSpread, expected.s_bar);
    near(result.sigmaWithin, expected.sigma_from_s);
    near(result.within?.pooled, expected.pooled_s);
    near(result.location.points[0]?.limits.upper, expected.xbar_s.ucl);
    near(result.location.points[0]?.limits.lower, expected.xbar_s.lcl);
    if (expected.s !== undefined) near(result.spread.points[0]?.limits.upper, expected.s.ucl);
  });
});

it('describes each piston ring subgroup, its overall deviation and the printed figures', () => {
  const result = chart({ kind: 'mean-and-range', subgroups: piston.inputs.data });
  piston.expected.subgroup_mean.forEach((value, index) => near(result.location.points[index]?.value, value));
  piston.expected.subgroup_range.forEach((value, index) => near(result.spread.points[index]?.value, value));
  near(known(summarize(piston.inputs.data.flat())).standardDeviation as number, piston.expected.overall_s);
  const { published } = piston;
  expect(Math.abs((result.location.points[0]?.limits.upper ?? NaN) - published.xbar_ucl)).toBeLessThan(
    published.tolerance_abs,
  );
  expect(Math.abs((result.spread.points[0]?.limits.upper ?? NaN) - published.r_ucl)).toBeLessThan(
    published.tolerance_abs,
  );
  expect(result.verdict.state).toBe('in-control');
  expect(result.falseAlarms).toMatchObject({ rules: result.location.rules });
  near(known(result.falseAlarms).averageRunLength, 91.75077312835, 1e-11);
});

describe('limits from a phase', () => {
  it('leaves out the three low plug subgroups, which stay on the chart', () => {
    const { after_removal: expected } = plug.expected;
    const exclude = plug.inputs.removed_subgroups_1based;
    const result = chart({ kind: 'mean-and-range', subgroups: plug.inputs.data, phase: { exclude } });
    near(result.centre, expected.grand_mean);
    near(result.sigmaWithin, expected.sigma_from_r);
    near(result.location.points[0]?.limits.upper, expected.xbar_r.ucl);
    near(result.location.points[0]?.limits.lower, expected.xbar_r.lcl);
    near(result.spread.points[0]?.limits.upper, expected.r.ucl);
    expect(result.location.beyond).toEqual([18, 19, 20]);
    expect(result.limitsFrom).toBe('all points without 18, 19, 20');
    expect(result.verdict.state).toBe('not-in-control');
    expect(result.verdict.reasons[0]).toContain('points 18, 19, 20');
  });

  it('equals frozen limits of the same centre and deviation', () => {
    const phase = chart({ kind: 'mean-and-range', subgroups: plug.inputs.data, phase: { to: 17 } });
    const frozen = chart({
      kind: 'mean-and-range',
      subgroups: plug.inputs.data,
      frozen: { centre: phase.centre, sigmaWithin: phase.sigmaWithin },
    });
    expect(frozen.location).toEqual(phase.location);
    expect(frozen).toMatchObject({ limitsFrom: 'frozen before', sigmaMethod: 'frozen', within: null });
  });

  it('says why limits cannot be drawn', () => {
    const input: SubgroupChartInput = {
      kind: 'mean-and-range',
      subgroups: [
        [1, 2],
        [2, 3],
      ],
    };
    expect(subgroupChart({ ...input, phase: { from: 5 } })).toMatchObject({ code: 'outside-domain' });
    expect(subgroupChart({ ...input, phase: { exclude: [1, 2] } })).toMatchObject({ code: 'too-few' });
    expect(subgroupChart({ ...input, subgroups: [[1, 2], [2]] })).toMatchObject({
      reason: 'Subgroup 2 has 1 readings: it needs at least 2',
    });
    expect(
      subgroupChart({
        ...input,
        subgroups: [
          ['1', '2'],
          ['2', 'x'],
        ],
      }),
    ).toMatchObject({
      reason: expect.stringMatching(/^Subgroup 2, Reading 2:/) as string,
    });
    expect(
      subgroupChart({
        ...input,
        subgroups: [
          [1, 1],
          [2, 2],
        ],
      }),
    ).toMatchObject({ code: 'no-variation' });
    const large = [Array.from({ length: 30 }, (_, index) => index)];
    expect(subgroupChart({ ...input, subgroups: large })).toMatchObject({ code: 'outside-table' });
    expect(chart({ kind: 'mean-and-deviation', subgroups: large }).verdict.state).toBe('too-few');
  });
});

it('estimates the deviation within unequal subgroups four ways', () => {
  const { subgroups } = unequal.inputs;
  const within = known(subgroupSpread(subgroups));
  near(within.pooled, unequal.expected.pooled_s);
  near(within.pooledUnbiased, unequal.expected.pooled_s_unbiased);
  near(within.fromRanges, unequal.expected.mean_R_over_d2);
  near(within.fromDeviations, unequal.expected.mean_s_over_c4);
  expect(within.degreesOfFreedom).toBe(unequal.expected.df);
  const sizes = chart({ kind: 'mean-and-deviation', subgroups, estimator: 'pooled' }).location.points;
  expect((sizes[1]?.limits.upper ?? 0) > (sizes[2]?.limits.upper ?? 0)).toBe(true);
});

it('draws medians with the factor A6 (0.691 for five, common tables)', () => {
  const result = chart({ kind: 'median-and-range', subgroups: moisture.inputs.data });
  const reach = (result.location.points[0]?.limits.upper ?? NaN) - result.centre;
  expect(Math.abs(reach / result.meanSpread - 0.691)).toBeLessThan(0.0006);
  expect(result.location.points[0]?.value).toBe(13.1);
});

describe('individuals and moving ranges', () => {
  it('reproduces the flow rates with the exact d2', () => {
    const result = known(individualsChart({ readings: flow.inputs.x }));
    const expected = flow.expected.with_exact_d2;
    near(result.centre, expected.mean);
    near(result.meanMovingRange, expected.mr_bar);
    near(result.sigmaWithin, expected.sigma_within);
    near(result.individuals.points[0]?.limits.upper, expected.x_ucl);
    near(result.individuals.points[0]?.limits.lower, expected.x_lcl);
    near(result.movingRanges.points[0]?.limits.upper, expected.mr_ucl);
    expect(result.movingRanges.points.map(({ value }) => value)).toEqual(flow.expected.with_d2_1_128.mr);
    expect(result.movingRanges.points[0]?.point).toBe(2);
    expect(result.verdict.state).toBe('too-few');
  });

  it('reproduces the printed limits when the rounded d2 = 1.128 of the handbook is frozen in', () => {
    const { mean, mr_bar: meanRange } = flow.expected.with_d2_1_128;
    const result = known(
      individualsChart({ readings: flow.inputs.x, frozen: { centre: mean, sigmaWithin: meanRange / 1.128 } }),
    );
    near(result.individuals.points[0]?.limits.upper, flow.expected.with_d2_1_128.x_ucl);
    expect(Math.abs((result.individuals.points[0]?.limits.lower ?? NaN) - flow.published.lcl)).toBeLessThan(
      6e-5,
    );
  });

  it('names the points of a signal on moving ranges by the chart, not by the list', () => {
    const readings = ['1.0', '1.1', '1.0', '1.1', '1.0', '9.0', '1.1', '1.0', '1.1', '1.0', '1.1', '1.0'];
    const result = known(individualsChart({ readings, phase: { to: 5 } }));
    expect(result.movingRanges.beyond).toEqual([6, 7]);
    expect(result.movingRanges.signals.map(({ point }) => point)).toEqual([6, 7]);
  });

  it('drops the moving ranges next to a reading left out', () => {
    const result = known(individualsChart({ readings: [1, 2, 100, 2, 1, 3], phase: { exclude: [3] } }));
    expect(result.meanMovingRange).toBeCloseTo((1 + 1 + 2) / 3, 14);
    expect(individualsChart({ readings: [2, 2, 2] })).toMatchObject({ code: 'no-variation' });
    expect(individualsChart({ readings: [2] })).toMatchObject({ code: 'too-few' });
  });
});

it('shift and scale move every line of a chart with the readings', () => {
  const readings = fc.array(fc.array(fc.integer({ min: -500, max: 500 }), { minLength: 4, maxLength: 4 }), {
    minLength: 3,
    maxLength: 8,
  });
  fc.assert(
    fc.property(readings, fc.integer({ min: -9000, max: 9000 }), (subgroups, shift) => {
      const before = subgroupChart({ kind: 'mean-and-range', subgroups });
      const moved = subgroups.map((group) => group.map((x) => `${((x + shift) / 100).toFixed(2)}`));
      const after = subgroupChart({ kind: 'mean-and-range', subgroups: moved });
      if (isUndetermined(before) || isUndetermined(after))
        return expect(isUndetermined(after)).toBe(isUndetermined(before));
      expect(Math.abs(after.sigmaWithin * 100 - before.sigmaWithin)).toBeLessThan(1e-10);
      expect(after.location.beyond).toEqual(before.location.beyond);
      expect(after.verdict.state).toBe(before.verdict.state);
    }),
  );
});
