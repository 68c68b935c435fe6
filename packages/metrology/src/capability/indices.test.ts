import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import ciTable from '../testing/reference/capability-ci-table.json' with { type: 'json' };
import cpCi from '../testing/reference/capability-cp-ci-textbook.json' with { type: 'json' };
import twoProcesses from '../testing/reference/capability-cpm-two-processes.json' with { type: 'json' };
import oneSided from '../testing/reference/capability-one-sided.json' with { type: 'json' };
import ppmTable from '../testing/reference/capability-ppm-table.json' with { type: 'json' };
import sigmaLevel from '../testing/reference/capability-sigma-level.json' with { type: 'json' };
import nist from '../testing/reference/nist-capability-616.json' with { type: 'json' };
import fixture from '../testing/fixtures/capability-fits.json' with { type: 'json' };
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import {
  normalFractionOutside,
  observedFractionOutside,
  shiftedDefectsPerMillion,
} from './fraction-outside.ts';
import {
  minimumInterval,
  minimumLowerBound,
  observedIndexNeeded,
  potentialInterval,
  potentialLowerBound,
} from './index-intervals.ts';
import { normalIndices } from './normal-indices.ts';

function sure<T>(answer: T | Undetermined): T {
  if (isUndetermined(answer)) throw new Error(answer.reason);
  return answer;
}

function near(actual: number | Undetermined | undefined, expected: number, relative: number): void {
  expect(typeof actual).toBe('number');
  expect(Math.abs((actual as number) - expected)).toBeLessThanOrEqual(relative * Math.abs(expected));
}

describe('normal indices', () => {
  it('reproduces NIST e-Handbook 6.1.6, and Cpk = Cp (1 - k)', () => {
    const { mean, s, usl, lsl, target } = nist.inputs;
    const result = sure(normalIndices(mean, s, { lower: lsl, upper: usl, target }));
    const { expected } = nist;
    near(result.potential, expected.cp, 1e-10);
    near(result.lowerSide, expected.cpl, 1e-10);
    near(result.upperSide, expected.cpu, 1e-10);
    near(result.minimum, expected.cpk, 1e-10);
    near(result.offCentre, expected.k, 1e-10);
    near(result.cpm, expected.cpm, 1e-10);
    near(result.cpmk, expected.cpmk, 1e-10);
    near(result.expectedOutside.belowPpm, expected.ppm_below, 1e-10);
    near(result.expectedOutside.abovePpm, expected.ppm_above, 1e-10);
    near(result.expectedOutside.totalPpm, expected.ppm_total, 1e-10);
    expect(result.minimum).toBeCloseTo(sure(result.potential) * (1 - sure(result.offCentre)), 12);
    expect(result.worstSide).toBe('upper');
  });

  it('tells two processes of the same Cpk apart by Cpm (Montgomery 8.3.3)', () => {
    const { lsl, usl, target, processes } = twoProcesses.inputs;
    const [a, b] = processes.map(({ mean, s }) =>
      sure(normalIndices(mean, s, { lower: lsl, upper: usl, target })),
    );
    for (const [result, expected] of [
      [a, twoProcesses.expected.A],
      [b, twoProcesses.expected.B],
    ] as const) {
      near(result?.potential, expected.cp, 1e-9);
      near(result?.minimum, expected.cpk, 1e-9);
      near(result?.cpm, expected.cpm, 1e-9);
      near(result?.cpmk, expected.cpmk, 1e-9);
      near(result?.expectedOutside.belowPpm, expected.ppm_below, 1e-9);
      near(result?.expectedOutside.totalPpm, expected.ppm_total, 1e-9);
    }
  });

  it('gives one side and no Cp where there is one limit or a natural bound', () => {
    oneSided.inputs.cases.forEach((given, place) => {
      const natural = 'lsl_is_natural_limit' in given;
      const result = sure(
        normalIndices(given.mean, given.s, {
          ...(given.usl === null ? {} : { upper: given.usl }),
          ...(given.lsl === null || given.lsl === undefined
            ? {}
            : natural
              ? { naturalLower: given.lsl }
              : { lower: given.lsl }),
        }),
      );
      near(result.minimum, oneSided.expected.results[place]?.cpk ?? NaN, 1e-9);
      expect(result.potential).toMatchObject({ code: 'one-sided' });
      expect(result.cpm).toMatchObject({ code: 'one-sided' });
      expect(given.usl === null ? result.upperSide : result.lowerSide).toMatchObject({ code: 'no-limit' });
    });
  });

  it('names the worse side, the missing side and what it was asked', () => {
    const low = sure(normalIndices(1, 1, { lower: 0, upper: 10 }));
    expect(low.worstSide).toBe('lower');
    expect(low.inputs).toEqual({ mean: 1, sigma: 1, limits: { lower: 0, upper: 10 } });
    expect(sure(normalIndices(5, 1, { lower: 0, upper: 10 })).worstSide).toBe('upper');
    const one = sure(normalIndices(1, 1, { lower: 0 }));
    expect(one.worstSide).toBe('lower');
    expect(one.upperSide).toMatchObject({ reason: 'There is no upper tolerance limit' });
    expect(sure(normalIndices(1, 1, { upper: 3 })).lowerSide).toMatchObject({
      reason: 'There is no lower tolerance limit',
    });
  });

  it('measures Cpm from the target where one is given, also off the middle', () => {
    // (10 - 0)/(6 sqrt(1 + (5 - 7)^2)) and, from the middle, 10/6.
    expect(sure(sure(normalIndices(5, 1, { lower: 0, upper: 10, target: 7 })).cpm)).toBeCloseTo(
      10 / (6 * Math.sqrt(5)),
      12,
    );
    expect(sure(sure(normalIndices(5, 1, { lower: 0, upper: 10 })).cpm)).toBeCloseTo(10 / 6, 12);
  });

  it('shifts and scales with the readings', () => {
    const finite = (min: number, max: number) => fc.double({ min, max, noNaN: true });
    fc.assert(
      fc.property(
        finite(-5, 5),
        finite(0.1, 3),
        finite(-1e3, 1e3),
        finite(0.01, 100),
        (mean, sigma, shift, scale) => {
          const base = sure(normalIndices(mean, sigma, { lower: -4, upper: 6 }));
          const moved = sure(
            normalIndices((mean + shift) * scale, sigma * scale, {
              lower: (shift - 4) * scale,
              upper: (shift + 6) * scale,
            }),
          );
          expect(moved.minimum).toBeCloseTo(base.minimum, 7);
          expect(sure(moved.potential)).toBeCloseTo(sure(base.potential), 7);
          expect(base.minimum).toBeLessThanOrEqual(sure(base.potential) + 1e-12);
          const mirrored = sure(normalIndices(-mean, sigma, { lower: -6, upper: 4 }));
          expect(mirrored.minimum).toBeCloseTo(base.minimum, 12);
        },
      ),
    );
  });

  it('refuses limits it cannot use', () => {
    expect(normalIndices(1, 1, {})).toMatchObject({ code: 'no-limits' });
    expect(normalIndices(1, 1, { naturalLower: 0 })).toMatchObject({ code: 'no-limits' });
    expect(normalIndices(1, 1, { lower: 2, upper: 2 })).toMatchObject({ code: 'limits' });
    expect(normalIndices(1, 1, { upper: 0, naturalLower: 0 })).toMatchObject({ code: 'limits' });
    expect(normalIndices(1, 1, { lower: 3, naturalUpper: 2 })).toMatchObject({ code: 'limits' });
    expect(normalIndices(1, 1, { upper: NaN })).toMatchObject({ code: 'not-finite' });
    expect(normalIndices(1, 0, { upper: 2 })).toMatchObject({ code: 'no-variation' });
    expect(normalIndices(NaN, 1, { upper: 2 })).toMatchObject({ code: 'no-variation' });
  });
});

