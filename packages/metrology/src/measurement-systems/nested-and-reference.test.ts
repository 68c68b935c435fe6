import { describe, expect, it } from 'vitest';
import checkCase from '../testing/reference/nist-gauge-check-standard-140.json' with { type: 'json' };
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { checkStandardStudy } from './check-standard.ts';
import { linearityStudy } from './linearity-study.ts';
import { nestedGaugeStudy } from './nested-study.ts';
import { observedStep, resolutionCheck } from './resolution.ts';

function sure<T>(answer: T | Undetermined): T {
  if (isUndetermined(answer)) throw new Error(answer.reason);
  return answer;
}

describe('NIST check standard 140 (e-Handbook 2.4.4.1)', () => {
  const { run, day_average: means, within_day_sd: spreads, repeats_per_day: repeats } = checkCase.inputs;
  const runs = [1, 2].map((number) =>
    means.flatMap((mean, place) =>
      run[place] === number ? [{ mean, standardDeviation: spreads[place] ?? NaN }] : [],
    ),
  );

  it('reproduces the three levels and sets the negative day component to 0', () => {
    const result = sure(checkStandardStudy(runs, repeats));
    const { expected } = checkCase;
    expect(result.level1).toBeCloseTo(expected.level1, 8);
    expect(result.level2).toBeCloseTo(expected.level2, 8);
    expect(result.level3).toBeCloseTo(expected.level3, 8);
    expected.level1_by_run.forEach((value, place) => expect(result.level1ByRun[place]).toBeCloseTo(value, 8));
    expected.level2_by_run.forEach((value, place) => expect(result.level2ByRun[place]).toBeCloseTo(value, 8));
    expect(result.dayVarianceBeforeClipping).toBeCloseTo(expected.day_variance_component, 9);
    expect(result.dayVariance).toBe(0);
    expect(result.runVariance).toBeCloseTo(expected.run_variance_component, 9);
  });

  it('refuses an unbalanced study', () => {
    expect(checkStandardStudy([runs[0] ?? [], (runs[1] ?? []).slice(1)], repeats)).toMatchObject({
      code: 'unbalanced',
    });
    expect(checkStandardStudy(runs, 1)).toMatchObject({ code: 'too-few' });
    expect(
      checkStandardStudy(
        [
          [
            { mean: NaN, standardDeviation: 1 },
            { mean: 1, standardDeviation: 1 },
          ],
          runs[0]?.slice(0, 2) ?? [],
        ],
        2,
      ),
    ).toMatchObject({ code: 'not-finite' });
  });
});

