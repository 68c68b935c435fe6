// Longer than the usual file because it is a list: one line of code and one of documentation for each public function.
import * as betaFile from './beta.ts';
import * as binomialFile from './binomial.ts';
import * as chiSquareFile from './chi-square.ts';
import * as fFile from './f.ts';
import * as gammaFile from './gamma.ts';
import {
  anyNumber,
  count,
  degrees,
  finite,
  groupCount,
  guarded,
  notNegative,
  positive,
  probability,
  share,
} from './guarded.ts';
import * as hypergeometricFile from './hypergeometric.ts';
import * as nonCentralFile from './non-central-t.ts';
import * as normalRangeFile from './normal-range.ts';
import * as normalFile from './normal.ts';
import * as poissonFile from './poisson.ts';
import * as rangeFile from './studentized-range.ts';
import * as tFile from './student-t.ts';

/*
 * The public face of the distributions. Each function answers a number, or `{ undetermined, reason }` when an argument
 * is outside its domain; never NaN. Relative error below 1e-12 in both tails wherever the answer is above 1e-290, tested
 * against 40-digit values (testing/fixtures/distributions.json) and R (testing/fixtures/distributions-r.json).
 * "Upper" functions take or give the upper tail itself, so that a tail of 1e-50 is not lost in 1 − p.
 * A tail below the smallest double is 0.
 */

const z = ['z', anyNumber] as const;
const p = ['p', probability] as const;
const q = ['q', probability] as const;
const df = ['df', degrees] as const;
const df1 = ['df1', positive] as const;
const df2 = ['df2', positive] as const;
const chiDf = ['df', positive] as const;
const x = ['x', anyNumber] as const;
const a = ['a', positive] as const;
const b = ['b', positive] as const;
const delta = ['delta', finite] as const;
const groups = ['groups', groupCount] as const;
const k = ['k', finite] as const;
const n = ['n', count] as const;
const insideLot = (_k: number, lot: number, marked: number, sample: number) =>
  marked > lot || sample > lot ? 'the marked pieces and the sample cannot be more than the lot' : null;
const lotNumbers = [
  ['k', finite],
  ['lot', count],
  ['marked', count],
  ['sample', count],
] as const;

/** Density φ(z) = exp(−z²/2)/√(2π) of the standard normal distribution. Any z. */
export const normalDensity = guarded('normalDensity', normalFile.normalDensity, [z]);
/** Distribution function Φ(z) = P(Z ≤ z) of the standard normal distribution. Any z, infinities included. */
export const normalCdf = guarded('normalCdf', normalFile.normalCdf, [z]);
/** Upper tail Q(z) = 1 − Φ(z), computed as itself: Q(37) = 5.7e-300 is right to 12 digits. */
export const normalUpperTail = guarded('normalUpperTail', normalFile.normalUpperTail, [z]);
/** Quantile z with Φ(z) = p, 0 < p < 1. */
export const normalQuantile = guarded('normalQuantile', normalFile.normalQuantile, [p]);
/** Quantile z with Q(z) = q, 0 < q < 1. */
export const normalUpperQuantile = guarded('normalUpperQuantile', normalFile.normalUpperQuantile, [q]);

/** Density of Student's t at t with df > 0 (Infinity: normal). */
export const tDensity = guarded('tDensity', tFile.tDensity, [['t', finite], df]);
/** P(T ≤ t) of Student's t with df > 0 (Infinity: normal). DLMF 8.17.2 with x = df/(df + t²). */
export const tCdf = guarded('tCdf', tFile.tCdf, [['t', anyNumber], df]);
/** P(T > t) of Student's t. */
export const tUpperTail = guarded('tUpperTail', tFile.tUpperTail, [['t', anyNumber], df]);
/** Quantile t with P(T ≤ t) = p. */
export const tQuantile = guarded('tQuantile', tFile.tQuantile, [p, df]);
/** Quantile t with P(T > t) = q. */
export const tUpperQuantile = guarded('tUpperQuantile', tFile.tUpperQuantile, [q, df]);

