import { nonCentralTQuantile, nonCentralTUpperTail } from '../distributions/non-central-t.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { minimumLowerBound } from './index-intervals.ts';
import type { BoundMethod } from './index-intervals.ts';

const LARGEST = 1_000_000;

export interface ReadingsNeeded {
  readonly method: string;
  readonly n: number;
  readonly inputs: Readonly<Record<string, number>>;
}

/**
 * Smallest number of readings for which an observed index has a lower confidence bound of at least the required one.
 * Example: an observed 1.67 shows 1.33 with 95 % from 37 readings on; at 1.40 it takes several hundred.
 * Undetermined when the observed index is not above the required one, or more than a million readings would be needed.
 */
export function readingsForObservedIndex(
  observed: number,
  required: number,
  options: { readonly confidence?: number; readonly method?: BoundMethod } = {},
): ReadingsNeeded | Undetermined {
  if (!(observed > required) || !Number.isFinite(observed)) {
    return undetermined('not-above', 'The observed index must be above the required one');
  }
  const { confidence = 0.95, method = 'normal-n-1' } = options;
  if (!(confidence > 0.5 && confidence < 1))
    return undetermined('confidence', 'The confidence must lie between 0.5 and 1');
  const reaches = (n: number): boolean => {
    const bound = minimumLowerBound(observed, n, { confidence, method });
    return !('undetermined' in bound) && bound.lower >= required;
  };
  const n = smallest(reaches);
  if (n === undefined) return undetermined('no-size', `More than ${LARGEST} readings would be needed`);
  return { method: `lower bound by ${method}`, n, inputs: { observed, required, confidence } };
}

/**
 * Smallest number of readings with which a process of a given true index will show the required one: its lower bound (noncentral t) reaches
 * the required index with probability `power`. Uses 3 sqrt(n) C-hat ~ t(n - 1; 3 sqrt(n) C), so it is exact for one side of a normal process.
 * @param power probability of success, default 0.8
 */
export function readingsForTrueIndex(
  trueIndex: number,
  required: number,
  options: { readonly confidence?: number; readonly power?: number } = {},
): ReadingsNeeded | Undetermined {
  const { confidence = 0.95, power = 0.8 } = options;
  if (!(trueIndex > required) || !Number.isFinite(trueIndex)) {
    return undetermined('not-above', 'The true index must be above the required one');
  }
  if (!(confidence > 0.5 && confidence < 1 && power > 0 && power < 1)) {
    return undetermined(
      'confidence',
      'The confidence must lie between 0.5 and 1 and the power between 0 and 1',
    );
  }
  const reaches = (n: number): boolean => {
    const scale = 3 * Math.sqrt(n);
    const needed = nonCentralTQuantile(confidence, n - 1, scale * required);
    return nonCentralTUpperTail(needed, n - 1, scale * trueIndex) >= power;
  };
  const n = smallest(reaches);
  if (n === undefined) return undetermined('no-size', `More than ${LARGEST} readings would be needed`);
  return { method: 'noncentral t, power', n, inputs: { trueIndex, required, confidence, power } };
}

/** The smallest n from 2 on that passes, for a test that stays passed once passed. */
function smallest(passes: (n: number) => boolean): number | undefined {
  let high = 2;
  while (!passes(high)) {
    if (high >= LARGEST) return undefined;
    high = Math.min(LARGEST, high * 2);
  }
  let low = 1;
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (passes(middle)) high = middle;
    else low = middle;
  }
  return high;
}
