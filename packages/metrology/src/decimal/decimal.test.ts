import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import rounding from '../testing/reference/rounding-iso80000.json' with { type: 'json' };
import {
  absolute,
  addDecimals,
  compareDecimals,
  digitsAtScale,
  formatDecimal,
  largerDecimal,
  multiplyDecimals,
  negate,
  smallerDecimal,
  subtractDecimals,
  toNumber,
  trimZeros,
} from './decimal.ts';
import type { Decimal } from './decimal.ts';
import { parseDecimal } from './parse-decimal.ts';
import { integerSquareRoot, ratio, ratioToDecimal, ratioToNumber } from './ratio.ts';
import { roundDecimal } from './round-decimal.ts';
import type { RoundingMode } from './round-decimal.ts';

const d = (text: string) => parseDecimal(text) as Decimal;
const show = formatDecimal;
const decimals = fc
  .tuple(fc.bigInt({ min: -(10n ** 30n), max: 10n ** 30n }), fc.integer({ min: 0, max: 20 }))
  .map(([digits, scale]): Decimal => ({ digits, scale }));

describe('decimal arithmetic', () => {
  it('keeps the decimals of the finer number in a sum and adds them in a product', () => {
    expect(show(addDecimals(d('25'), d('0.021')))).toBe('25.021');
    expect(show(addDecimals(d('0.1'), d('0.20')))).toBe('0.30');
    expect(show(subtractDecimals(d('4.35'), d('0.1')))).toBe('4.25');
    expect(show(multiplyDecimals(d('0.10'), d('-0.3')))).toBe('-0.030');
  });

  it('compares by value and not by the way of writing', () => {
    expect(compareDecimals(d('2.50'), d('2.5'))).toBe(0);
    expect(compareDecimals(d('2.499'), d('2.5'))).toBe(-1);
    expect(compareDecimals(d('-2.5'), d('-2.51'))).toBe(1);
    expect(show(smallerDecimal(d('2.5'), d('2.50')))).toBe('2.5');
    expect(show(largerDecimal(d('2.5'), d('2.50')))).toBe('2.5');
    expect(show(smallerDecimal(d('3'), d('2.50')))).toBe('2.50');
    expect(show(largerDecimal(d('2'), d('2.50')))).toBe('2.50');
  });

  it('turns signs and drops zeros only where asked', () => {
    expect([show(negate(d('0.5'))), show(absolute(d('-0.5'))), show(absolute(d('0.5')))]).toEqual([
      '-0.5',
      '0.5',
      '0.5',
    ]);
    expect([show(trimZeros(d('2.500'))), show(trimZeros(d('2.500'), 2)), show(trimZeros(d('200')))]).toEqual([
      '2.5',
      '2.50',
      '200',
    ]);
    expect(toNumber(d('-12.50'))).toBe(-12.5);
  });

  it('obeys the laws of arithmetic exactly', () => {
    fc.assert(
      fc.property(decimals, decimals, decimals, (a, b, c) => {
        expect(compareDecimals(addDecimals(a, b), addDecimals(b, a))).toBe(0);
        expect(compareDecimals(subtractDecimals(addDecimals(a, b), b), a)).toBe(0);
        const left = multiplyDecimals(a, addDecimals(b, c));
        expect(compareDecimals(left, addDecimals(multiplyDecimals(a, b), multiplyDecimals(a, c)))).toBe(0);
        expect(compareDecimals(a, b)).toBe(0 - compareDecimals(b, a));
      }),
    );
  });

  it('gives back the text it was read from', () => {
    fc.assert(
      fc.property(decimals, (a) => {
        expect(d(show(a))).toEqual(a);
      }),
    );
  });
});