describe('nested study for destructive tests', () => {
  // Two appraisers, two parts each, two trials; every square can be followed by hand.
  const readings = [
    [
      [10, 12],
      [14, 16],
    ],
    [
      [20, 22],
      [28, 30],
    ],
  ];

  it('gives the mean squares that hand arithmetic gives', () => {
    const result = sure(nestedGaugeStudy(readings));
    // Cells 11, 15, 21, 29; appraisers 13, 25; mean 19. Error 4 x 2/4 = 2; parts 2(4 + 4 + 16 + 16)/2 = 40; appraisers 4(36 + 36) = 288.
    expect(result.meanSquares).toEqual({ appraiser: 288, part: 40, error: 2 });
    expect(result.componentsBeforeClipping).toEqual({ repeatability: 2, part: 19, appraiser: 62 });
    expect(result.gauge.variance).toBe(64);
    // R 4.2.2 pf(7.2, 1, 2, lower = FALSE) and pf(20, 2, 4, lower = FALSE)
    expect(sure(result.appraiserP)).toBeCloseTo(0.11534826307, 10);
    expect(sure(result.partP)).toBeCloseTo(0.00826446281, 10);
  });

  it('keeps its intervals around the estimates and the repeatability interval exact', () => {
    const intervals = sure(sure(nestedGaugeStudy(readings)).intervals);
    // qchisq(c(.975, .025), 4) = 11.143287, 0.484419
    expect(intervals.repeatability.lower).toBeCloseTo(8 / 11.143286781877796, 6);
    expect(intervals.repeatability.upper).toBeCloseTo(8 / 0.4844185570879302, 5);
    expect(intervals.part.lower).toBeLessThan(19);
    expect(intervals.part.upper).toBeGreaterThan(19);
    expect(intervals.gauge.upper).toBeGreaterThan(64);
  });

  it('refuses single trials and single parts', () => {
    expect(
      nestedGaugeStudy([
        [[1], [2]],
        [[3], [4]],
      ]),
    ).toMatchObject({ code: 'too-few' });
    expect(
      nestedGaugeStudy([
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

describe('linearity', () => {
  // AIAG, Measurement Systems Analysis, linearity example: 5 parts, 12 readings each (data and printed values from memory).
  const parts = [
    { reference: 2, values: [2.7, 2.5, 2.4, 2.5, 2.7, 2.3, 2.5, 2.5, 2.4, 2.4, 2.6, 2.4] },
    { reference: 4, values: [5.1, 3.9, 4.2, 5, 3.8, 3.9, 3.9, 3.9, 3.9, 4, 4.1, 3.8] },
    { reference: 6, values: [5.8, 5.7, 5.9, 5.9, 6, 6.1, 6, 6.1, 6.4, 6.3, 6, 6.1] },
    { reference: 8, values: [7.6, 7.7, 7.8, 7.7, 7.8, 7.8, 7.8, 7.7, 7.8, 7.5, 7.6, 7.7] },
    { reference: 10, values: [9.1, 9.3, 9.5, 9.3, 9.4, 9.5, 9.5, 9.5, 9.6, 9.2, 9.3, 9.4] },
  ];
  const result = sure(linearityStudy(parts));

  it('gives the printed biases, slope, intercept and R squared', () => {
    expect(result.points.map((point) => point.meanBias.toFixed(6))).toEqual([
      '0.491667',
      '0.125000',
      '0.025000',
      '-0.291667',
      '-0.616667',
    ]);
    expect(result.slope).toBeCloseTo(-0.131667, 6);
    expect(result.intercept).toBeCloseTo(0.736667, 6);
    expect(sure(result.rSquared)).toBeCloseTo(0.714, 3);
    expect(result.residualDeviation).toBeCloseTo(0.23954, 5);
    expect(result.slopeT).toBeCloseTo(-12.043, 3);
    expect(result.interceptT).toBeCloseTo(10.158, 3);
    expect(result.verdict).toBe('not-acceptable');
  });

  it('does not change its slope test with the unit of length', () => {
    const inches = sure(
      linearityStudy(
        parts.map((part) => ({ reference: part.reference / 25.4, values: part.values.map((x) => x / 25.4) })),
      ),
    );
    expect(inches.slopeT).toBeCloseTo(result.slopeT, 8);
    expect(inches.intercept * 25.4).toBeCloseTo(result.intercept, 8);
  });

  it('accepts a gauge whose bias scatters around zero and refuses one size only', () => {
    const fair = [1, 5, 9].map((reference) => ({
      reference,
      values: [-0.1, 0.1, 0.05, -0.05].map((bias) => reference + bias),
    }));
    expect(sure(linearityStudy(fair)).verdict).toBe('acceptable');
    expect(linearityStudy([{ reference: 1, values: [1, 2, 3] }])).toMatchObject({ code: 'too-few' });
    expect(
      linearityStudy([
        { reference: 1, values: [1, NaN] },
        { reference: 2, values: [2, 2] },
      ]),
    ).toMatchObject({ code: 'not-finite' });
  });
});

describe('resolution', () => {
  it('lets a tenth of the tolerance pass and nothing coarser', () => {
    expect(sure(resolutionCheck(0.01, 0.1)).verdict).toBe('fine-enough');
    expect(sure(resolutionCheck(0.1, 0.3 + 0.7)).verdict).toBe('fine-enough');
    expect(sure(resolutionCheck(0.0101, 0.1)).verdict).toBe('too-coarse');
    expect(sure(resolutionCheck(0.001, 0.013))).toMatchObject({ wanted: 0.0013 });
    expect(resolutionCheck(0, 1)).toMatchObject({ code: 'resolution' });
    expect(resolutionCheck(1, 0)).toMatchObject({ code: 'no-tolerance' });
  });

  it('finds the step readings were written down in', () => {
    expect(sure(observedStep([10.005, 10.015, 10.02, 10.005, 10.05]))).toBeCloseTo(0.005, 9);
    expect(sure(observedStep([1, 3, 7]))).toBe(2);
    expect(observedStep([2, 2])).toMatchObject({ code: 'no-variation' });
  });
});