describe('fraction outside', () => {
  it('gives the exact fallout, three printed figures being rounded wrongly', () => {
    const wrong: string[] = [];
    for (const row of ppmTable.expected.rows) {
      const result = sure(normalFractionOutside(0, 1, { lower: -3 * row.index, upper: 3 * row.index }));
      // The third and two thirds stand in the table cut to twelve digits, which moves the tail in its ninth.
      near(result.abovePpm, row.ppm_one_sided, 1e-8);
      near(result.totalPpm, row.ppm_two_sided_centred, 1e-8);
      const printed =
        ppmTable.published.two_sided[row.index.toFixed(2) as keyof typeof ppmTable.published.two_sided];
      if (printed === undefined) continue;
      const digits = row.index >= 1.7 ? (row.index === 2 ? 4 : 2) : 0;
      if (result.totalPpm.toFixed(digits) !== printed.toFixed(digits)) wrong.push(row.index.toFixed(2));
    }
    expect(wrong).toEqual(['1.40', '1.80', '2.00']);
  });

  it('gives the trade table of shifted sigma levels', () => {
    sigmaLevel.expected.rows.forEach((row, place) => {
      const result = sure(shiftedDefectsPerMillion(row.sigma_level, row.shift));
      near(result.nearTail, row.dpmo_near_tail, 1e-8);
      near(result.bothTails, row.dpmo_both_tails, 1e-8);
      near(result.nearTail, sigmaLevel.published.dpmo[place] ?? NaN, sigmaLevel.published.tolerance_rel);
    });
    expect(shiftedDefectsPerMillion(NaN)).toMatchObject({ code: 'not-finite' });
  });

  it('counts a reading on a limit as conforming, and lets none found in a hundred still allow 3.6 %', () => {
    expect(sure(observedFractionOutside([1, 2, 3, 3.1, 0.9], { lower: 1, upper: 3 }))).toMatchObject({
      below: 1,
      above: 1,
      totalPpm: 400_000,
    });
    const none = sure(
      observedFractionOutside(
        Array.from({ length: 100 }, () => 2),
        { upper: 3 },
      ),
    );
    expect(sure(none.share).upper).toBeCloseTo(0.0362, 4);
    expect(observedFractionOutside([], { upper: 3 })).toMatchObject({ code: 'too-few' });
    expect(observedFractionOutside([NaN], { upper: 3 })).toMatchObject({ code: 'not-finite' });
  });
});

