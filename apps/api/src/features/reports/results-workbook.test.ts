import { describe, expect, it } from 'vitest';
import { safeText } from '../../tables/export-text.ts';
import { numberCell } from './results-workbook.ts';

describe('a cell of a number', () => {
  it('is a number that shows the decimals it was typed with', () => {
    expect(numberCell('2.50')).toEqual({ value: 2.5, numFmt: '0.00' });
    expect(numberCell('-0.012')).toEqual({ value: -0.012, numFmt: '0.000' });
    expect(numberCell('-.5')).toEqual({ value: -0.5, numFmt: '0.0' });
    expect(numberCell('7')).toEqual({ value: 7, numFmt: '0' });
    expect(numberCell('')).toEqual({ value: null });
  });

  it('stays text where a cell would lose digits', () => {
    expect(numberCell('1.2345678901234567')).toEqual({ value: '1.2345678901234567', numFmt: '@' });
  });

  it('is defused where it is no number', () => {
    expect(numberCell('-5 mm').value).toBe("'-5 mm");
    expect(numberCell('=1+1').value).toBe("'=1+1");
    expect(numberCell('-').value).toBe("'-");
    expect(numberCell('pass').value).toBe('pass');
  });

  it('keeps its sign in a text table, however it was typed', () => {
    expect(['-0.012', '+3', '-.5', '-5.'].map(safeText)).toEqual(['-0.012', '+3', '-.5', '-5.']);
    expect(['-1+1', '+A1', '@x'].map(safeText)).toEqual(["'-1+1", "'+A1", "'@x"]);
  });
});
