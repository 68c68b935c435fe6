import { describe, expect, it } from 'vitest';
import { readTolerance } from './read-tolerance.ts';
import { writeTolerance } from './write-tolerance.ts';
import type { StatedTolerance } from './stated-tolerance.ts';

const read = (nominal: string, tolerance: string, more: { geometric?: boolean; comma?: boolean } = {}) =>
  readTolerance({
    nominal,
    tolerance,
    geometric: more.geometric ?? false,
    ...(more.comma ? { locale: { decimalSign: ',' as const, groupSign: '.' as const } } : {}),
  });

describe('a tolerance written in a table', () => {
  const cases: [string, string, StatedTolerance][] = [
    ['12.5', '±0.1', { form: 'symmetric', nominal: '12.5', tolerance: '0.1' }],
    ['12.5', '+/-0.10', { form: 'symmetric', nominal: '12.5', tolerance: '0.10' }],
    ['25 ±0.05', '', { form: 'symmetric', nominal: '25', tolerance: '0.05' }],
    ['4x Ø9.5 ± 0.15', '', { form: 'symmetric', nominal: '9.5', tolerance: '0.15' }],
    ['10', '+0.2/-0.1', { form: 'deviations', nominal: '10', upper: '0.2', lower: '-0.1' }],
    ['10', '-0.1/+0.2', { form: 'deviations', nominal: '10', upper: '0.2', lower: '-0.1' }],
    ['12.5 +0.1 -0.0', '', { form: 'deviations', nominal: '12.5', upper: '0.1', lower: '0.0' }],
    ['12.5', '+0.03 / +0.01', { form: 'deviations', nominal: '12.5', upper: '0.03', lower: '0.01' }],
    ['12.5', '0/-0.1', { form: 'deviations', nominal: '12.5', upper: '0', lower: '-0.1' }],
    ['25 H7', '', { form: 'fit', nominal: '25', fitClass: 'H7' }],
    ['25', 'js6', { form: 'fit', nominal: '25', fitClass: 'js6' }],
    ['', 'min 3', { form: 'min', lower: '3' }],
    ['≥ 45 N', '', { form: 'min', lower: '45' }],
    ['', '≤ 0.8', { form: 'max', upper: '0.8', zeroBound: false }],
    ['', '0.8 max.', { form: 'max', upper: '0.8', zeroBound: false }],
    ['', '9.95…10.05', { form: 'limits', lower: '9.95', upper: '10.05', nominal: null }],
    ['10', '9.95 - 10.05', { form: 'limits', lower: '9.95', upper: '10.05', nominal: '10' }],
    ['9.95-10.05', '', { form: 'limits', lower: '9.95', upper: '10.05', nominal: null }],
    ['9.95...10.05', '', { form: 'limits', lower: '9.95', upper: '10.05', nominal: null }],
    ['-0.5 to 0.5', '', { form: 'limits', lower: '-0.5', upper: '0.5', nominal: null }],
    ['0', '2 total', { form: 'symmetric', nominal: '0', tolerance: '1' }],
    ['0', '0.25 total', { form: 'symmetric', nominal: '0', tolerance: '0.125' }],
    ['30', 'ISO 2768-mK', { form: 'general', nominal: '30', generalClass: 'm', feature: 'linear' }],
    ['27', '', { form: 'none', nominal: '27' }],
    ['', '', { form: 'none', nominal: null }],
  ];
  it.each(cases)('reads nominal "%s" with "%s"', (nominal, tolerance, stated) => {
    expect(read(nominal, tolerance)).toMatchObject({ stated });
  });

  it('reads a bare number as the width of a geometric zone and refuses it on a size', () => {
    expect(read('0', '0.25', { geometric: true })).toMatchObject({
      stated: { form: 'max', upper: '0.25', zeroBound: true },
    });
    expect(read('25', '0.25')).toMatchObject({ code: 'bare-tolerance' });
  });

  it('takes brackets as basic, parentheses as reference, and returns the unit that was written', () => {
    expect(read('[52.0]', '')).toMatchObject({ hint: 'basic', stated: { form: 'none', nominal: '52.0' } });
    expect(read('(Ø27)', '')).toMatchObject({ hint: 'reference', stated: { form: 'none', nominal: '27' } });
    expect(read('', '≤ 0.8 µm')).toMatchObject({ unit: 'µm', stated: { form: 'max', upper: '0.8' } });
  });

  it('reads decimal commas only where the file is declared to have them', () => {
    expect(read('12,5', '±0,10', { comma: true })).toMatchObject({
      stated: { form: 'symmetric', nominal: '12.5', tolerance: '0.10' },
    });
    expect(read('12,5', '±0,10')).toMatchObject({ undetermined: true });
  });

  it.each([
    ['25', '< 0.8', 'strict-limit'],
    ['', '±0.1', 'no-nominal'],
    ['', 'H7', 'no-nominal'],
    ['abc', '±0.1', 'nominal-unreadable'],
    ['25', 'see note', 'tolerance-unreadable'],
    ['M16x1.5-6g', '', 'tolerance-unreadable'],
    ['25', "'; DROP TABLE parts", 'tolerance-unreadable'],
  ])('refuses nominal "%s" with "%s" and says why', (nominal, tolerance, code) => {
    expect(read(nominal, tolerance)).toMatchObject({ undetermined: true, code });
  });

  it('answers at once whatever is put into the cell', () => {
    for (const text of [
      '9'.repeat(199),
      '+'.repeat(199),
      '1.'.repeat(99),
      "1'".repeat(99),
      '- '.repeat(99),
    ]) {
      const began = performance.now();
      read(text, text);
      expect(performance.now() - began).toBeLessThan(50);
    }
  });
});

describe('a stated tolerance written into two cells', () => {
  const all: [StatedTolerance, boolean][] = [
    [{ form: 'symmetric', nominal: '25.00', tolerance: '0.10' }, false],
    [{ form: 'deviations', nominal: '25', upper: '0.2', lower: '-0.10' }, false],
    [{ form: 'deviations', nominal: '25', upper: '-0.1', lower: '-0.2' }, false],
    [{ form: 'deviations', nominal: '25', upper: '0.00', lower: '-0.2' }, false],
    [{ form: 'limits', lower: '9.95', upper: '10.05', nominal: null }, false],
    [{ form: 'limits', lower: '-9.95', upper: '-9.05', nominal: '-9.5' }, false],
    [{ form: 'max', upper: '0.80', zeroBound: false }, false],
    [{ form: 'max', upper: '0.80', zeroBound: true }, false],
    [{ form: 'max', upper: '0.15', zeroBound: true }, true],
    [{ form: 'min', lower: '45' }, false],
    [{ form: 'fit', nominal: '25', fitClass: 'H7' }, false],
    [{ form: 'general', nominal: '30', generalClass: 'm', feature: 'linear' }, false],
    [{ form: 'general', nominal: '3', generalClass: 'c', feature: 'radius-chamfer' }, false],
    [{ form: 'general', nominal: '45', generalClass: 'f', feature: 'angular' }, false],
    [{ form: 'general', nominal: '45', generalClass: 'f', feature: 'angular', shorterLeg: '50' }, false],
    [{ form: 'none', nominal: '27.0' }, false],
    [{ form: 'none', nominal: null }, false],
  ];
  it.each(all)('reads back the same: %o', (stated, geometric) => {
    const cells = writeTolerance(stated, geometric);
    expect(readTolerance({ ...cells, geometric })).toMatchObject({ stated });
  });
});
