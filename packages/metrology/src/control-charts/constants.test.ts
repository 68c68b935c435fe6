import { describe, expect, it } from 'vitest';
import exact from '../testing/reference/const-exact-n2-25.json';
import misprints from '../testing/reference/const-misprints.json';
import published from '../testing/reference/const-published-table.json';
import { relativeError } from '../testing/relative-error.ts';
import { isUndetermined } from '../result.ts';
import { chartConstants } from './constants.ts';
import { c4, d2, d3 } from './single-constants.ts';
import type { ChartConstants } from './constants.ts';

function constantsOf(n: number): ChartConstants {
  const constants = chartConstants(n);
  if (isUndetermined(constants)) throw new Error(constants.reason);
  return constants;
}
type Name = keyof ChartConstants;

describe('chart constants', () => {
  it.each(exact.expected.rows.map((row) => [row[0] as number, row] as const))(
    'n = %i agrees with independent integration to 10 digits',
    (n, row) => {
      const constants = constantsOf(n);
      exact.expected.columns.forEach((column, index) => {
        // The fixture prints 12 digits; its own error at D3 is that of 1 − 3·d3/d2, absolute.
        const error = Math.abs(constants[column as Name] - (row[index] as number));
        expect(error, column).toBeLessThan(1e-10 * Math.max(1, constants[column as Name]));
      });
    },
  );

  it('has the closed forms d2(2) = 2/√π, d2(3) = 3/√π, d3(2) = √(2 − 4/π), c4(2) = √(2/π) to 13 digits', () => {
    expect(relativeError(constantsOf(2).d2, 2 / Math.sqrt(Math.PI))).toBeLessThan(1e-13);
    expect(relativeError(constantsOf(3).d2, 3 / Math.sqrt(Math.PI))).toBeLessThan(1e-13);
    expect(relativeError(constantsOf(2).d3, Math.sqrt(2 - 4 / Math.PI))).toBeLessThan(1e-12);
    expect(relativeError(constantsOf(2).c4, Math.sqrt(2 / Math.PI))).toBeLessThan(1e-14);
  });

  it('meets the classical printed table, in which five entries are one unit off in the last place', () => {
    const off: string[] = [];
    for (const row of published.expected.rows)
      for (const [name, printed] of Object.entries(row)) {
        if (name === 'n') continue;
        const half = name === 'c4' ? 0.00005 : 0.0005;
        const value = constantsOf(row.n)[name as Name];
        if (Math.abs(value - printed) > half * 1.000001) off.push(`${name}(${row.n})`);
        expect(Math.abs(value - printed)).toBeLessThan(2 * half);
      }
    expect(off.sort()).toEqual(
      published.published.deviations_from_exact.map((entry) => `${entry.constant}(${entry.n})`).sort(),
    );
  });

  it('does not carry the misprints seen in a copied table', () => {
    for (const { constant, n, printed, correct } of misprints.expected.misprints) {
      const value = constantsOf(n)[constant as Name];
      // D4(18) = 1.608718 is printed 1.608 in the classical tables and so in the column of correct values.
      expect(Math.abs(value - correct)).toBeLessThan(constant === 'D4' ? 0.001 : 0.0005);
      expect(Math.abs(value - printed)).toBeGreaterThan(0.0005);
    }
  });

  it('has the factors of median charts (1.880, 1.187, 0.796, 0.691, 0.548, 0.508: common tables, from memory)', () => {
    [1.88, 1.187, 0.796, 0.691, 0.548, 0.508].forEach((factor, index) =>
      expect(Math.abs(constantsOf(index + 2).A6 - factor)).toBeLessThan(0.0011),
    );
  });

  it('gives single constants beyond 25, and a reason where there is none', () => {
    // d2(100) = 5.015 and c4(100) = 0.997478 to the digits of common tables (from memory); d3 falls slowly.
    expect(Math.abs((d2(100) as number) - 5.015)).toBeLessThan(0.0005);
    expect(c4(100)).toBeCloseTo(0.997478, 6);
    expect(d3(100)).toBeCloseTo(0.605, 3);
    for (const f of [d2, d3, c4]) expect(f(1)).toMatchObject({ code: 'outside-domain' });
  });

  it('refuses subgroups outside 2 to 25', () => {
    for (const n of [1, 26, 2.5, NaN]) expect(chartConstants(n)).toMatchObject({ code: 'outside-table' });
  });
});
