import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { addDecimals, compareDecimals, formatDecimal, powerOfTen } from '../decimal/decimal.ts';
import type { Decimal } from '../decimal/decimal.ts';
import { parseDecimal } from '../decimal/parse-decimal.ts';
import { roundDecimal } from '../decimal/round-decimal.ts';
import { isUndetermined } from '../result.ts';
import { evaluateReadings } from './evaluate-readings.ts';
import { judgeReading } from './judge-reading.ts';
import { verdictOfCode } from './verdict.ts';

vi.setConfig({ testTimeout: 60_000 });

/** Small deterministic generator (xorshift32), so that a failing run can be repeated. */
function* numbers(seed: number): Generator<number, never> {
  let state = seed;
  for (;;) {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    yield state >>> 0;
  }
}

/** A number written in digits at a scale, in BigInt alone: the independent arithmetic of this test. */
function written(digits: bigint, scale: number): string {
  const text = (digits < 0n ? -digits : digits).toString().padStart(scale + 1, '0');
  const whole = scale === 0 ? text : `${text.slice(0, -scale)}.${text.slice(-scale)}`;
  return (digits < 0n ? '-' : '') + whole;
}

describe('exactness at the limit', () => {
  it('judges a million random decimals at, one unit inside and one unit outside a limit as integers do', () => {
    const random = numbers(20_260_101);
    const next = () => random.next().value;
    const groups = 1000;
    const size = 1000;
    let compared = 0;
    let wrong = 0;
    for (let group = 0; group < groups; group += 1) {
      const limitScale = next() % 10;
      const span = 10n ** BigInt(1 + (next() % 14));
      const lower = (BigInt(next()) * BigInt(next())) % span;
      const signed = next() % 2 === 0 ? lower : -lower;
      const upper = signed + (BigInt(next()) % span);
      const limits = { lower: written(signed, limitScale), upper: written(upper, limitScale) };
      const texts: string[] = [];
      const expected: boolean[] = [];
      for (let index = 0; index < size; index += 1) {
        const extra = next() % 7;
        const factor = 10n ** BigInt(extra);
        const edge = (next() % 2 === 0 ? signed : upper) * factor;
        const step = index % 4 === 3 ? (BigInt(next()) * factor) % (span * factor) : BigInt((index % 4) - 1);
        const digits = edge + step;
        texts.push(written(digits, limitScale + extra));
        expected.push(digits >= signed * factor && digits <= upper * factor);
      }
      const found = evaluateReadings(texts, limits);
      if (isUndetermined(found)) throw new Error(found.reason);
      for (let index = 0; index < size; index += 1) {
        compared += 1;
        if ((verdictOfCode(found.verdicts[index] ?? 0) === 'in-tolerance') !== expected[index]) wrong += 1;
      }
    }
    expect(compared).toBe(1_000_000);
    expect(wrong).toBe(0);
  });
});

const decimal = fc
  .tuple(fc.bigInt({ min: -(10n ** 18n), max: 10n ** 18n }), fc.integer({ min: 0, max: 18 }))
  .map(([digits, scale]): Decimal => ({ digits, scale }));
const width = fc
  .tuple(fc.bigInt({ min: 0n, max: 10n ** 12n }), fc.integer({ min: 0, max: 12 }))
  .map(([digits, scale]): Decimal => ({ digits, scale }));

