import { chiSquareQuantile, chiSquareUpperQuantile } from '../distributions/chi-square.ts';
import { findRoot } from '../distributions/find-root.ts';
import { nonCentralTQuantile, nonCentralTUpperTail } from '../distributions/non-central-t.ts';
import { normalUpperQuantile } from '../distributions/normal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

export interface IndexInterval {
  readonly method: string;
  readonly confidence: number;
  readonly n: number;
  readonly estimate: number;
  readonly lower: number;
  readonly upper: number;
}

export interface LowerBound {
  readonly method: string;
  readonly confidence: number;
  readonly n: number;
  readonly estimate: number;
  readonly lower: number;
}

/** `normal-n-1`: Bissell's form with 2(n - 1); `normal-n`: with 2 n, as some texts print it. */
export type NormalForm = 'normal-n-1' | 'normal-n';

/** `noncentral-t` is exact for an index of one side, and safe (never too high) for the smaller of two. */
export type BoundMethod = NormalForm | 'noncentral-t';

export interface IntervalOptions {
  /** default 0.95 */
  readonly confidence?: number;
  /** Degrees of freedom of the spread where it is not n - 1 (a within spread from subgroups). */
  readonly degreesOfFreedom?: number;
}

function fault(estimate: number, n: number, confidence: number, degrees: number): Undetermined | undefined {
  if (!Number.isFinite(estimate)) return undetermined('not-finite', 'The index is not a number');
  if (!Number.isInteger(n) || n < 2 || !(degrees > 0))
    return undetermined('too-few', 'An interval needs at least two readings');
  if (!(confidence > 0 && confidence < 1))
    return undetermined('confidence', 'The confidence must lie between 0 and 1');
  return undefined;
}

/**
 * Two-sided confidence interval of Cp (or Pp): Cp sqrt(chi2(alpha/2; v)/v) to Cp sqrt(chi2(1 - alpha/2; v)/v), lower-tail quantiles, v = n - 1
 * or the degrees of freedom of the spread. Exact for a normal process (NIST/SEMATECH e-Handbook 6.1.6; the Dataplot help text exchanges the
 * two quantiles). Tested against capability-ci-table and capability-cp-ci-textbook.
 */
export function potentialInterval(
  potential: number,
  n: number,
  options: IntervalOptions = {},
): IndexInterval | Undetermined {
  const { confidence = 0.95, degreesOfFreedom = n - 1 } = options;
  const refused = fault(potential, n, confidence, degreesOfFreedom);
  if (refused) return refused;
  const alpha = (1 - confidence) / 2;
  return {
    method: 'chi-square',
    confidence,
    n,
    estimate: potential,
    lower: potential * Math.sqrt(chiSquareQuantile(alpha, degreesOfFreedom) / degreesOfFreedom),
    upper: potential * Math.sqrt(chiSquareUpperQuantile(alpha, degreesOfFreedom) / degreesOfFreedom),
  };
}

/** One-sided lower bound of Cp (or Pp): Cp sqrt(chi2(1 - confidence; v)/v). */
export function potentialLowerBound(
  potential: number,
  n: number,
  options: IntervalOptions = {},
): LowerBound | Undetermined {
  const { confidence = 0.95, degreesOfFreedom = n - 1 } = options;
  const refused = fault(potential, n, confidence, degreesOfFreedom);
  if (refused) return refused;
  const lower = potential * Math.sqrt(chiSquareQuantile(1 - confidence, degreesOfFreedom) / degreesOfFreedom);
  return { method: 'chi-square', confidence, n, estimate: potential, lower };
}

function halfWidth(index: number, n: number, degrees: number, z: number): number {
  return z * Math.sqrt(1 / (9 * n) + (index * index) / (2 * degrees));
}

/**
 * Two-sided confidence interval of Cpk (or Ppk, or one side): Cpk -/+ z sqrt(1/(9 n) + Cpk^2/(2 v)), v = n - 1 (`normal-n-1`, Bissell,
 * Appl. Stat. 39, 1990, the default) or n (`normal-n`), or the degrees of freedom of the spread. A large-sample approximation, for normal
 * data. Tested against capability-ci-table and nist-furnace-capability.
 */
