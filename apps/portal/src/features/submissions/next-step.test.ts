import { packageStates } from '@trammel/shared/status';
import { describe, expect, it } from 'vitest';
import { aSubmission } from '../../testing/submissions.ts';
import { whatComesNext } from './next-step.ts';

describe('what comes next on a package', () => {
  it('is said for every state and both sides', () => {
    for (const state of packageStates) {
      for (const side of ['customer', 'supplier'] as const) {
        const { title, text } = whatComesNext(aSubmission({ state, side }));
        expect(title.length, `${state} ${side}`).toBeGreaterThan(5);
        expect(text.endsWith('.'), `${state} ${side}`).toBe(true);
      }
    }
  });

  it('leads the supplier from readings to findings to the warrant', () => {
    const counts = aSubmission().counts;
    const title = (change: Parameters<typeof aSubmission>[0]) => whatComesNext(aSubmission(change)).title;
    expect(title({ counts: { ...counts, unmeasured: 1 } })).toBe('1 row has no readings yet');
    expect(title({ findings: { stops: 2, decides: 0, informs: 0 } })).toBe('2 findings stop submission');
    expect(title({})).toBe('Nothing stops submission');
  });
});
