import { betaOddsQuantile, betaPrefix, regularizedBetaPair } from './beta.ts';

/** Density of F with df1 and df2 degrees of freedom at f > 0. */
export function fDensity(f: number, df1: number, df2: number): number {
  if (f <= 0 || f === Infinity) return 0;
  const sum = df1 * f + df2;
  return betaPrefix(df1 / 2, df2 / 2, (df1 * f) / sum, df2 / sum) / f;
}

/** P(F ≤ f) = I_x(df1/2, df2/2) with x = df1·f/(df1·f + df2). */
export function fCdf(f: number, df1: number, df2: number): number {
  if (f <= 0) return 0;
  if (f === Infinity) return 1;
  const sum = df1 * f + df2;
  return regularizedBetaPair((df1 * f) / sum, df2 / sum, df1 / 2, df2 / 2);
}

/** P(F > f), the p value of a variance ratio. */
export function fUpperTail(f: number, df1: number, df2: number): number {
  if (f <= 0) return 1;
  if (f === Infinity) return 0;
  const sum = df1 * f + df2;
  return regularizedBetaPair(df2 / sum, (df1 * f) / sum, df2 / 2, df1 / 2);
}

/** f with P(F ≤ f) = p, 0 < p < 1. */
export function fQuantile(p: number, df1: number, df2: number): number {
  return (df2 / df1) * betaOddsQuantile(p, df1 / 2, df2 / 2, false);
}

/** f with P(F > f) = q, 0 < q < 1. */
export function fUpperQuantile(q: number, df1: number, df2: number): number {
  return (df2 / df1) * betaOddsQuantile(q, df1 / 2, df2 / 2, true);
}