describe('laws of the verdict', () => {
  const settings = { numRuns: 2000 };

  it('one reading and a list of readings are judged alike', () => {
    fc.assert(
      fc.property(
        decimal,
        width,
        fc.array(decimal, { maxLength: 8 }),
        fc.boolean(),
        (low, span, readings, e29) => {
          const limits = { lower: formatDecimal(low), upper: formatDecimal(addDecimals(low, span)) };
          const rule = { kind: 'simple', rounding: e29 ? 'e29' : 'absolute' } as const;
          const texts = readings.map(formatDecimal);
          const found = evaluateReadings(texts, limits, rule);
          if (isUndetermined(found)) throw new Error(found.reason);
          expect([...found.verdicts].map(verdictOfCode)).toEqual(
            texts.map((text) => judgeReading(text, limits, rule).verdict),
          );
        },
      ),
      settings,
    );
  });

  it('rounding a reading and comparing gives the verdict of the rounding method', () => {
    fc.assert(
      fc.property(
        decimal,
        width,
        fc.bigInt({ min: -30n, max: 30n }),
        fc.integer({ min: 0, max: 3 }),
        (low, span, step, extra) => {
          const high = addDecimals(low, span);
          const places = Math.max(low.scale, high.scale);
          const nearby: Decimal = {
            digits: high.digits * powerOfTen(extra + places - high.scale) + step,
            scale: places + extra,
          };
          const rounded = roundDecimal(nearby, places, 'half-even');
          const inside = compareDecimals(rounded, low) >= 0 && compareDecimals(rounded, high) <= 0;
          const judged = judgeReading(
            formatDecimal(nearby),
            { lower: formatDecimal(low), upper: formatDecimal(high) },
            { kind: 'simple', rounding: 'e29' },
          );
          expect(judged.verdict).toBe(inside ? 'in-tolerance' : 'out-of-tolerance');
        },
      ),
      settings,
    );
  });

  it('shifting limits and reading by the same amount changes nothing', () => {
    fc.assert(
      fc.property(decimal, width, decimal, decimal, (low, span, reading, shift) => {
        const judge = (move: Decimal) =>
          judgeReading(formatDecimal(addDecimals(reading, move)), {
            lower: formatDecimal(addDecimals(low, move)),
            upper: formatDecimal(addDecimals(addDecimals(low, span), move)),
          }).verdict;
        expect(judge(shift)).toBe(judge({ digits: 0n, scale: 0 }));
      }),
      settings,
    );
  });

  it('mirroring limits and reading changes nothing, and a wider guard band never accepts more', () => {
    fc.assert(
      fc.property(decimal, width, decimal, width, width, (low, span, reading, u1, u2) => {
        const minus = (d: Decimal) => formatDecimal({ digits: -d.digits, scale: d.scale });
        const high = addDecimals(low, span);
        const plain = judgeReading(formatDecimal(reading), {
          lower: formatDecimal(low),
          upper: formatDecimal(high),
        });
        const mirrored = judgeReading(minus(reading), { lower: minus(high), upper: minus(low) });
        expect(mirrored.verdict).toBe(plain.verdict);
        expect(mirrored.deviationBeyond).toBe(plain.deviationBeyond);
        const [narrow, wide] = compareDecimals(u1, u2) <= 0 ? [u1, u2] : [u2, u1];
        const guarded = (u: Decimal) =>
          judgeReading(
            formatDecimal(reading),
            { lower: formatDecimal(low), upper: formatDecimal(high) },
            { kind: 'guard-band', expandedUncertainty: formatDecimal(u), proves: 'supplier' },
          ).verdict;
        if (guarded(wide) === 'in-tolerance') expect(guarded(narrow)).toBe('in-tolerance');
        if (guarded(wide) === 'out-of-tolerance') expect(guarded(narrow)).toBe('out-of-tolerance');
      }),
      settings,
    );
  });

  it('order of readings changes neither mean nor spread, and a shift moves only the mean', () => {
    const readings = fc.array(fc.integer({ min: -999_999, max: 999_999 }), { minLength: 2, maxLength: 40 });
    fc.assert(
      fc.property(readings, fc.integer({ min: -999_999, max: 999_999 }), (units, shift) => {
        const evaluate = (list: readonly number[]) => {
          const found = evaluateReadings(
            list.map((unit) => written(BigInt(unit), 3)),
            { lower: null, upper: '9999' },
          );
          if (isUndetermined(found)) throw new Error(found.reason);
          return found;
        };
        const plain = evaluate(units);
        const turned = evaluate([...units].reverse());
        const moved = evaluate(units.map((unit) => unit + shift));
        expect([turned.mean, turned.min, turned.max]).toEqual([plain.mean, plain.min, plain.max]);
        expect(turned.standardDeviation).toBeCloseTo(plain.standardDeviation ?? NaN, 10);
        expect(moved.standardDeviation).toBeCloseTo(plain.standardDeviation ?? NaN, 10);
        expect(moved.mean).toBeCloseTo((plain.mean ?? NaN) + shift / 1000, 10);
      }),
      { numRuns: 500 },
    );
  });

  it('what is refused is never a number', () => {
    fc.assert(
      fc.property(fc.string({ maxLength: 12 }), (text) => {
        const parsed = parseDecimal(text);
        if (isUndetermined(parsed)) return;
        expect(Number(text.trim().replace('\u2212', '-')) + 0).toBe(Number(formatDecimal(parsed)));
      }),
      { numRuns: 20_000 },
    );
  });
});
