import { mixOverChi } from './chi-mixture.ts';
import {
  logNormalCdf,
  logNormalDensity,
  logNormalUpperTail,
  normalCdf,
  normalQuantile,
  normalUpperTail,
} from './normal.ts';
import { findRoot } from './find-root.ts';

/**
 * P(T ≤ t) for non-central t with df > 0 degrees of freedom and non-centrality δ:
 * T = (Z + δ)/√(χ²_df/df), so P = E[Φ(tW − δ)] over W = √(χ²_df/df). No term cancels, so small tails keep their digits.
 */
export function nonCentralTCdf(t: number, df: number, delta: number): number {
  if (df === Infinity) return normalCdf(t - delta);
  return mixOverChi(df, (w) => logNormalCdf(t * w - delta));
}

/** P(T > t) for non-central t. */
export function nonCentralTUpperTail(t: number, df: number, delta: number): number {
  if (df === Infinity) return normalUpperTail(t - delta);
  return mixOverChi(df, (w) => logNormalUpperTail(t * w - delta));
}

/** Density of non-central t. */
export function nonCentralTDensity(t: number, df: number, delta: number): number {
  return mixOverChi(df, (w) => logNormalDensity(t * w - delta) + Math.log(w));
}

/** t with P(T ≤ t) = p, 0 < p < 1. Of the two tails the smaller is solved. */
export function nonCentralTQuantile(p: number, df: number, delta: number): number {
  if (df === Infinity) return delta + normalQuantile(p);
  const lower = p <= 0.5;
  const goal = Math.log(lower ? p : 1 - p);
  const gap = (t: number) =>
    lower
      ? Math.log(nonCentralTCdf(t, df, delta)) - goal
      : goal - Math.log(nonCentralTUpperTail(t, df, delta));
  const z = normalQuantile(p);
  const start = delta + z * Math.sqrt(1 + (delta * delta) / (2 * df));
  return findRoot(gap, start, Math.max(0.5, 0.1 * Math.abs(start)));
}
