import { describe, expect, it } from 'vitest';
import { judgeAttribute, verdictOfCode, VERDICT_CODE, VERDICTS, worstVerdict } from './verdict.ts';

describe('the worst verdict', () => {
  it('is out of tolerance before undecided before not measured before in tolerance', () => {
    const order = ['in-tolerance', 'not-measured', 'undecided', 'out-of-tolerance'] as const;
    for (const [index, verdict] of order.entries()) {
      expect(worstVerdict(order.slice(0, index + 1))).toBe(verdict);
      expect(worstVerdict([...order.slice(0, index + 1)].reverse())).toBe(verdict);
    }
  });

  it('of nothing is not measured', () => {
    expect(worstVerdict([])).toBe('not-measured');
    expect(worstVerdict(['in-tolerance'])).toBe('in-tolerance');
  });

  it('has a code for each verdict', () => {
    expect(Object.values(VERDICT_CODE).map(verdictOfCode)).toEqual([
      'not-measured',
      'in-tolerance',
      'out-of-tolerance',
      'undecided',
    ]);
    expect(VERDICTS).toHaveLength(4);
    expect(verdictOfCode(9)).toBe('not-measured');
  });
});

describe('an attribute row', () => {
  it('fails with one failed piece and is not measured without pieces', () => {
    expect(judgeAttribute({ checked: 50, failed: 0 })).toMatchObject({
      verdict: 'in-tolerance',
      n: 50,
      failed: 0,
    });
    expect(judgeAttribute({ checked: 50, failed: 1 })).toMatchObject({ verdict: 'out-of-tolerance' });
    expect(judgeAttribute({ checked: 1, failed: 1 })).toMatchObject({ verdict: 'out-of-tolerance' });
    expect(judgeAttribute({ checked: 0, failed: 0 })).toMatchObject({ verdict: 'not-measured' });
  });

  it('refuses counts that cannot be', () => {
    expect(judgeAttribute({ checked: 5, failed: 6 })).toMatchObject({ code: 'more-failed-than-checked' });
    for (const [checked, failed] of [
      [-1, 0],
      [5, -1],
      [2.5, 0],
      [5, 0.5],
      [NaN, 0],
      [Infinity, 0],
    ] as const)
      expect(judgeAttribute({ checked, failed })).toMatchObject({ code: 'not-a-count' });
  });
});
