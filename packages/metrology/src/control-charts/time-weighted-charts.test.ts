import { describe, expect, it } from 'vitest';
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { cusumChart, ewmaChart } from './time-weighted-charts.ts';

function known<T>(result: T | Undetermined): T {
  if (isUndetermined(result)) throw new Error(result.reason);
  return result;
}

/** NIST/SEMATECH e-Handbook 6.3.2.4: 20 readings, target 50, s = 2.0539, λ 0.3; data and printed results from memory. */
const NIST_EWMA = {
  x: [
    52, 47, 53, 49.3, 50.1, 47, 51, 50.1, 51.2, 50.5, 49.6, 47.6, 49.9, 51.3, 47.8, 51.2, 52.6, 52.4, 53.6,
    52.1,
  ],
  printed: [
    50.6, 49.52, 50.56, 50.18, 50.16, 49.21, 49.75, 49.85, 50.26, 50.33, 50.11, 49.36, 49.52, 50.05, 49.38,
    49.92, 50.73, 51.23, 51.94, 51.99,
  ],
  upper: 52.5884,
  lower: 47.4115,
};

describe('EWMA', () => {
  it('reproduces the worked example of the NIST handbook to its printed digits', () => {
    const chart = known(ewmaChart({ values: NIST_EWMA.x, centre: 50, sigma: 2.0539, lambda: 0.3 }));
    chart.points.forEach(({ value }, index) =>
      expect(Math.abs(value - (NIST_EWMA.printed[index] ?? NaN))).toBeLessThan(0.0051),
    );
    // The handbook prints the final limits for every point; the limits here reach them from inside.
    expect(Math.abs((chart.points[19]?.upper ?? NaN) - NIST_EWMA.upper)).toBeLessThan(2e-4);
    expect(Math.abs((chart.points[19]?.lower ?? NaN) - NIST_EWMA.lower)).toBeLessThan(2e-4);
    expect(chart.points[0]?.upper).toBeCloseTo(50 + 3 * 2.0539 * 0.3, 10);
    expect(chart.beyond).toEqual([]);
  });

  it('is the chart of individuals when λ is 1', () => {
    const chart = known(ewmaChart({ values: [1, 5, 2], centre: 2, sigma: 1, lambda: 1 }));
    expect(chart.points[1]).toEqual({ point: 2, value: 5, lower: -1, upper: 5 });
    expect(chart.beyond).toEqual([]);
  });

  it('estimates what is not given, and says so', () => {
    expect(known(ewmaChart({ values: [1, 2, 1, 2] }))).toMatchObject({
      centre: 1.5,
      centreFrom: 'mean of the values',
      sigmaFrom: 'mean moving range over d2',
    });
    expect(ewmaChart({ values: [1, 1, 1] })).toMatchObject({ code: 'no-variation' });
    expect(ewmaChart({ values: [1, 2], lambda: 0 })).toMatchObject({ code: 'outside-domain' });
    expect(ewmaChart({ values: [1, NaN] })).toMatchObject({ code: 'not-finite' });
    expect(ewmaChart({ values: [1] })).toMatchObject({ code: 'too-few' });
  });
});

/** NIST/SEMATECH e-Handbook 6.3.2.3: 20 means of 4, target 325, K 0.3175, H 4.1959; data and results from memory. */
const NIST_CUSUM = {
  x: [
    324.925, 324.675, 324.725, 324.35, 325.35, 325.225, 324.125, 324.525, 325.225, 324.6, 324.625, 325.15,
    328.325, 327.25, 327.825, 328.5, 326.675, 327.775, 326.875, 328.35,
  ],
  upper: [0, 0, 0, 0, 0.03, 0, 0, 0, 0, 0, 0, 0, 3.01, 4.94, 7.45, 10.63, 11.99, 14.44, 16, 19.04],
  lower: [0, 0.01, 0, 0.33, 0, 0, 0.56, 0.71, 0.17, 0.25, 0.31, 0, 0, 0, 0, 0, 0, 0, 0, 0],
};

describe('CUSUM', () => {
  it('reproduces the tabular sums of the NIST handbook and dates the shift', () => {
    const chart = known(
      cusumChart({ values: NIST_CUSUM.x, centre: 325, sigma: 0.635, k: 0.5, h: 4.1959 / 0.635 }),
    );
    // The handbook rounds K to 0.3175 and prints 2 decimals.
    chart.points.forEach(({ upper, lower }, index) => {
      expect(Math.abs(upper - (NIST_CUSUM.upper[index] ?? NaN)), `upper ${index + 1}`).toBeLessThan(0.011);
      expect(Math.abs(lower - (NIST_CUSUM.lower[index] ?? NaN)), `lower ${index + 1}`).toBeLessThan(0.011);
    });
    expect(chart.signals.map(({ point }) => point)).toEqual([14, 15, 16, 17, 18, 19, 20]);
    expect(chart.signals[0]).toMatchObject({ side: 'above', begunAfter: 12 });
    expect(chart.signals[0]?.estimatedMean).toBeCloseTo((328.325 + 327.25) / 2, 10);
  });

  it('mirrors', () => {
    const up = known(cusumChart({ values: [0, 3, 3, 3], centre: 0, sigma: 1 }));
    const down = known(cusumChart({ values: [0, -3, -3, -3], centre: 0, sigma: 1 }));
    expect(up.signals.map((s) => [s.point, s.side])).toEqual([[4, 'above']]);
    expect(down.signals.map((s) => [s.point, s.side, s.estimatedMean])).toEqual([[4, 'below', -3]]);
  });

  it('signals sooner with a head start, and not at the decision line itself', () => {
    expect(known(cusumChart({ values: [3, 3], centre: 0, sigma: 1, headStart: 0.5 })).signals[0]?.point).toBe(
      2,
    );
    expect(known(cusumChart({ values: [3, 3], centre: 0, sigma: 1 })).signals).toEqual([]);
    expect(cusumChart({ values: [1, 2], h: 0 })).toMatchObject({ code: 'outside-domain' });
    expect(cusumChart({ values: [1, 2], headStart: 1 })).toMatchObject({ code: 'outside-domain' });
  });
});
