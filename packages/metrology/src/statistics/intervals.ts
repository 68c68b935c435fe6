import { chiSquareQuantile, chiSquareUpperQuantile } from '../distributions/chi-square.ts';
import { tUpperQuantile } from '../distributions/student-t.ts';
import { isUndetermined, undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import type { Reading } from './readings.ts';
import { summarize } from './summarize.ts';

/** A confidence interval with what is needed to explain it. */
export interface ConfidenceInterval {
  readonly method: string;
  readonly n: number;
  readonly confidence: number;
  readonly estimate: number;
  readonly lower: number;
  readonly upper: number;
}

/** Refuses a share that is not strictly between 0 and 1. */
export function refuseShare(value: number, name: string): Undetermined | null {
  return value > 0 && value < 1
    ? null
    : undetermined('outside-domain', `The ${name} must lie between 0 and 1`);
}

/** Two-sided confidence interval x̄ ± t(1 − α/2; n − 1)·s/√n of the mean of normal readings. ISO 2602:1980. */
export function meanInterval(
  readings: readonly Reading[],
  confidence = 0.95,
): ConfidenceInterval | Undetermined {
  const refused = refuseShare(confidence, 'confidence');
  if (refused !== null) return refused;
  const summary = summarize(readings);
  if (isUndetermined(summary)) return summary;
  const { n, mean, standardDeviation } = summary;
  if (typeof standardDeviation !== 'number') return standardDeviation;
  const reach = (tUpperQuantile((1 - confidence) / 2, n - 1) * standardDeviation) / Math.sqrt(n);
  return { method: "Student's t", n, confidence, estimate: mean, lower: mean - reach, upper: mean + reach };
}

/** Two-sided confidence interval of the deviation of normal readings: s√((n − 1)/χ²) at both tails. ISO 2854:1976. */
export function deviationInterval(
  readings: readonly Reading[],
  confidence = 0.95,
): ConfidenceInterval | Undetermined {
  const refused = refuseShare(confidence, 'confidence');
  if (refused !== null) return refused;
  const summary = summarize(readings);
  if (isUndetermined(summary)) return summary;
  const { n, standardDeviation } = summary;
  if (typeof standardDeviation !== 'number') return standardDeviation;
  const tail = (1 - confidence) / 2;
  const root = standardDeviation * Math.sqrt(n - 1);
  return {
    method: 'chi-square',
    n,
    confidence,
    estimate: standardDeviation,
    lower: root / Math.sqrt(chiSquareUpperQuantile(tail, n - 1)),
    upper: root / Math.sqrt(chiSquareQuantile(tail, n - 1)),
  };
}
