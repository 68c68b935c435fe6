import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import * as distributions from './index.ts';
import { isUndetermined } from '../result.ts';

const { normalCdf, normalUpperTail, normalQuantile, tCdf, tQuantile, chiSquareQuantile, chiSquareCdf } =
  distributions;

describe('the public functions answer or give a reason', () => {
  it('never give NaN, whatever number comes in', () => {
    const odd = fc.oneof(fc.double(), fc.constantFrom(0, 1, -1, NaN, Infinity, -Infinity, 1e308, 5e-324));
    const functions = Object.values(distributions).filter((f) => !/studentized|nonCentral/i.test(f.name));
    expect(functions.length).toBeGreaterThan(30);
    fc.assert(
      fc.property(odd, odd, fc.constantFrom(0.5, 3, 12, 0.3), odd, (a, b, c, d) => {
        for (const f of functions) {
          const result = (f as (...values: number[]) => unknown)(a, b, c, d);
          if (!isUndetermined(result)) expect(result).toSatisfy(Number.isFinite);
        }
      }),
      { numRuns: 100 },
    );
  });

  it('say which argument is wrong and what it must be', () => {
    expect(normalCdf(NaN)).toMatchObject({
      code: 'outside-domain',
      reason: 'normalCdf needs z to be a number: it is NaN',
    });
    expect(tQuantile(1, 5)).toMatchObject({ code: 'outside-domain' });
    expect(tQuantile(0.5, 0)).toMatchObject({ code: 'outside-domain' });
    expect(distributions.studentizedRangeCdf(3, 1, 10)).toMatchObject({ code: 'outside-domain' });
    expect(distributions.gammaFunction(180)).toMatchObject({ code: 'not-finite' });
  });
});

describe('laws', () => {
  const z = fc.double({ min: -37, max: 37, noNaN: true });
  const tail = fc.double({ min: 1e-300, max: 0.5, noNaN: true });
  const df = fc.integer({ min: 1, max: 500 });

  it('the normal distribution is symmetric and rises', () => {
    fc.assert(
      fc.property(z, z, (a, b) => {
        expect(normalCdf(a)).toBe(normalUpperTail(-a));
        if (a < b) expect(normalCdf(a) as number).toBeLessThanOrEqual(normalCdf(b) as number);
      }),
    );
  });

  it('a quantile inverts its distribution to 12 digits of the tail', () => {
    fc.assert(
      fc.property(tail, df, (p, degrees) => {
        expect((normalCdf(normalQuantile(p) as number) as number) / p).toBeCloseTo(1, 11);
        const t = tQuantile(p, degrees) as number;
        if (Math.abs(t) < 1e150) expect((tCdf(t, degrees) as number) / p).toBeCloseTo(1, 11);
        const x = chiSquareQuantile(p, degrees);
        if (!isUndetermined(x) && x > 1e-290)
          expect((chiSquareCdf(x, degrees) as number) / p).toBeCloseTo(1, 11);
      }),
    );
  });

  it('t with infinite degrees of freedom is the normal distribution', () => {
    expect(tCdf(1.3, Infinity)).toBe(normalCdf(1.3));
    expect(tQuantile(0.975, Infinity)).toBe(normalQuantile(0.975));
  });
});
