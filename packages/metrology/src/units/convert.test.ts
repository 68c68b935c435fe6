import { describe, expect, it } from 'vitest';
import cases from '../testing/reference/unit-conversions-exact.json' with { type: 'json' };
import { isUndetermined } from '../result.ts';
import { convertDecimal, findUnit } from './convert.ts';
import { UNITS } from './unit-table.ts';

const convert = (text: string, from: string, to: string, places?: number) => {
  const result = convertDecimal(text, from, to, places === undefined ? {} : { places });
  return isUndetermined(result) ? result.code : result.text;
};

describe('unit conversion', () => {
  it.each([
    ['1 in', '1', 'in', 'mm', '25.4'],
    ['0.001 in', '0.001', 'in', 'mm', '0.0254'],
    ['1 thou (mil)', '1', 'mil', 'um', '25.4'],
    ['1 ft', '1', 'ft', 'mm', '304.8'],
    ['1 lbf', '1', 'lbf', 'N', '4.4482216152605'],
    ['1 lb (avoirdupois)', '1', 'lb', 'kg', '0.45359237'],
    ['1 deg', '1', 'deg', 'arcmin', '60'],
    ['68 degF', '68', 'degF', 'degC', '20'],
    ['1 microinch', '1', 'microinch', 'um', '0.0254'],
  ])('converts %s exactly as published', (printed, text, from, to, value) => {
    const row = cases.expected.rows.find(({ frm }) => frm === printed);
    expect(row?.to.startsWith(`${value} `)).toBe(true);
    expect(convert(text, from, to)).toBe(value);
  });

  it('gives the pound per square inch, whose decimals do not end, rounded and marked as such', () => {
    expect(convert('1', 'psi', 'Pa')).toBe('endless-decimals');
    expect(convertDecimal('1', 'psi', 'Pa', { places: 9 })).toMatchObject({
      text: '6894.757293168',
      exact: false,
    });
    expect(convertDecimal('1', 'ksi', 'MPa', { places: 12 })).toMatchObject({
      text: '6.894757293168',
      exact: false,
    });
  });

  it('prints a foot-pound with the digits of its product; the published table stops at 14 of them', () => {
    const printed = cases.expected.rows.find(({ frm }) => frm === '1 lbf.ft')?.to;
    expect(printed).toBe('1.3558179483314 N.m');
    expect(convert('1', 'lbf·ft', 'N·m')).toBe('1.3558179483314004');
  });

  it('keeps the decimals entered and never rounds first', () => {
    expect(convert('1.000', 'inch', 'mm')).toBe('25.400');
    expect(convert('0.4375', 'in', 'mm')).toBe('11.1125');
    expect(convert('25.40', 'mm', 'in')).toBe('1.00');
    expect(convert('-0.50', 'mm', 'µm')).toBe('-500.00');
    expect(convert('2.50', 'mm', 'mm')).toBe('2.50');
    expect(convert('30', '%', '1')).toBe('0.3');
    expect(convert('5', 'arcmin', 'arcsec')).toBe('300');
    expect(convert('-40', '°C', '°F')).toBe('-40');
    expect(convert('0', 'K', '°C')).toBe('-273.15');
  });

  it('refuses what has no exact value, with the way out', () => {
    expect(convert('1', 'mm', 'in')).toBe('endless-decimals');
    expect(convert('1', 'mm', 'in', 6)).toBe('0.039370');
    expect(convert('60', 'HRC', 'HV')).toBe('hardness-scales');
    expect(convert('1', 'rad', 'deg')).toBe('irrational-factor');
    expect(convert('1', 'deg', 'mrad')).toBe('irrational-factor');
    expect(convert('1', 'mm', 'kg')).toBe('different-quantities');
    expect(convert('1', 'HRC', 'mm')).toBe('different-quantities');
    expect(convert('1', 'furlong', 'mm')).toBe('unknown-unit');
    expect(convert('1', 'mm', 'furlong')).toBe('unknown-unit');
    expect(convert('1,5', 'mm', 'in')).toBe('comma');
  });

  it('finds units by symbol and alias and does not mistake one for another', () => {
    const symbol = (text: string) => {
      const unit = findUnit(text);
      return isUndetermined(unit) ? unit.code : unit.symbol;
    };
    expect(['inch', 'um', '°', ' MM ', 'Newton', 'nm', 'Nm', 'mPa', 'ohm', '\u2126'].map(symbol)).toEqual([
      'in',
      'µm',
      'deg',
      'mm',
      'N',
      'nm',
      'N·m',
      'MPa',
      'Ω',
      'Ω',
    ]);
    expect(symbol('NM')).toBe('ambiguous-unit');
    expect(symbol('MW')).toBe('unknown-unit');
    expect(symbol('MIN')).toBe('min');
    expect(symbol('x'.repeat(40))).toBe('unknown-unit');
  });

  it('has one unit for every name and goes there and back exactly inside each dimension', () => {
    const names = UNITS.flatMap((unit) => [unit.symbol, ...unit.aliases]);
    expect(new Set(names).size).toBe(names.length);
    for (const from of UNITS)
      for (const to of UNITS.filter((unit) => unit.dimension === from.dimension)) {
        const there = convertDecimal('1.25', from.symbol, to.symbol);
        if (isUndetermined(there)) continue;
        expect(convertDecimal(there.text, to.symbol, from.symbol)).toMatchObject({ exact: true });
        expect(Number(convert(there.text, to.symbol, from.symbol))).toBe(1.25);
      }
  });
});