export function minimumInterval(
  index: number,
  n: number,
  options: IntervalOptions & { readonly form?: NormalForm } = {},
): IndexInterval | Undetermined {
  const { confidence = 0.95, form = 'normal-n-1' } = options;
  const degrees = options.degreesOfFreedom ?? (form === 'normal-n' ? n : n - 1);
  const refused = fault(index, n, confidence, degrees);
  if (refused) return refused;
  const half = halfWidth(index, n, degrees, normalUpperQuantile((1 - confidence) / 2));
  return {
    method: methodName(form),
    confidence,
    n,
    estimate: index,
    lower: index - half,
    upper: index + half,
  };
}

/**
 * One-sided lower confidence bound of Cpk (or Ppk, or one side), by the method named. The normal forms as `minimumInterval` with the one-sided
 * z. `noncentral-t`: the index C for which an estimate at least as high as the one seen has probability 1 - confidence, from
 * 3 sqrt(n) C-hat ~ t(n - 1; 3 sqrt(n) C): exact for one side of a normal process, slightly below the normal form at small n
 * (1.37 against 1.39 at n = 10, index 2.29). Tested against capability-ci-table and SciPy.
 */
export function minimumLowerBound(
  index: number,
  n: number,
  options: IntervalOptions & { readonly method?: BoundMethod } = {},
): LowerBound | Undetermined {
  const { confidence = 0.95, method = 'normal-n-1' } = options;
  const degrees = options.degreesOfFreedom ?? (method === 'normal-n' ? n : n - 1);
  const refused = fault(index, n, confidence, degrees);
  if (refused) return refused;
  const answer = { method: methodName(method), confidence, n, estimate: index };
  if (method !== 'noncentral-t') {
    return { ...answer, lower: index - halfWidth(index, n, degrees, normalUpperQuantile(1 - confidence)) };
  }
  const scale = 3 * Math.sqrt(n);
  const start = index - halfWidth(index, n, degrees, normalUpperQuantile(1 - confidence));
  const lower = findRoot(
    (trial) => nonCentralTUpperTail(scale * index, degrees, scale * trial) - (1 - confidence),
    start,
    0.01 * Math.max(1, Math.abs(start)),
  );
  return { ...answer, lower };
}

/**
 * Index that must be observed for its lower bound to reach a required one. Normal forms: the larger root of
 * (c - R)^2 = z^2 (1/(9 n) + c^2/(2 v)); noncentral t: t(confidence; n - 1; 3 sqrt(n) R)/(3 sqrt(n)).
 * Undetermined when no index, however large, would do: v <= z^2/2, that is fewer than three readings at 95 %.
 */
export function observedIndexNeeded(
  required: number,
  n: number,
  options: IntervalOptions & { readonly method?: BoundMethod } = {},
): number | Undetermined {
  const { confidence = 0.95, method = 'normal-n-1' } = options;
  const degrees = options.degreesOfFreedom ?? (method === 'normal-n' ? n : n - 1);
  const refused = fault(required, n, confidence, degrees);
  if (refused) return refused;
  if (method === 'noncentral-t') {
    const scale = 3 * Math.sqrt(n);
    return nonCentralTQuantile(confidence, degrees, scale * required) / scale;
  }
  const z = normalUpperQuantile(1 - confidence);
  const a = 1 - (z * z) / (2 * degrees);
  const c = required * required - (z * z) / (9 * n);
  if (!(a > 0))
    return undetermined('too-few', `With ${n} readings no observed index, however high, is enough`);
  return (required + Math.sqrt(required * required - a * c)) / a;
}

function methodName(method: BoundMethod): string {
  return {
    'normal-n-1': 'normal approximation, 2(n - 1) (Bissell)',
    'normal-n': 'normal approximation, 2n',
    'noncentral-t': 'noncentral t, one side',
  }[method];
}
