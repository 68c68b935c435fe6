import { describe, expect, it } from 'vitest';
import thresholds from '../testing/reference/capability-thresholds-ppap.json' with { type: 'json' };
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { indexGate } from './index-gate.ts';
import { minimumLowerBound } from './index-intervals.ts';
import { readingsForObservedIndex, readingsForTrueIndex } from './sample-size.ts';

function sure<T>(answer: T | Undetermined): T {
  if (isUndetermined(answer)) throw new Error(answer.reason);
  return answer;
}

describe('sample size', () => {
  it('names the first n whose bound reaches the required index', () => {
    for (const [observed, required] of [
      [1.67, 1.33],
      [1.4, 1.33],
      [2.29, 1.33],
    ] as const) {
      const { n } = sure(readingsForObservedIndex(observed, required));
      expect(sure(minimumLowerBound(observed, n)).lower).toBeGreaterThanOrEqual(required);
      expect(sure(minimumLowerBound(observed, n - 1)).lower).toBeLessThan(required);
    }
    expect(sure(readingsForObservedIndex(1.67, 1.33)).n).toBe(37);
  });

  it('needs more readings for more power and for a smaller distance', () => {
    const n = (trueIndex: number, power: number) => sure(readingsForTrueIndex(trueIndex, 1.33, { power })).n;
    expect(n(1.67, 0.9)).toBeGreaterThan(n(1.67, 0.8));
    expect(n(1.5, 0.8)).toBeGreaterThan(n(1.67, 0.8));
    expect(readingsForTrueIndex(1.33, 1.33)).toMatchObject({ code: 'not-above' });
    expect(readingsForObservedIndex(1.4, 1.3999999)).toMatchObject({ code: 'no-size' });
  });
});

it('gates an index as the trade does, 1.67 and 1.33 both left to the reviewer', () => {
  const words = {
    met: 'meets',
    'reviewer-decides': 'may be acceptable - contact customer',
    'not-met': 'does not meet',
  };
  expect(thresholds.inputs.index_values.map((index) => words[indexGate(index)])).toEqual(
    thresholds.expected.decision,
  );
});
