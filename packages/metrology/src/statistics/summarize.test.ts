import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import zarr from '../testing/reference/nist-zarr13-summary-normality.json';
import lew from '../testing/reference/strd-univariate-lew.json';
import mavro from '../testing/reference/strd-univariate-mavro.json';
import numAcc1 from '../testing/reference/strd-univariate-numacc1.json';
import numAcc2 from '../testing/reference/strd-univariate-numacc2.json';
import numAcc3 from '../testing/reference/strd-univariate-numacc3.json';
import piDigits from '../testing/reference/strd-univariate-pidigits.json';
import { relativeError } from '../testing/relative-error.ts';
import { isUndetermined } from '../result.ts';
import { quantile } from './quantile.ts';
import type { Reading } from './readings.ts';
import { summarize } from './summarize.ts';

function summary(readings: readonly Reading[]) {
  const result = summarize(readings);
  if (isUndetermined(result)) throw new Error(result.reason);
  return result;
}

const paired = (first: string, pair: readonly [string, string]) => [
  first,
  ...Array.from({ length: 500 }, () => pair).flat(),
];

/** NumAcc4 is not among the copied cases; its data and certified values follow the pattern NIST StRD states. */
const numAcc4 = {
  inputs: paired('10000000.2', ['10000000.1', '10000000.3']),
  expected: { n: 1001, mean: 10000000.2, s: 0.1, lag1_autocorrelation: -0.999 },
};

const certified: [
  string,
  readonly Reading[],
  { n: number; mean: number; s: number; lag1_autocorrelation: number },
][] = [
  ['Lew', lew.inputs.x, lew.expected],
  ['Mavro', mavro.inputs.x, mavro.expected],
  ['PiDigits', [...piDigits.inputs.digits], piDigits.expected],
  ['NumAcc1', numAcc1.inputs.x, numAcc1.expected],
  ['NumAcc2', paired('1.2', ['1.1', '1.3']), numAcc2.expected],
  ['NumAcc3', paired('1000000.2', ['1000000.1', '1000000.3']), numAcc3.expected],
  ['NumAcc4', numAcc4.inputs, numAcc4.expected],
];

describe('NIST StRD univariate data', () => {
  it.each(certified)(
    '%s: mean, deviation and autocorrelation to 14 certified digits',
    (_name, readings, expected) => {
      const result = summary(readings);
      expect(result.n).toBe(expected.n);
      expect(relativeError(result.mean, expected.mean)).toBeLessThan(1e-14);
      expect(relativeError(result.standardDeviation as number, expected.s)).toBeLessThan(1e-14);
      expect(relativeError(result.lag1Autocorrelation as number, expected.lag1_autocorrelation)).toBeLessThan(
        1e-14,
      );
    },
  );

  it('gives the same from numbers as from text, where plain doubles keep 8 digits', () => {
    const result = summary(numAcc4.inputs.map(Number));
    expect(result.standardDeviation).toBe(0.1);
    expect(result.mean).toBe(10000000.2);
  });
});

it('reproduces the heat flow summary of the NIST handbook', () => {
  const result = summary(zarr.inputs.x);
  expect(relativeError(result.mean, zarr.expected.mean)).toBeLessThan(1e-11);
  expect(relativeError(result.standardDeviation as number, zarr.expected.s)).toBeLessThan(1e-11);
});

describe('shape', () => {
  it('agrees with the definitions worked by hand for 1, 2, 4, 9', () => {
    // mean 4; deviations -3 -2 0 5; m2 = 38/4, m3 = 90/4, m4 = 722/4
    const result = summary(['1', '2', '4', '9']);
    const g1 = 22.5 / 9.5 ** 1.5;
    const g2 = 180.5 / 9.5 ** 2 - 3;
    expect(result.skewness).toBeCloseTo(g1, 14);
    expect(result.adjustedSkewness).toBeCloseTo((g1 * Math.sqrt(12)) / 2, 14);
    expect(result.excessKurtosis).toBeCloseTo(g2, 14);
    expect(result.adjustedExcessKurtosis).toBeCloseTo((3 / 2) * (5 * g2 + 6), 14);
  });

  it('keeps the texts of the extremes as typed', () => {
    const result = summary(['2.50', '2.5', '-0.10']);
    expect([result.minimumText, result.maximumText, result.range]).toEqual(['-0.10', '2.50', 2.6]);
  });
});

