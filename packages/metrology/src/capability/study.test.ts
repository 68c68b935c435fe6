import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import piston from '../testing/reference/capability-cpk-vs-ppk-piston.json' with { type: 'json' };
import rings from '../testing/reference/chart-piston-ring.json' with { type: 'json' };
import unequal from '../testing/reference/chart-unequal-subgroups.json' with { type: 'json' };
import furnace from '../testing/reference/nist-furnace-capability.json' with { type: 'json' };
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { capabilityStudy } from './capability-study.ts';
import { equivalentDegreesOfFreedom } from './equivalent-degrees.ts';
import { minimumInterval, potentialInterval } from './index-intervals.ts';
import { momentsOf } from './moments.ts';
import { normalIndices } from './normal-indices.ts';
import { movingRangeSpread, overallSpread, withinSpread } from './spread-estimates.ts';

function sure<T>(answer: T | Undetermined): T {
  if (isUndetermined(answer)) throw new Error(answer.reason);
  return answer;
}

const near = (actual: number, expected: number, relative = 1e-9) =>
  expect(Math.abs(actual - expected)).toBeLessThanOrEqual(relative * Math.abs(expected));

describe('piston rings 74.000 +/- 0.05: within against overall', () => {
  const subgroups = rings.inputs.data;
  const limits = { lower: piston.inputs.lsl, upper: piston.inputs.usl };
  const meanOfAll = () => sure(momentsOf(subgroups.flat())).mean;

  it.each([
    ['mean-range', piston.expected.within_rbar],
    ['mean-deviation', piston.expected.within_sbar],
    ['pooled', piston.expected.within_pooled],
  ] as const)('takes the spread by %s', (method, expected) => {
    const spread = sure(withinSpread(subgroups, method));
    near(spread.sigma, expected.sigma);
    const indices = sure(normalIndices(meanOfAll(), spread.sigma, limits, 'within'));
    near(sure(indices.potential), expected.cp);
    near(indices.minimum, expected.cpk);
    expect(indices.symbols.minimum).toBe('Cpk');
  });

  it('gives Pp and Ppk from all readings', () => {
    near(meanOfAll(), piston.expected.mean);
    const spread = sure(overallSpread(subgroups.flat()));
    near(spread.sigma, piston.expected.overall.sigma);
    const indices = sure(normalIndices(meanOfAll(), spread.sigma, limits));
    near(sure(indices.potential), piston.expected.overall.cp);
    near(indices.minimum, piston.expected.overall.cpk);
    expect(indices.symbols.minimum).toBe('Ppk');
  });
});

