import { mixOverChi } from './chi-mixture.ts';
import { findRoot } from './find-root.ts';
import { normalRangeCdf, normalRangeUpperTail } from './normal-range.ts';

/**
 * P(Q ≤ q) for the studentised range Q = W/S: W the range of `groups` ≥ 2 standard normal values, S an independent
 * deviation with df > 0 degrees of freedom (Infinity: the range itself). P = E[P(W ≤ qS)].
 */
export function studentizedRangeCdf(q: number, groups: number, df: number): number {
  if (q <= 0) return 0;
  if (df === Infinity) return normalRangeCdf(q, groups);
  return mixOverChi(df, (w) => Math.log(normalRangeCdf(q * w, groups)));
}

/** P(Q > q), the p value of Tukey's comparison of means. */
export function studentizedRangeUpperTail(q: number, groups: number, df: number): number {
  if (q <= 0) return 1;
  if (df === Infinity) return normalRangeUpperTail(q, groups);
  return mixOverChi(df, (w) => Math.log(normalRangeUpperTail(q * w, groups)));
}

/** q with P(Q ≤ q) = p, 0 < p < 1; solved in ln q on the smaller tail. */
export function studentizedRangeQuantile(p: number, groups: number, df: number): number {
  const lower = p <= 0.5;
  const goal = Math.log(lower ? p : 1 - p);
  const gap = (u: number) =>
    lower
      ? Math.log(studentizedRangeCdf(Math.exp(u), groups, df)) - goal
      : goal - Math.log(studentizedRangeUpperTail(Math.exp(u), groups, df));
  return Math.exp(findRoot(gap, 1, 0.5));
}
