import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import study from '../testing/reference/grr-aiag-average-range.json' with { type: 'json' };
import constants from '../testing/reference/grr-k-constants.json' with { type: 'json' };
import single from '../testing/reference/grr-single-operator.json' with { type: 'json' };
import biasCase from '../testing/reference/msa-bias-independent-sample.json' with { type: 'json' };
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { averageRangeStudy, d2Star } from './average-range-study.ts';
import { biasStudy } from './bias-study.ts';
import { arrangeCrossed } from './crossed-readings.ts';
import { singleAppraiserStudy } from './single-appraiser-study.ts';
import { stabilityStudy } from './stability-study.ts';

function sure<T>(answer: T | Undetermined): T {
  if (isUndetermined(answer)) throw new Error(answer.reason);
  return answer;
}

const near = (actual: number, expected: number, relative: number) =>
  expect(Math.abs(actual - expected)).toBeLessThanOrEqual(relative * Math.abs(expected));

/** The case lists appraiser, trial, part; the study wants part, appraiser, trial. */
const readings = study.inputs.data[0]?.[0]?.map((_, part) =>
  study.inputs.data.map((appraiser) => appraiser.map((trial) => trial[part] ?? NaN)),
) as number[][][];

describe('K constants', () => {
  it('come from d2 and d2* to six digits, and round to every printed value', () => {
    for (const [trials, value] of Object.entries(constants.expected.K1_exact))
      near(1 / d2Star(Number(trials), Infinity), value, 1e-6);
    for (const [parts, value] of Object.entries(constants.expected.K3_exact)) {
      near(1 / d2Star(Number(parts), 1), value, 1e-6);
      const printed = constants.published.K3[parts as keyof typeof constants.published.K3];
      expect((1 / d2Star(Number(parts), 1)).toFixed(4)).toBe(printed.toFixed(4));
    }
  });
});

describe('average-and-range study of the AIAG manual', () => {
  const result = sure(averageRangeStudy(readings));
  const { expected, published } = study;

  it('reproduces every figure; EV, AV and PV within the four digits of the printed K', () => {
    expected.range_mean_by_appraiser.forEach((value, place) =>
      near(result.meanRangeByAppraiser[place] ?? NaN, value, 1e-9),
    );
    expected.mean_by_appraiser.forEach((value, place) =>
      near(result.meanByAppraiser[place] ?? NaN, value, 1e-9),
    );
    expected.part_means.forEach((value, place) => near(result.partMeans[place] ?? NaN, value, 1e-9));
    near(result.meanRange, expected.r_double_bar, 1e-9);
    near(result.appraiserDifference, expected.x_diff, 1e-9);
    near(result.partRange, expected.part_range, 1e-9);
    near(result.rangeLimit, expected.ucl_range_D4, 1e-9);
    // The case uses K rounded to four decimals, this study the exact ones: up to 1.4e-4 apart, the shares a little more.
    near(result.repeatability.standardDeviation, expected.EV, 1.5e-4);
    near(result.reproducibility.standardDeviation, expected.AV, 1.5e-4);
    near(result.gauge.standardDeviation, expected.GRR, 1.5e-4);
    near(result.part.standardDeviation, expected.PV, 1.5e-4);
    near(result.total.standardDeviation, expected.TV, 1.5e-4);
    near(result.gauge.percentStudy, expected.pct_GRR, 3e-4);
    expect(result.distinctCategories).toBe(expected.ndc);
    expect(result.appraiserClipped).toBe(expected.av_clipped);
  });

  it('reproduces the case to nine digits with the K constants of the form', () => {
    const { K1, K2, K3 } = study.inputs;
    const form = sure(averageRangeStudy(readings, { printedConstants: { k1: K1, k2: K2, k3: K3 } }));
    near(form.repeatability.standardDeviation, expected.EV, 1e-9);
    near(form.reproducibility.standardDeviation, expected.AV, 1e-9);
    near(form.gauge.standardDeviation, expected.GRR, 1e-9);
    near(form.part.standardDeviation, expected.PV, 1e-9);
    near(form.total.standardDeviation, expected.TV, 1e-9);
    near(form.repeatability.percentStudy, expected.pct_EV, 1e-9);
    near(form.reproducibility.percentStudy, expected.pct_AV, 1e-9);
    near(form.gauge.percentStudy, expected.pct_GRR, 1e-9);
    near(form.part.percentStudy, expected.pct_PV, 1e-9);
    near(form.distinctCategoriesRaw, expected.ndc_raw, 1e-9);
    expect(form.method).toContain('printed form');
  });

  it('agrees with the printed report within its rounded intermediate values', () => {
    expect(Math.abs(result.gauge.percentStudy - published.pct_GRR)).toBeLessThan(published.pct_tolerance_abs);
    expect(Math.abs(result.part.percentStudy - published.pct_PV)).toBeLessThan(published.pct_tolerance_abs);
    expect(Math.abs(result.repeatability.standardDeviation - published.EV)).toBeLessThan(
      published.tolerance_abs,
    );
    expect(result.verdict).toMatchObject({ verdict: 'conditional' });
  });

  it('gives categories of 5 where the analysis of variance gives 4, and names ranges above the limit', () => {
    expect(result.distinctCategories).toBe(5);
    expect(result.rangesAboveLimit).toEqual([
      { part: 4, appraiser: 2, range: expect.closeTo(1.02, 12) as number },
    ]);
  });

  it('scales with the unit and ignores the origin', () => {
    fc.assert(
      fc.property(fc.integer({ min: -1000, max: 1000 }), fc.constantFrom(0.5, 4, 25.4), (shift, scale) => {
        const moved = sure(
          averageRangeStudy(readings.map((row) => row.map((cell) => cell.map((x) => (x + shift) * scale)))),
        );
        expect(moved.gauge.standardDeviation / scale).toBeCloseTo(result.gauge.standardDeviation, 8);
        expect(moved.gauge.percentStudy).toBeCloseTo(result.gauge.percentStudy, 6);
      }),
      { numRuns: 40 },
    );
  });

  it('sets a negative appraiser variance to 0', () => {
    const alike = readings.map((row) => row.map(() => row[0] ?? []));
    const same = sure(averageRangeStudy(alike));
    expect(same.appraiserClipped).toBe(true);
    expect(same.appraiser.variance).toBe(0);
  });

  it('refuses one trial, one appraiser and readings all alike', () => {
    expect(averageRangeStudy(readings.map((row) => row.map((cell) => cell.slice(0, 1))))).toMatchObject({
      code: 'study-size',
    });
    expect(averageRangeStudy(readings.map((row) => row.slice(0, 1)))).toMatchObject({ code: 'study-size' });
    expect(
      averageRangeStudy([
        [
          [1, 1],
          [1, 1],
        ],
        [
          [1, 1],
          [1, 1],
        ],
      ]),
    ).toMatchObject({ code: 'no-variation' });
  });
});

