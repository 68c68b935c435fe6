import { describe, expect, it } from 'vitest';
import fromR from '../testing/fixtures/statistics-r.json';
import adFormula from '../testing/reference/ad-pvalue-formula.json';
import grubbs from '../testing/reference/nist-grubbs-uranium.json';
import tolerance from '../testing/reference/nist-tolerance-n43.json';
import zarr from '../testing/reference/nist-zarr13-summary-normality.json';
import filliben from '../testing/reference/ppcc-filliben-critical.json';
import { logNormalCdf, logNormalUpperTail } from '../distributions/normal.ts';
import { relativeError } from '../testing/relative-error.ts';
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { ppccCriticalValue } from '../tables/ppcc-critical-values.ts';
import { andersonDarling, andersonDarlingNormal, andersonDarlingP } from './anderson-darling.ts';
import { andersonDarlingKnownUpperTail } from './anderson-darling-known.ts';
import { distributionFreeSampleSize, distributionFreeTolerance } from './distribution-free-tolerance.ts';
import { grubbsTest } from './grubbs.ts';
import { deviationInterval, meanInterval } from './intervals.ts';
import { normalProbabilityPlot } from './probability-plot.ts';
import { normalToleranceInterval } from './tolerance-interval.ts';

function known<T>(result: T | Undetermined): T {
  if (isUndetermined(result)) throw new Error(result.reason);
  return result;
}
const near = (found: number | null, expected: number, tolerated = 1e-9) =>
  expect(relativeError(found ?? NaN, expected)).toBeLessThan(tolerated);

describe('Anderson-Darling', () => {
  it.each(adFormula.expected.rows)('p for A² = $A2 and n = $n', ({ A2, n, A2_star, p }) => {
    const result = andersonDarlingP(A2, n, 'normal');
    near(result.adjusted, A2_star);
    near(result.p, p);
  });

  it('meets the critical values of D’Agostino and Stephens to their digits', () => {
    for (const [level, value] of Object.entries(adFormula.inputs.critical_values_A2_star))
      expect(Math.abs(andersonDarlingP(value, 1e9, 'normal').p - Number(level))).toBeLessThan(0.0004);
  });

  it('reproduces the heat flow readings; the remembered 0.129 of the handbook does not recompute', () => {
    const result = known(andersonDarlingNormal(zarr.inputs.x));
    near(result.statistic, zarr.expected.anderson_darling_A2);
    near(result.adjustedStatistic, zarr.expected.A2_star);
    near(result.p, zarr.expected.p_value_dagostino_stephens);
    expect(Math.abs(result.statistic - zarr.published.anderson_darling_remembered)).toBeGreaterThan(0.002);
  });

  it('has the limiting points of a known distribution (Stephens, Biometrika 61 (1974); his 3.857 at 1 % is 3.878)', () => {
    for (const [x, p] of [
      [1.248, 0.25],
      [1.933, 0.1],
      [2.492, 0.05],
      [3.07, 0.0252],
      [3.878, 0.01],
    ] as const)
      expect(Math.abs(andersonDarlingKnownUpperTail(x) - p)).toBeLessThan(1e-4);
    // Independent: Imhof's inversion of the series of 400 terms with NumPy 2.4.6.
    expect(andersonDarlingKnownUpperTail(1)).toBeCloseTo(0.357266591, 6);
    expect(andersonDarlingKnownUpperTail(0.3)).toBeCloseTo(0.938158005, 6);
  });

  it('meets the points of Stephens (1977) for a fitted Weibull distribution', () => {
    for (const [a, p] of [
      [0.474, 0.25],
      [0.637, 0.1],
      [0.757, 0.05],
      [0.877, 0.025],
      [1.038, 0.01],
    ] as const)
      expect(Math.abs(andersonDarlingP(a, 1e12, 'weibull').p - p)).toBeLessThan(0.006);
  });

  it('tests against a distribution given by its tails', () => {
    const tails = { logCdf: logNormalCdf, logUpperTail: logNormalUpperTail };
    const values = [-1.5, -1, -0.5, -0.2, 0.1, 0.4, 0.9, 1.6];
    expect(known(andersonDarling(values, tails, 'known')).p).toBeGreaterThan(0.9);
    expect(
      known(
        andersonDarling(
          values.map((v) => v + 3),
          tails,
          'known',
        ),
      ).p,
    ).toBeLessThan(1e-6);
    const bounded = { logCdf: Math.log, logUpperTail: (x: number) => Math.log1p(-x) };
    expect(andersonDarling([0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 1], bounded, 'known')).toMatchObject({
      code: 'outside-support',
    });
  });

  it('says why it cannot judge', () => {
    expect(andersonDarlingNormal([1, 2, 3])).toMatchObject({ code: 'too-few' });
    expect(andersonDarlingNormal(Array<number>(10).fill(2))).toMatchObject({ code: 'no-variation' });
    expect(andersonDarlingP(40, 100, 'normal').p).toBeLessThan(1e-30);
  });
});

