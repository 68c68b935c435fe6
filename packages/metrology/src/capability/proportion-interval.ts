import { betaQuantile } from '../distributions/beta.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

export interface Proportion {
  readonly count: number;
  readonly of: number;
  readonly share: number;
  readonly lower: number;
  readonly upper: number;
  readonly confidence: number;
}

/**
 * A counted share with its exact two-sided limits (Clopper and Pearson, Biometrika 26, 1934): the lower limit is the (1 - confidence)/2 quantile
 * of beta(k, n - k + 1), the upper one the opposite quantile of beta(k + 1, n - k); 0 at k = 0 and 1 at k = n.
 * Undetermined when nothing was counted.
 */
export function exactProportion(count: number, of: number, confidence = 0.95): Proportion | Undetermined {
  if (!(of > 0)) return undetermined('too-few', 'There was no opportunity to count');
  const alpha = (1 - confidence) / 2;
  return {
    count,
    of,
    share: count / of,
    lower: count === 0 ? 0 : betaQuantile(alpha, count, of - count + 1),
    upper: count === of ? 1 : betaQuantile(1 - alpha, count + 1, of - count),
    confidence,
  };
}