describe('rounding', () => {
  const places: Record<string, number> = { '0.1': 1, '0.01': 2, '0.001': 3, '1': 0, '10': -1 };

  it.each(rounding.inputs.rows.map((row, index) => ({ ...row, index })))(
    'rounds $x to a multiple of $range by both rules of ISO 80000-1 annex B',
    ({ x, range, index }) => {
      const to = places[range] ?? NaN;
      expect(show(roundDecimal(d(x), to, 'half-even'))).toBe(rounding.expected.rule_A[index]);
      expect(show(roundDecimal(d(x), to, 'half-up'))).toBe(rounding.expected.rule_B[index]);
    },
  );

  it.each([
    ['half-even', ['2', '-2', '4', '3', '-3', '3', '-3']],
    ['half-up', ['3', '-3', '4', '3', '-3', '3', '-3']],
    ['half-down', ['2', '-2', '3', '3', '-3', '3', '-3']],
    ['up', ['3', '-3', '4', '4', '-4', '3', '-3']],
    ['down', ['2', '-2', '3', '3', '-3', '2', '-2']],
    ['ceiling', ['3', '-2', '4', '4', '-3', '3', '-2']],
    ['floor', ['2', '-3', '3', '3', '-4', '2', '-3']],
  ] as const)('%s treats ties and rests as its name says', (mode, expected) => {
    const values = ['2.5', '-2.5', '3.5', '3.2', '-3.2', '2.7', '-2.7'];
    expect(values.map((value) => show(roundDecimal(d(value), 0, mode)))).toEqual(expected);
  });

  it('rounds in one step and pads to the places asked for', () => {
    expect(show(roundDecimal(d('12.254'), 1))).toBe('12.3');
    expect(show(roundDecimal(d('2.5'), 3))).toBe('2.500');
    expect(show(roundDecimal(d('1250'), -2))).toBe('1200');
    expect(show(roundDecimal(d('-0.4'), 0))).toBe('0');
  });

  it('never moves a number by more than half a unit, and leaves whole multiples alone', () => {
    const modes: RoundingMode[] = ['half-even', 'half-up', 'half-down'];
    fc.assert(
      fc.property(decimals, fc.integer({ min: 0, max: 20 }), fc.constantFrom(...modes), (a, to, mode) => {
        const rounded = roundDecimal(a, to, mode);
        const moved = absolute(subtractDecimals(rounded, a));
        expect(
          compareDecimals(multiplyDecimals(moved, d('2')), { digits: 1n, scale: to }),
        ).toBeLessThanOrEqual(0);
        expect(roundDecimal(rounded, to, mode)).toEqual(rounded);
      }),
    );
  });
});

describe('fractions', () => {
  it('are kept in lowest terms with a positive denominator', () => {
    expect(ratio(6n, -4n)).toEqual({ numerator: -3n, denominator: 2n });
    expect(ratio(0n, 5n)).toEqual({ numerator: 0n, denominator: 1n });
  });

  it('become decimals where the decimals end, and null where they do not', () => {
    expect(ratioToDecimal({ numerator: 1n, denominator: 8n })).toEqual({ digits: 125n, scale: 3 });
    expect(ratioToDecimal({ numerator: -3n, denominator: 50n })).toEqual({ digits: -6n, scale: 2 });
    expect(ratioToDecimal({ numerator: 7n, denominator: 1n }, 2)).toEqual({ digits: 700n, scale: 2 });
    expect(ratioToDecimal({ numerator: 3n, denominator: 9n })).toBeNull();
  });

  it('become the nearest number', () => {
    expect(ratioToNumber({ numerator: 1n, denominator: 3n })).toBe(1 / 3);
    expect(ratioToNumber({ numerator: -2n, denominator: 3n })).toBe(-2 / 3);
    expect(ratioToNumber({ numerator: 0n, denominator: 3n })).toBe(0);
    expect(ratioToNumber({ numerator: 10n ** 40n, denominator: 7n })).toBe(
      Number('1428571428571428571428571428571428571428.571'),
    );
    expect(ratioToNumber({ numerator: 1n, denominator: 10n ** 40n })).toBe(1e-40);
  });

  it('have square roots rounded down', () => {
    fc.assert(
      fc.property(fc.bigInt({ min: 0n, max: 10n ** 40n }), (n) => {
        const root = integerSquareRoot(n);
        expect(root * root <= n && (root + 1n) * (root + 1n) > n).toBe(true);
      }),
    );
    expect([0n, 1n, 2n, 3n, 4n, 8n, 9n].map(integerSquareRoot)).toEqual([0n, 1n, 1n, 1n, 2n, 2n, 3n]);
    expect(digitsAtScale({ digits: 25n, scale: 1 }, 3)).toBe(2500n);
  });
});
