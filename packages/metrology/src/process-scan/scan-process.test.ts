import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { NELSON_RULES } from '../control-charts/rules.ts';
import { individualsChart } from '../control-charts/individuals-chart.ts';
import { applyRunRules } from '../control-charts/run-rules.ts';
import { isUndetermined } from '../result.ts';
import flow from '../testing/reference/nist-imr-flowrate.json' with { type: 'json' };
import { signalBytes } from './run-registers.ts';
import { scanProcess } from './scan-process.ts';
import type { ProcessScan } from './scan-process.ts';

const scan = (values: readonly number[], lower: number | null = -100, upper: number | null = 100) =>
  scanProcess(values, { lower, upper }) as ProcessScan;

/** Small whole numbers about 0, so that points on a line, ties and every pattern occur often. */
const series = fc.array(fc.integer({ min: -4, max: 4 }), { minLength: 1, maxLength: 60 });

describe('run rules in one pass', () => {
  it('signal exactly where the rules that name their points do', () => {
    fc.assert(
      fc.property(
        series,
        fc.constantFrom(0.5, 1, 1.5),
        fc.constantFrom(-0.5, 0, 0.25),
        (values, sigma, centre) => {
          const named = applyRunRules(values, { centre, sigma }, NELSON_RULES);
          if (isUndetermined(named)) throw new Error(named.reason);
          const expected = new Uint8Array(values.length);
          for (const { rule, point } of named) {
            const index = point - 1;
            expected[index] = (expected[index] ?? 0) | (1 << NELSON_RULES.indexOf(rule));
          }
          expect([...signalBytes(values, centre, sigma)]).toEqual([...expected]);
        },
      ),
      { numRuns: 5000 },
    );
  });

  it('find each pattern where it is completed and not before', () => {
    const at = (values: readonly number[], bit: number) =>
      [...signalBytes(values, 0, 1)].flatMap((bits, index) => (bits & (1 << bit) ? [index + 1] : []));
    expect(at([0.1, 3.1, 3, -3.1], 0)).toEqual([2, 4]);
    expect(at([0.1, 0.2, 0.1, 0.2, 0.1, 0.2, 0.1, 0.2, 0.1, 0.2], 1)).toEqual([9, 10]);
    expect(at([0, 1, 2, 3, 4, 5, 6], 2)).toEqual([6, 7]);
    expect(at([6, 5, 4, 3, 2, 1, 1], 2)).toEqual([6]);
    expect(at([1, -1, 1, -1, 1, -1, 1, -1, 1, -1, 1, -1, 1, -1, 1], 3)).toEqual([14, 15]);
    expect(at([2.1, 2.1, 0, 2.1, -2.1], 4)).toEqual([2, 4]);
    expect(at([1.1, 1.1, 0, 1.1, 1.1, 0, 1.1], 5)).toEqual([5]);
    expect(
      at(
        Array.from({ length: 16 }, () => 0.5),
        6,
      ),
    ).toEqual([15, 16]);
    expect(at([1.1, -1.1, 1.1, -1.1, 1.1, -1.1, 1.1, -1.1], 7)).toEqual([8]);
    expect(at([1.1, 1.1, 1.1, 1.1, 1.1, 1.1, 1.1, 1.1], 7)).toEqual([]);
  });
});