describe('what cannot be said', () => {
  it.each([
    [[], 'too-few'],
    [['1', ''], 'empty'],
    [['1', 'NaN'], 'not-finite'],
    [[1, Infinity], 'not-finite'],
    [['1', '0x10'], 'not-decimal'],
    [['1', '1,5'], 'comma'],
  ])('%j is refused as %s', (readings, code) => {
    expect(summarize(readings)).toMatchObject({ undetermined: true, code });
  });

  it('names the reading it refuses', () => {
    expect(summarize(['1', '2', 'x'])).toMatchObject({
      reason: expect.stringMatching(/^Reading 3: /) as string,
    });
  });

  it('has a mean but no deviation for one reading, and no shape for equal readings', () => {
    expect(summary(['3.1'])).toMatchObject({ mean: 3.1, standardDeviation: { code: 'too-few' } });
    expect(summary(['3', '3', '3.0'])).toMatchObject({
      standardDeviation: 0,
      skewness: { code: 'no-variation' },
      lag1Autocorrelation: { code: 'no-variation' },
    });
  });
});

describe('laws', () => {
  const text = fc.integer({ min: -999_999, max: 999_999 }).map((value) => (value / 1000).toFixed(3));
  const sample = fc.array(text, { minLength: 4, maxLength: 40 });

  it('a shift moves the mean exactly and leaves the spread exactly', () => {
    fc.assert(
      fc.property(sample, fc.integer({ min: -1_000_000, max: 1_000_000 }), (readings, shift) => {
        const moved = readings.map((reading) => (Number(reading) + shift).toFixed(3));
        const [before, after] = [summary(readings), summary(moved)];
        expect(after.sumOfSquares).toBe(before.sumOfSquares);
        expect(after.skewness).toEqual(before.skewness);
        expect(relativeError(after.mean, before.mean + shift)).toBeLessThan(1e-9);
      }),
    );
  });

  it('a power of ten scales, and order does not matter but to the autocorrelation', () => {
    fc.assert(
      fc.property(sample, (readings) => {
        const before = summary(readings);
        const scaled = summary(readings.map((reading) => `${Number(reading.replace('.', ''))}`));
        const reversed = summary([...readings].reverse());
        expect(relativeError(scaled.variance as number, (before.variance as number) * 1e6)).toBeLessThan(
          1e-14,
        );
        expect(reversed.variance).toEqual(before.variance);
        expect(reversed.mean).toBe(before.mean);
        expect(reversed.lag1Autocorrelation).toEqual(before.lag1Autocorrelation);
      }),
    );
  });

  it('large and small arithmetic agree', () => {
    const small = ['0.001', '0.004', '0.002', '0.009'];
    const large = small.map((reading) => `${reading}${'0'.repeat(12)}`);
    expect(summary(large)).toMatchObject({
      variance: summary(small).variance,
      excessKurtosis: summary(small).excessKurtosis,
      lag1Autocorrelation: summary(small).lag1Autocorrelation,
    });
  });
});

describe('quantile', () => {
  // R 4.2.2: sapply(1:9, function(t) quantile(c(2, 3, 5, 7, 11, 13, 17), 0.3, type = t))
  const fromR = [5, 5, 3, 3.2, 4.2, 3.8, 4.6, 4.066666666666666, 4.1];
  it.each(fromR.map((value, index) => [index + 1, value] as const))(
    'type %i agrees with R',
    (type, value) => {
      const result = quantile([17, 2, 11, 3, 13, 5, 7], 0.3, type as 1);
      expect(result).toMatchObject({ method: `Hyndman-Fan type ${type}`, n: 7 });
      expect((result as { value: number }).value).toBeCloseTo(value, 13);
    },
  );

  it('refuses what has no quantile', () => {
    expect(quantile([], 0.5)).toMatchObject({ code: 'too-few' });
    expect(quantile([1, NaN], 0.5)).toMatchObject({ code: 'not-finite' });
    expect(quantile([1], 1.5)).toMatchObject({ code: 'outside-domain' });
  });
});