/** Density of χ² with df > 0 degrees of freedom. */
export const chiSquareDensity = guarded('chiSquareDensity', chiSquareFile.chiSquareDensity, [x, chiDf]);
/** P(χ² ≤ x) with df > 0 degrees of freedom; 0 for x ≤ 0. */
export const chiSquareCdf = guarded('chiSquareCdf', chiSquareFile.chiSquareCdf, [x, chiDf]);
/** P(χ² > x). */
export const chiSquareUpperTail = guarded('chiSquareUpperTail', chiSquareFile.chiSquareUpperTail, [x, chiDf]);
/** Quantile x with P(χ² ≤ x) = p. */
export const chiSquareQuantile = guarded('chiSquareQuantile', chiSquareFile.chiSquareQuantile, [p, chiDf]);
/** Quantile x with P(χ² > x) = q. */
export const chiSquareUpperQuantile = guarded(
  'chiSquareUpperQuantile',
  chiSquareFile.chiSquareUpperQuantile,
  [q, chiDf],
);

/** Density of F with df1 and df2 degrees of freedom. */
export const fDensity = guarded('fDensity', fFile.fDensity, [['f', anyNumber], df1, df2]);
/** P(F ≤ f) with df1 and df2 degrees of freedom; 0 for f ≤ 0. */
export const fCdf = guarded('fCdf', fFile.fCdf, [['f', anyNumber], df1, df2]);
/** P(F > f): the p value of a ratio of variances. */
export const fUpperTail = guarded('fUpperTail', fFile.fUpperTail, [['f', anyNumber], df1, df2]);
/** Quantile f with P(F ≤ f) = p. */
export const fQuantile = guarded('fQuantile', fFile.fQuantile, [p, df1, df2]);
/** Quantile f with P(F > f) = q. */
export const fUpperQuantile = guarded('fUpperQuantile', fFile.fUpperQuantile, [q, df1, df2]);

/** P(T ≤ t) of non-central t: T = (Z + δ)/√(χ²/df), Z standard normal. */
export const nonCentralTCdf = guarded('nonCentralTCdf', nonCentralFile.nonCentralTCdf, [
  ['t', finite],
  df,
  delta,
]);
/** P(T > t) of non-central t. */
export const nonCentralTUpperTail = guarded('nonCentralTUpperTail', nonCentralFile.nonCentralTUpperTail, [
  ['t', finite],
  df,
  delta,
]);
/** Quantile t of non-central t with P(T ≤ t) = p; the factor of a one-sided tolerance limit is this over √n. */
export const nonCentralTQuantile = guarded('nonCentralTQuantile', nonCentralFile.nonCentralTQuantile, [
  p,
  df,
  delta,
]);

/** P(W ≤ x) for the range W of n standard normal values, 2 ≤ n ≤ 200. */
export const normalRangeCdf = guarded('normalRangeCdf', normalRangeFile.normalRangeCdf, [x, groups]);
/** P(W > x) for the range W of n standard normal values. */
export const normalRangeUpperTail = guarded('normalRangeUpperTail', normalRangeFile.normalRangeUpperTail, [
  x,
  groups,
]);
/** P(Q ≤ q) of the studentised range of 2 to 200 groups with df > 0 degrees of freedom. */
export const studentizedRangeCdf = guarded('studentizedRangeCdf', rangeFile.studentizedRangeCdf, [
  ['q', finite],
  groups,
  df,
]);
/** P(Q > q) of the studentised range: the p value of Tukey's comparison of means. */
export const studentizedRangeUpperTail = guarded(
  'studentizedRangeUpperTail',
  rangeFile.studentizedRangeUpperTail,
  [['q', finite], groups, df],
);
/** Quantile q of the studentised range with P(Q ≤ q) = p. */
export const studentizedRangeQuantile = guarded(
  'studentizedRangeQuantile',
  rangeFile.studentizedRangeQuantile,
  [p, groups, df],
);