describe('the scan of a process', () => {
  it('reproduces the individuals chart of the NIST handbook', () => {
    const found = scan(flow.inputs.x, 0, 100);
    const { mean, mr_bar, sigma_within, x_lcl, x_ucl, mr_ucl } = flow.expected.with_exact_d2;
    expect(found.mean).toBeCloseTo(mean, 9);
    expect(found.meanMovingRange).toBeCloseTo(mr_bar, 9);
    expect(found.withinSigma).toBeCloseTo(sigma_within, 9);
    expect(found.naturalLimits.lower).toBeCloseTo(x_lcl, 8);
    expect(found.naturalLimits.upper).toBeCloseTo(x_ucl, 8);
    expect(found.movingRangeUpper).toBeCloseTo(mr_ucl, 9);
  });

  it('says of control what the chart of individuals says with the same rules', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -9, max: 9 }), { minLength: 15, maxLength: 30 }), (values) => {
        const chart = individualsChart({ readings: values, rules: { individuals: NELSON_RULES } });
        const found = scanProcess(values, { lower: -20, upper: 20 });
        if (isUndetermined(chart) || isUndetermined(found)) {
          expect([isUndetermined(chart), isUndetermined(found)]).toEqual([true, true]);
          return;
        }
        expect(found.control).toBe(chart.verdict.state);
        expect(found.withinSigma).toBeCloseTo(chart.sigmaWithin, 12);
      }),
      { numRuns: 300 },
    );
  });

  it('relates process and tolerance by both spreads', () => {
    const found = scan([10, 10.2, 9.9, 10.1, 9.8, 10, 10.3, 9.9], 9, 11.5);
    expect(found.meanMovingRange).toBeCloseTo(0.2714285714, 9);
    const { cp, cpk, pp, ppk } = found.indices;
    expect(cp).toBeCloseTo(2.5 / (6 * found.withinSigma), 12);
    expect(cpk).toBeCloseTo((found.mean - 9) / (3 * found.withinSigma), 12);
    expect(pp).toBeCloseTo(2.5 / (6 * found.standardDeviation), 12);
    expect(ppk).toBeCloseTo((found.mean - 9) / (3 * found.standardDeviation), 12);
    expect(scan([10, 10.2, 9.9], null, 11).indices).toMatchObject({ cp: null, pp: null });
    expect(scan([10, 10.2, 9.9], null, 11).indices.cpk).toBeGreaterThan(0);
    expect(scan([10, 10.2, 9.9], 9, null).indices).toMatchObject({ cp: null });
  });

  it('calls the indices capability only when control was shown', () => {
    const quiet = Array.from(
      { length: 24 },
      (_, index) => [0.3, -0.9, 1.2, -0.2, -1.1, 0.8][(index * 5 + (index >> 2)) % 6] ?? 0,
    );
    const found = scan(quiet);
    expect([found.control, found.indicesAreCapability]).toEqual(['in-control', true]);
    expect(scan(quiet.slice(0, 12))).toMatchObject({ control: 'too-few', indicesAreCapability: false });
    expect(scan([...quiet, 9])).toMatchObject({ control: 'not-in-control', indicesAreCapability: false });
    expect(scan([...quiet, 9]).signalCounts['beyond-three-sigma']).toBe(1);
    expect(scan([...quiet, 9]).movingRangesBeyond).toBe(1);
  });

  it('shift moves the mean alone, scale moves spreads alike, mirroring keeps every signal', () => {
    fc.assert(
      fc.property(
        series.filter((values) => new Set(values).size > 1),
        fc.integer({ min: -64, max: 64 }),
        (values, shift) => {
          const plain = scan(values);
          const moved = scan(values.map((value) => value + shift));
          const mirrored = scan(values.map((value) => -value));
          const doubled = scan(values.map((value) => 2 * value));
          expect(moved.mean).toBeCloseTo(plain.mean + shift, 10);
          expect(moved.standardDeviation).toBeCloseTo(plain.standardDeviation, 10);
          expect(doubled.withinSigma).toBeCloseTo(2 * plain.withinSigma, 12);
          expect([...mirrored.signals]).toEqual([...plain.signals]);
          expect([...doubled.signals]).toEqual([...plain.signals]);
        },
      ),
    );
  });

  it('gives a reason instead of a figure that is not one', () => {
    const code = (values: readonly number[], lower: number | null = 0, upper: number | null = 1) => {
      const found = scanProcess(values, { lower, upper });
      return isUndetermined(found) ? found.code : found.method;
    };
    expect(code([1])).toBe('too-few');
    expect(code([])).toBe('too-few');
    expect(code([1, 1, 1])).toBe('no-variation');
    expect(code([1, NaN, 2])).toBe('not-finite');
    expect(code([1, Infinity])).toBe('not-finite');
    expect(code([1, 2], null, null)).toBe('no-limits');
    expect(code([1, 2], 1, 0)).toBe('limits-crossed');
    expect(code([1, 2], NaN, 1)).toBe('not-finite');
  });
});