describe('recorded readings', () => {
  it('are arranged by part and appraiser, and a missing one is named', () => {
    const records = readings.flatMap((row, part) =>
      row.flatMap((cell, appraiser) =>
        cell.map((value) => ({ part: `P${part}`, appraiser: `A${appraiser}`, value })),
      ),
    );
    expect(sure(arrangeCrossed(records)).readings).toEqual(readings);
    expect(arrangeCrossed(records.slice(0, -1))).toMatchObject({
      code: 'unbalanced',
      reason: 'Part P9 has 2 readings by A2 where other cells have 3',
    });
    expect(arrangeCrossed([])).toMatchObject({ code: 'too-few' });
  });
});

describe('one appraiser, 20 parts read twice (Montgomery 8.7)', () => {
  const { data, lsl, usl, d2_used: printedFactor } = single.inputs;
  const result = sure(singleAppraiserStudy(data, { tolerance: { lower: lsl, upper: usl } }));

  it('reproduces the case, with the exact d2 where the book uses 1.128', () => {
    near(result.mean, single.expected.mean, 1e-9);
    near(result.meanRange, single.expected.r_bar, 1e-9);
    near(result.repeatability, single.expected.sigma_gauge_exact_d2, 1e-9);
    near(result.meanRange / printedFactor, single.expected.sigma_gauge, 1e-9);
    near(result.totalVariance, single.expected.total_variance, 1e-9);
    expect(Math.abs(sure(result.precisionToTolerance) - single.published.p_to_t)).toBeLessThan(0.001);
    expect(Math.abs(sure(result.partShare) - single.published.rho_part)).toBeLessThan(
      single.published.tolerance_abs,
    );
  });

  it('refuses unbalanced and single readings', () => {
    expect(singleAppraiserStudy([[1, 2], [1]])).toMatchObject({ code: 'unbalanced' });
    expect(singleAppraiserStudy([[1], [2]])).toMatchObject({ code: 'study-size' });
    expect(
      singleAppraiserStudy([
        [1, 2],
        [1, NaN],
      ]),
    ).toMatchObject({ code: 'not-finite' });
    expect(result).toMatchObject({ n: 40 });
  });
});