/** ln Γ(x), x > 0. */
export const logGamma = guarded('logGamma', gammaFile.logGamma, [
  ['x', { words: 'a finite number above 0', holds: (v) => v > 0 && v < Infinity }],
]);
/** Γ(x), 0 < x < 171.6. */
export const gammaFunction = guarded('gammaFunction', gammaFile.gammaFunction, [
  ['x', { words: 'a finite number above 0', holds: (v) => v > 0 && v < Infinity }],
]);
/** Regularised lower incomplete gamma function P(a, x) (DLMF 8.2.4), a > 0; 0 for x ≤ 0. */
export const regularizedGammaP = guarded('regularizedGammaP', gammaFile.regularizedGammaP, [a, x]);
/** Regularised upper incomplete gamma function Q(a, x) = 1 − P(a, x). */
export const regularizedGammaQ = guarded('regularizedGammaQ', gammaFile.regularizedGammaQ, [a, x]);
/** x with P(a, x) = p: the quantile of the gamma distribution of shape a and scale 1. */
export const gammaQuantile = guarded('gammaQuantile', gammaFile.gammaQuantile, [p, a]);
/** ln B(a, b), a > 0, b > 0. */
export const logBeta = guarded('logBeta', betaFile.logBeta, [a, b]);
/** Regularised incomplete beta function I_x(a, b) (DLMF 8.17.2), 0 ≤ x ≤ 1: the beta distribution function. */
export const regularizedBeta = guarded('regularizedBeta', betaFile.regularizedBeta, [['x', share], a, b]);
/** x with I_x(a, b) = p: the quantile of the beta distribution. */
export const betaQuantile = guarded('betaQuantile', betaFile.betaQuantile, [p, a, b]);

/** P(X = k) of a binomial count in n trials of probability p. */
export const binomialProbability = guarded(
  'binomialProbability',
  (successes: number, trials: number, chance: number) =>
    binomialFile.binomialProbability(successes, trials, chance),
  [k, n, ['p', share]],
);
/** P(X ≤ k) of a binomial count. */
export const binomialCdf = guarded('binomialCdf', binomialFile.binomialCdf, [k, n, ['p', share]]);
/** P(X > k) of a binomial count. */
export const binomialUpperTail = guarded('binomialUpperTail', binomialFile.binomialUpperTail, [
  k,
  n,
  ['p', share],
]);
/** P(X = k) of a Poisson count with mean λ ≥ 0. */
export const poissonProbability = guarded('poissonProbability', poissonFile.poissonProbability, [
  k,
  ['mean', notNegative],
]);
/** P(X ≤ k) of a Poisson count. */
export const poissonCdf = guarded('poissonCdf', poissonFile.poissonCdf, [k, ['mean', notNegative]]);
/** P(X > k) of a Poisson count. */
export const poissonUpperTail = guarded('poissonUpperTail', poissonFile.poissonUpperTail, [
  k,
  ['mean', notNegative],
]);
/** P(X = k) marked pieces in a sample without replacement; marked ≤ lot, sample ≤ lot. */
export const hypergeometricProbability = guarded(
  'hypergeometricProbability',
  hypergeometricFile.hypergeometricProbability,
  lotNumbers,
  insideLot,
);
/** P(X ≤ k) marked pieces in a sample without replacement. */
export const hypergeometricCdf = guarded(
  'hypergeometricCdf',
  hypergeometricFile.hypergeometricCdf,
  lotNumbers,
  insideLot,
);
/** P(X > k) marked pieces in a sample without replacement. */
export const hypergeometricUpperTail = guarded(
  'hypergeometricUpperTail',
  hypergeometricFile.hypergeometricUpperTail,
  lotNumbers,
  insideLot,
);
