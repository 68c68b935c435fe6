import { describe, expect, it } from 'vitest';
import high from '../testing/fixtures/distributions.json';
import fromR from '../testing/fixtures/distributions-r.json';
import { relativeError } from '../testing/relative-error.ts';
import { regularizedBeta } from './beta.ts';
import { binomialCdf, binomialProbability, binomialUpperTail } from './binomial.ts';
import { chiSquareCdf, chiSquareQuantile, chiSquareUpperQuantile, chiSquareUpperTail } from './chi-square.ts';
import { fCdf, fUpperQuantile, fUpperTail } from './f.ts';
import { logGamma, regularizedGammaP, regularizedGammaQ } from './gamma.ts';
import { hypergeometricCdf, hypergeometricProbability, hypergeometricUpperTail } from './hypergeometric.ts';
import { nonCentralTCdf, nonCentralTQuantile, nonCentralTUpperTail } from './non-central-t.ts';
import { normalRangeCdf, normalRangeUpperTail } from './normal-range.ts';
import { normalCdf, normalQuantile, normalUpperTail } from './normal.ts';
import { poissonCdf, poissonProbability, poissonUpperTail } from './poisson.ts';
import {
  studentizedRangeCdf,
  studentizedRangeQuantile,
  studentizedRangeUpperTail,
} from './studentized-range.ts';
import { tUpperQuantile, tUpperTail } from './student-t.ts';

type Row = readonly (number | null)[];
type Function = (...values: number[]) => number;

/** Largest relative error of f over rows whose first `arguments` cells go in and whose cell `column` should come out. */
function worst(
  rows: readonly Row[],
  inputs: number,
  column: number,
  f: Function,
): { error: number; at: Row } {
  let error = 0;
  let at: Row = [];
  for (const row of rows) {
    const expected = row[column];
    if (expected === null || expected === undefined) continue;
    const e = relativeError(f(...(row.slice(0, inputs) as number[])), expected);
    if (!(e <= error)) {
      error = e;
      at = row;
    }
  }
  return { error, at };
}

const TWELVE_DIGITS = 1e-12;

describe('against 40-digit values (mpmath)', () => {
  const cases: [string, readonly Row[], number, number, Function][] = [
    ['normal upper tail', high.normalUpperTail, 1, 1, normalUpperTail],
    ['normal quantile', high.normalQuantile, 1, 1, normalQuantile],
    ['ln Γ', high.logGamma, 1, 1, logGamma],
    ['P(a, x)', high.regularizedGamma, 2, 2, regularizedGammaP],
    ['Q(a, x)', high.regularizedGamma, 2, 3, regularizedGammaQ],
    ['I_x(a, b)', high.regularizedBeta, 3, 3, regularizedBeta],
    ['t upper tail', high.tUpperTail, 2, 2, tUpperTail],
    ['t upper quantile', high.tUpperQuantile, 2, 2, tUpperQuantile],
    ['χ² quantile', high.chiSquareQuantiles, 2, 2, chiSquareQuantile],
    ['χ² upper quantile', high.chiSquareQuantiles, 2, 3, chiSquareUpperQuantile],
    ['F lower tail', high.fTails, 3, 3, fCdf],
    ['F upper tail', high.fTails, 3, 4, fUpperTail],
    ['F upper quantile', high.fUpperQuantile, 3, 3, fUpperQuantile],
    ['non-central t lower tail', high.nonCentralT, 3, 3, nonCentralTCdf],
    ['non-central t upper tail', high.nonCentralT, 3, 4, nonCentralTUpperTail],
    ['range of normal values, lower tail', high.normalRange, 2, 2, normalRangeCdf],
    ['range of normal values, upper tail', high.normalRange, 2, 3, normalRangeUpperTail],
    ['studentised range, lower tail', high.studentizedRange, 3, 3, studentizedRangeCdf],
    ['studentised range, upper tail', high.studentizedRange, 3, 4, studentizedRangeUpperTail],
    ['binomial probability', high.binomial, 3, 3, (k = 0, n = 0, p = 0) => binomialProbability(k, n, p)],
    ['binomial lower tail', high.binomial, 3, 4, binomialCdf],
    ['binomial upper tail', high.binomial, 3, 5, binomialUpperTail],
    ['Poisson probability', high.poisson, 2, 2, poissonProbability],
    ['Poisson lower tail', high.poisson, 2, 3, poissonCdf],
    ['Poisson upper tail', high.poisson, 2, 4, poissonUpperTail],
    ['hypergeometric probability', high.hypergeometric, 4, 4, hypergeometricProbability],
    ['hypergeometric lower tail', high.hypergeometric, 4, 5, hypergeometricCdf],
    ['hypergeometric upper tail', high.hypergeometric, 4, 6, hypergeometricUpperTail],
  ];
  it.each(cases)('%s has 12 digits', (_name, rows, inputs, column, f) => {
    expect(rows.length).toBeGreaterThan(12);
    const { error, at } = worst(rows, inputs, column, f);
    expect(error, `worst at ${JSON.stringify(at)}`).toBeLessThan(TWELVE_DIGITS);
  });

  it('inverts the non-central t to 12 digits of the probability', () => {
    for (const [t = 0, df = 1, delta = 0, lower = 0, upper = 0] of high.nonCentralT) {
      if (lower < 1e-12 || upper < 1e-12) continue;
      const found = nonCentralTQuantile(lower, df, delta);
      expect(relativeError(nonCentralTCdf(found, df, delta), lower)).toBeLessThan(TWELVE_DIGITS);
      if (lower < 0.5 && t !== 0) expect(relativeError(found, t)).toBeLessThan(1e-11);
    }
  });

  it('inverts the studentised range to 12 digits', () => {
    for (const [q = 0, groups = 2, df = 1, lower = 0] of high.studentizedRange)
      if (lower < 0.5)
        expect(relativeError(studentizedRangeQuantile(lower, groups, df), q)).toBeLessThan(TWELVE_DIGITS);
  });
});

describe('against R at random arguments', () => {
  // R's own algorithms keep 12 to 15 digits here; a tail R rounds to 1 is compared as it is.
  const cases: [string, readonly Row[], number, number, Function][] = [
    ['normal', fromR.normalCdf, 1, 1, normalCdf],
    ['normal quantile', fromR.normalQuantile, 1, 1, normalQuantile],
    ['t upper tail', fromR.tUpperTail, 2, 2, tUpperTail],
    ['χ² lower tail', fromR.chiSquare, 2, 2, chiSquareCdf],
    ['χ² upper tail', fromR.chiSquare, 2, 3, chiSquareUpperTail],
    ['F lower tail', fromR.f, 3, 3, fCdf],
    ['F upper tail', fromR.f, 3, 4, fUpperTail],
  ];
  it.each(cases)('%s agrees in 12 digits', (_name, rows, inputs, column, f) => {
    const { error, at } = worst(rows, inputs, column, f);
    expect(error, `worst at ${JSON.stringify(at)}`).toBeLessThan(TWELVE_DIGITS);
  });
});
