import { describe, expect, it } from 'vitest';
import { isUndetermined } from '../result.ts';
import { formatDecimal } from './decimal.ts';
import { decimalPlaces, MAXIMUM_DIGITS, parseDecimal, parseLocaleDecimal } from './parse-decimal.ts';

const read = (text: string, options = {}) => {
  const parsed = parseDecimal(text, options);
  return isUndetermined(parsed) ? parsed.code : formatDecimal(parsed);
};

describe('a decimal number as typed', () => {
  it.each([
    ['2.50', '2.50'],
    ['25', '25'],
    ['007', '7'],
    ['0.050', '0.050'],
    ['.5', '0.5'],
    ['5.', '5'],
    ['+1.25', '1.25'],
    ['-1.25', '-1.25'],
    ['\u22121.25', '-1.25'],
    ['-0.05', '-0.05'],
    ['-0.00', '0.00'],
    ['  3.14\t', '3.14'],
    ['\u00a03.14', '3.14'],
  ])('reads %j and keeps its decimals as %s', (text, shown) => {
    expect(read(text)).toBe(shown);
  });

  it('keeps digits and scale apart, so that 2.50 is not 2.5', () => {
    expect(parseDecimal('2.50')).toEqual({ digits: 250n, scale: 2 });
    expect(parseDecimal('2.5')).toEqual({ digits: 25n, scale: 1 });
    expect(parseDecimal('-12.003')).toEqual({ digits: -12003n, scale: 3 });
  });

  it.each([
    ['', 'empty'],
    ['   ', 'empty'],
    ['NaN', 'not-finite'],
    ['Infinity', 'not-finite'],
    ['-inf', 'not-finite'],
    ['∞', 'not-finite'],
    ['0x1A', 'not-decimal'],
    ['-0b11', 'not-decimal'],
    ['0o17', 'not-decimal'],
    ['1e3', 'exponent'],
    ['1.2E-4', 'exponent'],
    ['1,5', 'comma'],
    ['1,234.5', 'comma'],
    ['-,5', 'comma'],
    ["1'234", 'grouping'],
    ['1_000', 'grouping'],
    ['1 234', 'space'],
    ['- 5', 'space'],
    ['1.2.3', 'space'],
    ['12.5 mm', 'not-a-number'],
    ['12.5mm', 'not-a-number'],
    ['OK', 'not-a-number'],
    ['.', 'not-a-number'],
    ['-', 'not-a-number'],
    ['+-5', 'not-a-number'],
    ['--5', 'not-a-number'],
    ['٣', 'not-a-number'],
    ['1/2', 'not-a-number'],
    ['=1+1', 'not-a-number'],
  ])('refuses %j as %s and never reads it as 0', (text, code) => {
    const parsed = parseDecimal(text);
    expect(isUndetermined(parsed) && parsed.code).toBe(code);
  });

  it('says in the reason what to write instead', () => {
    expect(parseDecimal('1,5')).toMatchObject({
      reason: '"1,5" has a comma: write the decimal sign as a point and leave groups out',
    });
    expect(parseDecimal('12.5 mm')).toMatchObject({
      reason: '"12.5 mm" has letters or signs after the number: enter the number alone',
    });
    expect(parseDecimal('')).toMatchObject({
      reason: 'Nothing is entered: write digits with a point, such as 12.50',
    });
    expect(parseDecimal(`x${'y'.repeat(60)}`)).toMatchObject({
      reason: `"x${'y'.repeat(23)}…" is not a number: write digits with a point, such as 12.50`,
    });
  });

  it('reads 60 digits and refuses 61, and refuses very long text without scanning it', () => {
    expect(read('9'.repeat(MAXIMUM_DIGITS))).toBe('9'.repeat(MAXIMUM_DIGITS));
    expect(read(`0.${'1'.repeat(MAXIMUM_DIGITS - 1)}`)).toBe(`0.${'1'.repeat(MAXIMUM_DIGITS - 1)}`);
    expect(read('9'.repeat(MAXIMUM_DIGITS + 1))).toBe('too-long');
    expect(read(' '.repeat(241))).toBe('too-long');
    expect(read(' '.repeat(240))).toBe('empty');
  });

  it('reads an exponent only where it is asked for', () => {
    expect(read('1.2e-4', { exponent: true })).toBe('0.00012');
    expect(read('-1.25E+3', { exponent: true })).toBe('-1250');
    expect(read('1e\u22122', { exponent: true })).toBe('0.01');
    expect(read('1e60', { exponent: true })).toBe(`1${'0'.repeat(60)}`);
    expect(read('1e61', { exponent: true })).toBe('too-long');
    expect(read(`${'9'.repeat(61)}e1`, { exponent: true })).toBe('too-long');
    expect(read('1e', { exponent: true })).toBe('not-a-number');
  });
});

describe('a number of a file whose notation is declared', () => {
  const locale = (text: string, decimalSign: '.' | ',', groupSign: '.' | ',' | ' ' | "'" | null = null) => {
    const parsed = parseLocaleDecimal(text, { decimalSign, groupSign });
    return isUndetermined(parsed) ? parsed.code : formatDecimal(parsed);
  };

  it.each([
    ['1.234,50', ',', '.', '1234.50'],
    ['-1.234.567,5', ',', '.', '-1234567.5'],
    ['1,234.5', '.', ',', '1234.5'],
    ['12,5', ',', null, '12.5'],
    ['1\u00a0234,5', ',', ' ', '1234.5'],
    ['1\u202f234,5', ',', ' ', '1234.5'],
    ["1'234.5", '.', "'", '1234.5'],
    ['1.234', '.', null, '1.234'],
    ['1.234', ',', '.', '1234'],
    [',5', ',', '.', '0.5'],
  ] as const)('reads %j with decimal sign %j and group sign %j', (text, sign, group, shown) => {
    expect(locale(text, sign, group)).toBe(shown);
  });

  it.each([
    ['1.23', ',', '.', 'grouping'],
    ['12345.678', ',', '.', 'grouping'],
    ['1.2345,6', ',', '.', 'grouping'],
    ['.123,5', ',', '.', 'grouping'],
    ['1.5', ',', null, 'wrong-sign'],
    ['1,5.000', ',', '.', 'wrong-sign'],
    ['1,5', '.', null, 'comma'],
    ['1,5', ',', ',', 'same-signs'],
    ['1,2,3', ',', null, 'comma'],
    ['', ',', '.', 'empty'],
    [' '.repeat(241), ',', ' ', 'too-long'],
  ] as const)('refuses %j with decimal sign %j and group sign %j as %s', (text, sign, group, code) => {
    expect(locale(text, sign, group)).toBe(code);
  });
});

describe('the number of decimals', () => {
  it('counts the decimals as written', () => {
    expect([decimalPlaces('2.50'), decimalPlaces('25'), decimalPlaces('.125')]).toEqual([2, 0, 3]);
    expect(decimalPlaces('2,5')).toMatchObject({ code: 'comma' });
  });
});