describe('spread estimates', () => {
  it('take subgroups of unequal size', () => {
    const { subgroups } = unequal.inputs;
    const pooled = sure(withinSpread(subgroups, 'pooled'));
    near(pooled.sigma, unequal.expected.pooled_s);
    expect(pooled.degreesOfFreedom).toBe(unequal.expected.df);
    near(sure(withinSpread(subgroups, 'pooled-unbiased')).sigma, unequal.expected.pooled_s_unbiased);
    near(sure(withinSpread(subgroups, 'mean-range')).sigma, unequal.expected.mean_R_over_d2);
    near(sure(withinSpread(subgroups, 'mean-deviation')).sigma, unequal.expected.mean_s_over_c4);
  });

  it('take moving ranges over d2 of two', () => {
    const spread = sure(movingRangeSpread([1, 3, 2, 6]));
    near(spread.sigma, (2 + 1 + 4) / 3 / 1.1283791670955126, 1e-14);
    expect(spread.method).toBe('MRbar/d2');
  });

  it('have the degrees of freedom the trade uses: 0.9 k (n - 1) for ranges of five, 0.62 (n - 1) for moving ranges', () => {
    const twenty = sure(
      withinSpread(
        Array.from({ length: 20 }, (_, i) => [i, i + 1, i + 2, i + 3, i + 4]),
        'mean-range',
      ),
    );
    expect(Math.abs(twenty.degreesOfFreedom / (0.9 * 20 * 4) - 1)).toBeLessThan(0.03);
    const single = sure(movingRangeSpread(Array.from({ length: 101 }, (_, i) => i % 3)));
    expect(Math.abs(single.degreesOfFreedom / (0.62 * 100) - 1)).toBeLessThan(0.03);
    // One range of 15 readings: 10.8 in the AIAG table of d2*.
    expect(equivalentDegreesOfFreedom((0.7562 / 3.47193) ** 2)).toBeCloseTo(10.8, 1);
  });

  it('shift and scale with the readings', () => {
    const groups = fc.array(fc.array(fc.integer({ min: -99, max: 99 }), { minLength: 4, maxLength: 4 }), {
      minLength: 3,
      maxLength: 8,
    });
    fc.assert(
      fc.property(groups, fc.integer({ min: -1e4, max: 1e4 }), (subgroups, shift) => {
        for (const method of ['mean-range', 'mean-deviation', 'pooled', 'pooled-unbiased'] as const) {
          const base = withinSpread(subgroups, method);
          const moved = withinSpread(
            subgroups.map((group) => group.map((x) => (x + shift) * 4)),
            method,
          );
          if (isUndetermined(base)) expect(moved).toMatchObject({ code: base.code });
          else near(sure(moved).sigma, 4 * base.sigma);
        }
      }),
      { numRuns: 100 },
    );
  });

  it('refuse what has no spread', () => {
    expect(withinSpread([[1], [2]], 'pooled')).toMatchObject({ code: 'too-few' });
    expect(
      withinSpread(
        [
          [1, 1],
          [2, 2],
        ],
        'mean-range',
      ),
    ).toMatchObject({ code: 'no-variation' });
    expect(withinSpread([[1, NaN]], 'pooled')).toMatchObject({ code: 'not-finite' });
    expect(movingRangeSpread([1])).toMatchObject({ code: 'too-few' });
    expect(overallSpread([2, 2, 2])).toMatchObject({ code: 'no-variation' });
    expect(isUndetermined(withinSpread([Array.from({ length: 26 }, (_, i) => i)], 'mean-range'))).toBe(true);
  });
});

describe('furnace oxide thickness (NIST e-Handbook 3.5.1)', () => {
  const { x, lsl, usl, target } = furnace.inputs;
  const { expected, published } = furnace;
  const studied = () =>
    sure(
      capabilityStudy({
        values: x,
        limits: { lower: lsl, upper: usl, target },
        control: { state: 'in-control' },
      }),
    );

  it('reproduces moments, indices, expected and observed fraction outside', () => {
    const study = studied();
    near(study.moments.mean, expected.mean, 1e-8);
    near(study.moments.deviation, expected.s, 1e-8);
    near(sure(study.overall.potential), expected.cp, 1e-8);
    near(sure(study.overall.lowerSide), expected.cpl, 1e-8);
    near(sure(study.overall.upperSide), expected.cpu, 1e-8);
    near(study.overall.minimum, expected.cpk, 1e-8);
    near(sure(study.overall.offCentre), expected.k, 1e-8);
    near(sure(study.overall.cpm), expected.cpm, 1e-8);
    near(sure(study.overall.cpmk), expected.cpmk, 1e-8);
    near(study.overall.expectedOutside.belowPpm, expected.ppm_below, 1e-8);
    near(study.overall.expectedOutside.abovePpm, expected.ppm_above, 1e-8);
    expect([study.observedOutside.below, study.observedOutside.above]).toEqual([
      expected.actual_below,
      expected.actual_above,
    ]);
    expect(Math.abs(study.index - published.cpk)).toBeLessThan(published.tolerance_abs);
  });

  it('reproduces the confidence limits', () => {
    const study = studied();
    near(sure(study.potentialInterval).lower, expected.cp_ci95[0] ?? NaN, 1e-8);
    near(sure(study.potentialInterval).upper, expected.cp_ci95[1] ?? NaN, 1e-8);
    near(sure(study.indexInterval).lower, expected.cpk_ci95[0] ?? NaN, 1e-8);
    near(sure(study.indexInterval).upper, expected.cpk_ci95[1] ?? NaN, 1e-8);
    const side = sure(minimumInterval(sure(study.overall.lowerSide), x.length));
    near(side.lower, expected.cpl_ci95[0] ?? NaN, 1e-8);
    near(side.upper, expected.cpl_ci95[1] ?? NaN, 1e-8);
    near(sure(potentialInterval(expected.cp, x.length)).lower, expected.cp_ci95[0] ?? NaN, 1e-8);
  });

  it('reproduces the test of normality', () => {
    const study = studied();
    near(study.normality.squaredDistance, expected.anderson_darling_A2, 1e-8);
    near(study.normality.p, expected.p_value_dagostino_stephens, 1e-8);
  });
});