describe('Grubbs', () => {
  it('finds the uranium outlier of the NIST handbook', () => {
    const largest = known(grubbsTest(grubbs.inputs.x, 'maximum', 0.05));
    near(largest.mean, grubbs.expected.mean);
    near(largest.standardDeviation, grubbs.expected.s);
    near(largest.statistic, grubbs.expected.G);
    near(largest.critical, grubbs.expected.critical_one_sided_max);
    expect(largest).toMatchObject({ point: 8, isOutlier: true });
    near(known(grubbsTest(grubbs.inputs.x)).critical, grubbs.expected.critical_two_sided);
  });

  it('has a p value equal to the level at the critical value', () => {
    const base = known(grubbsTest([1, 2, 3, 4, 5, 9]));
    near(known(grubbsTest([1, 2, 3, 4, 5, 9], 'either', base.p)).critical, base.statistic, 1e-10);
  });

  it('looks at the side asked for', () => {
    const readings = ['-20', '1', '2', '3', '4'];
    expect(known(grubbsTest(readings, 'minimum')).point).toBe(1);
    expect(known(grubbsTest(readings, 'maximum')).point).toBe(5);
    expect(grubbsTest(['1', '2'])).toMatchObject({ code: 'too-few' });
    expect(grubbsTest([2, 2, 2])).toMatchObject({ code: 'no-variation' });
  });
});

describe('normal probability plot', () => {
  it('reproduces the correlation of the heat flow readings', () => {
    const plot = known(normalProbabilityPlot(zarr.inputs.x));
    near(plot.correlation, zarr.expected.ppcc_filliben, 1e-10);
    expect(plot.isNormal).toBe(true);
  });

  it('meets the table of Filliben within its simulation error, but for n = 5 at 1 %', () => {
    for (const { n, p01, p05 } of filliben.expected.rows) {
      // Filliben's printed 0.822 at n = 5 stands alone: the simulation here gives 0.826 ± 0.0003.
      expect(Math.abs(known(ppccCriticalValue(n, 0.01)) - p01)).toBeLessThan(0.005);
      expect(Math.abs(known(ppccCriticalValue(n, 0.05)) - p05)).toBeLessThan(0.003);
    }
    expect(filliben.expected.worked.ppcc).toBeGreaterThan(known(ppccCriticalValue(15, 0.05)));
    expect(ppccCriticalValue(2000, 0.05)).toMatchObject({ code: 'outside-table' });
  });
});

describe('intervals', () => {
  it('reproduces the confidence interval of the mean of the heat flow readings', () => {
    const interval = known(meanInterval(zarr.inputs.x));
    near(interval.lower, zarr.expected.ci95_low, 1e-11);
    near(interval.upper, zarr.expected.ci95_high, 1e-11);
  });

  it('gives the interval of the deviation from chi-square', () => {
    // s² = 2.5, 4 degrees of freedom, chi-square 0.484418557 and 11.143286782 (R 4.2.2: qchisq(c(.025, .975), 4))
    const interval = known(deviationInterval([1, 2, 3, 4, 5]));
    near(interval.lower, Math.sqrt(10 / 11.143286781878), 1e-11);
    near(interval.upper, Math.sqrt(10 / 0.484418557089), 1e-11);
    expect(meanInterval([1], 0.95)).toMatchObject({ code: 'too-few' });
    expect(meanInterval([1, 2], 1)).toMatchObject({ code: 'outside-domain' });
  });

  it('reproduces the tolerance factors of the NIST handbook; its printed 102.096 used s = 2.68', () => {
    const { n, coverage, confidence, mean, s } = tolerance.inputs;
    const input = { n, coverage, confidence, mean, standardDeviation: s };
    const howe = known(normalToleranceInterval({ ...input, factor: 'howe' }));
    near(howe.factor, tolerance.expected.k2_howe);
    near(howe.lower, tolerance.expected.two_sided_howe[0] ?? NaN);
    near(known(normalToleranceInterval(input)).factor, tolerance.expected.k2_exact);
    const upper = known(normalToleranceInterval({ ...input, sides: 'upper' }));
    near(upper.factor, tolerance.expected.k1_noncentral_t);
    // The printed 97.120255 uses the normal approximation k1 = 1.8752; the exact factor gives 97.120222.
    expect(Math.abs((upper.upper ?? NaN) - tolerance.expected.upper_one_sided)).toBeLessThan(4e-5);
    expect(upper.lower).toBeNull();
  });

  it.each(fromR.toleranceFactors)(
    'n %d, coverage %d, confidence %d: both factors agree with R',
    (n, p, g, two, one) => {
      const input = { n, mean: 0, standardDeviation: 1, coverage: p, confidence: g };
      near(known(normalToleranceInterval(input)).factor, two, 1e-8);
      near(known(normalToleranceInterval({ ...input, sides: 'lower' })).factor, one, 1e-8);
    },
  );

  it('needs 93 readings for 95/95 between the extremes and 59 beyond one (Wilks)', () => {
    expect(distributionFreeSampleSize(0.95, 0.95)).toBe(93);
    expect(distributionFreeSampleSize(0.95, 0.95, 'upper')).toBe(59);
    expect(distributionFreeSampleSize(0.9, 0.9, 'lower')).toBe(22);
    const values = Array.from({ length: 93 }, (_, index) => ((index * 37) % 93) + 1);
    expect(distributionFreeTolerance(values, 0.95, 0.95)).toMatchObject({ lower: 1, upper: 93, outside: 0 });
    expect(distributionFreeTolerance(values, 0.8, 0.9)).toMatchObject({ lower: 7, upper: 87, outside: 12 });
    expect(distributionFreeTolerance(values.slice(1), 0.95, 0.95)).toMatchObject({
      code: 'too-few',
      reason: expect.stringContaining('93') as string,
    });
  });
});
