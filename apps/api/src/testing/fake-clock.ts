import type { Clock } from '../clock.ts';

export interface FakeClock extends Clock {
  /** Moves time on (or back) by some milliseconds. */
  advance(milliseconds: number): void;
  set(iso: string): void;
}

export const testStart = '2026-03-02T08:00:00.000Z';

export function fakeClock(start = testStart): FakeClock {
  let millis = Date.parse(start);
  return {
    now: () => new Date(millis).toISOString(),
    millis: () => millis,
    advance: (by) => {
      millis += by;
    },
    set: (iso) => {
      millis = Date.parse(iso);
    },
  };
}