describe('confidence limits', () => {
  it('reproduces the table for n = 30, 50, 100, 125', () => {
    for (const row of ciTable.expected.rows) {
      const two = sure(minimumInterval(row.cpk_hat, row.n));
      near(two.lower, row.two_sided95_low, 1e-9);
      near(two.upper, row.two_sided95_high, 1e-9);
      near(sure(minimumLowerBound(row.cpk_hat, row.n)).lower, row.one_sided95_lower, 1e-9);
      const cp = sure(potentialInterval(row.cpk_hat, row.n));
      near(cp.lower, row.cp_two_sided95_low, 1e-9);
      near(cp.upper, row.cp_two_sided95_high, 1e-9);
      near(sure(potentialLowerBound(row.cpk_hat, row.n)).lower, row.cp_one_sided95_lower, 1e-9);
    }
  });

  it('gives 1.565 to 3.006 for Montgomery 8.4, printed 1.57 and 3.01 from a rounded Cp', () => {
    const { usl, lsl, n, s } = cpCi.inputs;
    const cp = (usl - lsl) / (6 * s);
    const interval = sure(potentialInterval(cp, n));
    near(interval.lower, cpCi.expected.low, 1e-9);
    near(interval.upper, cpCi.expected.high, 1e-9);
    expect(Math.abs(interval.lower - cpCi.published.low)).toBeLessThan(cpCi.published.tolerance_abs);
  });

  it('has a form with 2n that is a little narrower', () => {
    const n1 = sure(minimumInterval(1.33, 30));
    const n0 = sure(minimumInterval(1.33, 30, { form: 'normal-n' }));
    // 1.33 -/+ 1.959964 sqrt(1/270 + 1.33^2/60)
    expect(n0.lower).toBeCloseTo(1.33 - 1.959963984540054 * Math.sqrt(1 / 270 + 1.33 ** 2 / 60), 12);
    expect(n0.lower).toBeGreaterThan(n1.lower);
  });

  it('finds the noncentral-t bound and the index needed that SciPy finds', () => {
    for (const row of fixture.noncentral_t_bounds_95) {
      near(sure(minimumLowerBound(row.index, row.n, { method: 'noncentral-t' })).lower, row.lower, 1e-7);
      near(observedIndexNeeded(row.index, row.n, { method: 'noncentral-t' }), row.needed, 1e-7);
    }
  });

  it('needs the observed indices that the trade table names for a lower bound of 1.33 and 1.67', () => {
    const table: readonly (readonly [number, number, number])[] = [
      [10, 2.2, 2.75],
      [25, 1.76, 2.2],
      [30, 1.71, 2.14],
      [50, 1.61, 2.01],
      [100, 1.52, 1.9],
      [125, 1.49, 1.87],
    ];
    for (const [n, low, high] of table) {
      expect(Math.abs(sure(observedIndexNeeded(1.33, n)) - low)).toBeLessThan(0.0051);
      expect(Math.abs(sure(observedIndexNeeded(1.67, n)) - high)).toBeLessThan(0.0051);
      near(sure(minimumLowerBound(sure(observedIndexNeeded(1.33, n)), n)).lower, 1.33, 1e-12);
    }
    expect(observedIndexNeeded(1.33, 2)).toMatchObject({ code: 'too-few' });
  });

  it('holds the two-sided interval of an observed 1.67: 1.22-2.12 at 30, 1.43-1.91 at 100', () => {
    const at = (n: number) => sure(minimumInterval(1.67, n));
    expect([at(30).lower, at(30).upper, at(100).lower, at(100).upper].map((x) => x.toFixed(2))).toEqual([
      '1.22',
      '2.12',
      '1.43',
      '1.91',
    ]);
  });

  it('refuses a confidence of 1, one reading and no number', () => {
    expect(minimumInterval(1, 30, { confidence: 1 })).toMatchObject({ code: 'confidence' });
    expect(minimumLowerBound(1, 1)).toMatchObject({ code: 'too-few' });
    expect(potentialInterval(NaN, 30)).toMatchObject({ code: 'not-finite' });
  });
});
