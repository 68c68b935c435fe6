import { expect, it } from 'vitest';
import rules from '../testing/reference/grr-acceptance-rules.json' with { type: 'json' };
import { gaugeVerdict } from './gauge-verdict.ts';

it('judges every row of the trade table, both boundaries in the middle band', () => {
  const words = rules.inputs.rows.map((row) => {
    const { verdict, reasons } = gaugeVerdict(row.pct_grr, row.ndc);
    if (verdict !== 'not-acceptable') return verdict;
    return row.pct_grr <= 30 && reasons.includes('Fewer than 5 distinct categories')
      ? 'not acceptable: ndc below 5'
      : 'not acceptable';
  });
  expect(words).toEqual(rules.expected.verdict);
});

it('follows other bands when a customer sets them', () => {
  const strict = { acceptableBelow: 5, refusedAbove: 20, smallestCategories: 10 };
  expect(gaugeVerdict(8, 14, strict).verdict).toBe('conditional');
  expect(gaugeVerdict(21, 14, strict).verdict).toBe('not-acceptable');
  expect(gaugeVerdict(2, 9, strict).reasons).toEqual(['Fewer than 10 distinct categories']);
});