describe('what a study may say', () => {
  const values = furnace.inputs.x;
  const wide = { lower: 400, upper: 720 };

  it('calls an index capability only when the chart showed control', () => {
    const decide = (control?: Parameters<typeof capabilityStudy>[0]['control']) => {
      const study = sure(capabilityStudy({ values, limits: wide, ...(control ? { control } : {}) }));
      return [study.decision, study.isCapability];
    };
    expect(decide({ state: 'in-control' })).toEqual(['met', true]);
    expect(decide({ state: 'not-in-control' })).toEqual(['unstable', false]);
    expect(decide({ state: 'too-few' })).toEqual(['control-not-shown', false]);
    expect(decide()).toEqual(['control-not-shown', false]);
  });

  it('passes on the reasons of the chart', () => {
    const control = {
      state: 'not-in-control',
      reasons: ['subgroup 7 above the upper control limit'],
    } as const;
    expect(sure(capabilityStudy({ values, limits: wide, control })).reasons).toContain(control.reasons[0]);
  });

  it('never says met below the agreed number of readings', () => {
    const few = values.slice(0, 30);
    expect(
      sure(capabilityStudy({ values: few, limits: wide, control: { state: 'in-control' } })).decision,
    ).toBe('too-few');
    expect(
      sure(
        capabilityStudy({
          values: few,
          limits: wide,
          control: { state: 'in-control' },
          minimumReadings: 30,
        }),
      ).decision,
    ).toBe('met');
  });

  it('gates against another requirement when the class asks for one', () => {
    const requirement = { acceptAbove: 2, refuseBelow: 1.9 };
    const gated = (upper: number) =>
      sure(capabilityStudy({ values, limits: { upper }, control: { state: 'in-control' }, requirement }))
        .decision;
    expect([gated(700), gated(710), gated(720)]).toEqual(['not-met', 'reviewer-decides', 'met']);
  });

  it('fits where there is a natural bound and leaves the normal formula beside it', () => {
    const study = sure(
      capabilityStudy({ values: values.map((x) => x - 480), limits: { upper: 180, naturalLower: 0 } }),
    );
    expect(study.indexBasis).toBe('fitted distribution');
    expect(study.index).not.toBeCloseTo(study.overall.minimum, 3);
    expect(study.overall.potential).toMatchObject({ code: 'one-sided' });
    const plain = sure(capabilityStudy({ values, limits: wide }));
    expect(plain.fitted).toMatchObject({ code: 'not-asked' });
    const named = sure(capabilityStudy({ values, limits: wide, distribution: ['normal'] }));
    // The percentile method on a fitted normal is the ordinary index but for the rounding of 0.00135.
    near(named.index, plain.index, 2e-5);
  });

  it('says that no distribution describes readings of two kinds', () => {
    const mixed = Array.from({ length: 120 }, (_, i) =>
      i % 2 === 0 ? 1 + (i % 7) / 100 : 9 + (i % 11) / 100,
    );
    const study = sure(capabilityStudy({ values: mixed, limits: { upper: 20, naturalLower: 0 } }));
    expect(study.reasons.some((reason) => reason.startsWith('No distribution describes'))).toBe(true);
  });

  it('refuses what cannot be studied', () => {
    expect(capabilityStudy({ values, limits: {} })).toMatchObject({ code: 'no-limits' });
    expect(capabilityStudy({ values: [5], limits: wide })).toMatchObject({ code: 'too-few' });
    expect(capabilityStudy({ values: [5, 5, 5], limits: wide })).toMatchObject({ code: 'no-variation' });
    expect(capabilityStudy({ values: [5, NaN], limits: wide })).toMatchObject({ code: 'not-finite' });
    expect(capabilityStudy({ values, limits: wide, subgroupSize: 0 })).toMatchObject({
      code: 'subgroup-size',
    });
    expect(capabilityStudy({ values, limits: wide, confidence: 2 })).toMatchObject({ code: 'confidence' });
    expect(capabilityStudy({ values: [-1, 2, 3, 4], limits: { upper: 9, naturalLower: 0 } })).toMatchObject({
      code: 'below-bound',
    });
  });
});