describe('bias of one part, 15 readings (AIAG)', () => {
  const { x, reference, df, d2, d2_star: d2Printed } = biasCase.inputs;
  const { expected, tolerance } = biasCase;

  it('reproduces the study by standard deviation', () => {
    const result = sure(biasStudy(x, reference));
    near(result.mean, expected.mean, tolerance.rel);
    near(result.bias, expected.bias, tolerance.rel);
    near(result.repeatability, expected.s, tolerance.rel);
    near(result.t, expected.t_s, tolerance.rel);
    near(result.lower, expected.ci_s[0] ?? NaN, tolerance.rel);
    near(result.upper, expected.ci_s[1] ?? NaN, tolerance.rel);
    expect(result.biasNotShown).toBe(expected.bias_is_zero_accepted);
  });

  it('reproduces the study by range with the printed constants, and finds 10.8 degrees of freedom itself', () => {
    const result = sure(
      biasStudy(x, reference, {
        spread: 'range',
        tableConstants: { d2, d2Star: d2Printed, degreesOfFreedom: df },
      }),
    );
    near(result.repeatability, expected.sigma_r_range, tolerance.rel);
    near(result.standardError, expected.sigma_bias_range, tolerance.rel);
    near(result.t, expected.t_range, tolerance.rel);
    near(result.tCritical, expected.t_critical, tolerance.rel);
    near(result.lower, expected.ci_range_with_d2star_ratio[0] ?? NaN, tolerance.rel);
    near(result.upper, expected.ci_range_with_d2star_ratio[1] ?? NaN, tolerance.rel);
    const exact = sure(biasStudy(x, reference, { spread: 'range' }));
    expect(exact.degreesOfFreedom).toBeCloseTo(10.8, 1);
    // The printed d2 3.47193 and d2* 3.55333 are up to 1e-4 above the exact 3.47183 and 3.55323.
    near(exact.repeatability, expected.sigma_r_range, 3e-5);
    expect(exact.lower).toBeCloseTo(expected.ci_range_with_d2star_ratio[0] ?? NaN, 3);
  });

  it('shows a bias of the size of the spread, in per cent of the process', () => {
    const result = sure(
      biasStudy(
        x.map((value) => value + 0.2),
        reference,
        { processDeviation: 2.5 },
      ),
    );
    expect(result.biasNotShown).toBe(false);
    expect(sure(result.percentOfProcess)).toBeCloseTo((100 * result.bias) / 15, 10);
    expect(sure(biasStudy(x, reference)).percentOfProcess).toMatchObject({ code: 'no-process' });
  });

  it('refuses a single reading, readings alike and a bad alpha', () => {
    expect(biasStudy([6], 6)).toMatchObject({ code: 'too-few' });
    expect(biasStudy([6, 6, 6], 6)).toMatchObject({ code: 'no-variation' });
    expect(biasStudy(x, NaN)).toMatchObject({ code: 'not-finite' });
    expect(biasStudy(x, 6, { alpha: 0 })).toMatchObject({ code: 'alpha' });
    expect(
      biasStudy(
        Array.from({ length: 26 }, (_, i) => i),
        6,
        { spread: 'range' },
      ),
    ).toMatchObject({ code: 'too-many' });
  });
});

describe('stability of a master part', () => {
  const occasions = Array.from({ length: 20 }, (_, day) =>
    [0, 1, 2].map((k) => 10 + 0.01 * (((day * 7 + k * 5) % 11) - 5)),
  );

  it('is stable when the means scatter, with limits from sbar and c4', () => {
    const result = sure(stabilityStudy(occasions, 10));
    expect(result.verdict).toBe('stable');
    // A3 = 1.954 and B4 = 2.568 for subgroups of three (ASTM MNL 7 table).
    expect((result.meanLimits.upper - result.meanLimits.centre) / result.deviationLimits.centre).toBeCloseTo(
      1.954,
      3,
    );
    expect(result.deviationLimits.upper / result.deviationLimits.centre).toBeCloseTo(2.568, 3);
    expect(result.deviationLimits.lower).toBe(0);
    expect(sure(result.bias)).toBeCloseTo(result.meanLimits.centre - 10, 12);
  });

  it('names the occasion that jumps, and a drift', () => {
    const jump = occasions.map((readings, day) => (day === 6 ? readings.map((x) => x + 0.2) : readings));
    expect(sure(stabilityStudy(jump)).reasons).toContain('Mean of occasion 7 beyond its control limit');
    const drift = sure(
      stabilityStudy(occasions.map((readings, day) => readings.map((x) => x + 0.002 * day))),
    );
    expect(drift.reasons).toContain('The means drift');
    expect(drift.drift).toBeCloseTo(0.002, 3);
    const loose = occasions.map((readings, day) => (day === 3 ? [9.8, 10, 10.2] : readings));
    expect(sure(stabilityStudy(loose)).reasons).toContain('Deviation of occasion 4 beyond its control limit');
  });

  it('refuses few occasions, unequal ones and a silent gauge', () => {
    expect(stabilityStudy(occasions.slice(0, 9))).toMatchObject({ code: 'too-few' });
    expect(stabilityStudy([...occasions, [1]])).toMatchObject({ code: 'unbalanced' });
    expect(stabilityStudy(occasions.map(() => [1, 1]))).toMatchObject({ code: 'no-variation' });
    expect(stabilityStudy([...occasions, [1, NaN, 1]])).toMatchObject({ code: 'not-finite' });
  });
});
