import { describe, expect, it } from 'vitest';
import { isUndetermined } from '../result.ts';
import rows from '../testing/reference/conformance-probability-rows.json' with { type: 'json' };
import risks from '../testing/reference/global-risk-table.json' with { type: 'json' };
import zTable from '../testing/reference/jcgm106-z-table.json' with { type: 'json' };
import zener from '../testing/reference/jcgm106-zener.json' with { type: 'json' };
import { conformanceProbability, specificRisk } from './conformance-probability.ts';
import type { NumericLimits } from './conformance-probability.ts';
import { globalRisk } from './global-risk.ts';
import { acceptanceBand, measurementCapabilityIndex } from './guard-band.ts';

function sure<T extends object>(result: T): Exclude<T, { undetermined: true }> {
  if (isUndetermined(result)) throw new Error(result.reason);
  return result as Exclude<T, { undetermined: true }>;
}
const near = (found: number, expected: number, relative: number) =>
  expect(Math.abs(found / expected - 1)).toBeLessThan(relative);
const BAND = { lower: 25, upper: 25.021 };

describe('conformance probability', () => {
  it.each(rows.inputs.rows.map((row, index) => ({ ...row, p: rows.expected.p_c[index] ?? NaN })))(
    'y $y, u $u: $p',
    ({ y, u, lower, upper, p }) => {
      const found = sure(conformanceProbability({ value: y, standardUncertainty: u }, { lower, upper }));
      expect(Math.abs(found.probability - p)).toBeLessThan(1e-9);
      expect(found.belowLower + found.probability + found.aboveUpper).toBeCloseTo(1, 14);
    },
  );

  it('of the diode of JCGM 106 is 0.919; the guide prints 0.92', () => {
    const { y, u, upper } = zener.inputs;
    const found = sure(conformanceProbability({ value: y, standardUncertainty: u }, { lower: null, upper }));
    near(found.probability, zener.expected.p_c, 1e-9);
    expect(Math.abs(found.probability - zener.published.p_c)).toBeLessThan(zener.published.tolerance_abs);
  });

  it('keeps its digits far outside the band', () => {
    const found = sure(
      conformanceProbability({ value: 10, standardUncertainty: 1 }, { lower: -1, upper: 0 }),
    );
    near(found.probability, 7.61985302416e-24 - 1.9106595744986e-28, 1e-10);
    const mirrored = sure(
      conformanceProbability({ value: -10, standardUncertainty: 1 }, { lower: 0, upper: 1 }),
    );
    near(mirrored.probability, found.probability, 1e-13);
  });

  it('believes the process before the measurement when a prior is given', () => {
    const found = sure(
      conformanceProbability(
        { value: 10.2, standardUncertainty: 0.1 },
        { lower: 9.8, upper: 10.2 },
        { mean: 10, standardDeviation: 0.1 },
      ),
    );
    expect(found.estimate).toBeCloseTo(10.1, 12);
    expect(found.standardDeviation).toBeCloseTo(0.1 / Math.SQRT2, 12);
    near(found.probability, 0.921339306, 1e-6);
    expect(found.method).toBe('normal measurement result with a normal prior');
  });

  it('is the risk of the consumer when accepted and of the producer when refused', () => {
    const measured = { value: 25.0205, standardUncertainty: 0.002 };
    const accepted = sure(specificRisk(measured, BAND, true));
    const refused = sure(specificRisk(measured, BAND, false));
    expect(accepted).toMatchObject({ bearer: 'consumer' });
    expect(refused).toMatchObject({ bearer: 'producer' });
    expect(accepted.risk).toBeCloseTo(1 - 0.598706325683, 9);
    expect(refused.risk).toBeCloseTo(0.598706325683, 9);
    expect(specificRisk(measured, { lower: null, upper: null }, true)).toMatchObject({ code: 'no-limits' });
  });

  it('refuses what no probability can be taken from', () => {
    const of = (value: number, standardUncertainty: number, limits: NumericLimits) =>
      conformanceProbability({ value, standardUncertainty }, limits);
    expect(of(NaN, 1, BAND)).toMatchObject({ code: 'not-finite' });
    expect(of(1, 1, { lower: null, upper: Infinity })).toMatchObject({ code: 'not-finite' });
    expect(of(1, 1, { lower: -Infinity, upper: null })).toMatchObject({ code: 'not-finite' });
    expect(of(1, 0, BAND)).toMatchObject({ code: 'spread-not-positive' });
    expect(of(1, 1, { lower: 2, upper: 1 })).toMatchObject({ code: 'limits-crossed' });
    expect(
      conformanceProbability({ value: 1, standardUncertainty: 1 }, BAND, { mean: NaN, standardDeviation: 1 }),
    ).toMatchObject({ code: 'not-finite' });
    expect(
      conformanceProbability({ value: 1, standardUncertainty: 1 }, BAND, { mean: 1, standardDeviation: 0 }),
    ).toMatchObject({ code: 'spread-not-positive' });
  });
});

describe('guard bands from a probability', () => {
  it.each(zTable.expected.rows.map((row, index) => ({ ...row, printed: zTable.published.z[index] ?? NaN })))(
    'need z = $z for $p_c at one limit; the guide prints $printed',
    ({ p_c, z, printed }) => {
      const found = sure(acceptanceBand({ lower: null, upper: 10 }, 0.5, p_c));
      near(found.multiplier, z, 1e-9);
      expect(Math.abs(found.multiplier - printed)).toBeLessThan(0.006);
      expect(found.upper).toBeCloseTo(10 - z * 0.5, 9);
      expect(found.lower).toBeNull();
    },
  );

  it('need more at two close limits, and then the edge of the zone has exactly that probability', () => {
    const limits = { lower: 0, upper: 4.2 };
    const band = sure(acceptanceBand(limits, 1, 0.95));
    expect(band.multiplier).toBeGreaterThan(1.645);
    const edge = sure(conformanceProbability({ value: band.upper ?? NaN, standardUncertainty: 1 }, limits));
    expect(edge.probability).toBeCloseTo(0.95, 12);
    const wide = sure(acceptanceBand({ lower: 0, upper: 100 }, 1, 0.95));
    near(wide.multiplier, 1.64485362695, 1e-9);
    expect(wide.lower).toBeCloseTo(1.64485362695, 9);
  });

  it('are undetermined where no reading could show conformity, and for odd probabilities', () => {
    expect(acceptanceBand({ lower: 0, upper: 3 }, 1, 0.95)).toMatchObject({ code: 'uncertainty-too-large' });
    for (const p of [0.5, 1, 0, 2])
      expect(acceptanceBand(BAND, 1, p)).toMatchObject({ code: 'probability-outside' });
    expect(acceptanceBand(BAND, -1, 0.95)).toMatchObject({ code: 'spread-not-positive' });
  });

  it('compare the band with the uncertainty', () => {
    expect(measurementCapabilityIndex({ lower: 25, upper: 25.02 }, 0.00125)).toMatchObject({
      index: expect.closeTo(4, 9) as number,
      tolerance: expect.closeTo(0.02, 12) as number,
    });
    expect(measurementCapabilityIndex({ lower: null, upper: 1 }, 0.1)).toMatchObject({ code: 'one-sided' });
    expect(measurementCapabilityIndex({ lower: 0, upper: 1 }, 0)).toMatchObject({
      code: 'spread-not-positive',
    });
  });
});

describe('global risk', () => {
  const limits = { lower: -1, upper: 1 };

  it.each(
    risks.expected.rows.map((row, index) => ({
      ...row,
      global: risks.published.global_pct[index] ?? NaN,
      conditional: risks.published.conditional_pct[index] ?? NaN,
    })),
  )('with $in_tolerance_probability of the process in tolerance', (row) => {
    const found = sure(
      globalRisk(limits, { mean: 0, standardDeviation: row.process_sd }, row.measurement_sd),
    );
    near(found.consumerRisk * 100, row.global_consumer_risk_pct, 1e-9);
    near((found.conditionalConsumerRisk ?? NaN) * 100, row.conditional_false_accept_pct, 1e-9);
    near(found.producerRisk * 100, row.global_producer_risk_pct, 1e-9);
    near(found.conformingProbability, row.in_tolerance_probability, 1e-9);
    expect(Math.abs(found.consumerRisk * 100 - row.global)).toBeLessThan(2e-6);
    expect(Math.abs((found.conditionalConsumerRisk ?? NaN) * 100 - row.conditional)).toBeLessThan(2e-6);
  });

  it('adds up: accepted = conforming − producer risk + consumer risk, also with fine and coarse measurement', () => {
    for (const u of [0.003, 0.03, 0.3, 3])
      for (const mean of [0, 0.7, 3])
        for (const acceptance of [limits, { lower: -0.8, upper: 0.8 }, { lower: -1.2, upper: 1.1 }]) {
          const found = sure(globalRisk(limits, { mean, standardDeviation: 0.4 }, u, acceptance));
          expect(found.conformingProbability - found.producerRisk + found.consumerRisk).toBeCloseTo(
            found.acceptanceProbability,
            11,
          );
        }
  });

  it('moves from the consumer to the producer with a guard band', () => {
    const process = { mean: 0, standardDeviation: 0.5 };
    const simple = sure(globalRisk(limits, process, 0.1));
    const guarded = sure(globalRisk(limits, process, 0.1, { lower: -0.8, upper: 0.8 }));
    expect(guarded.consumerRisk).toBeLessThan(simple.consumerRisk / 10);
    expect(guarded.producerRisk).toBeGreaterThan(simple.producerRisk * 3);
    expect(guarded.acceptance).toEqual({ lower: -0.8, upper: 0.8 });
  });

  it('holds for one limit, and is symmetric', () => {
    const upper = sure(globalRisk({ lower: null, upper: 1 }, { mean: 0, standardDeviation: 0.5 }, 0.1));
    const lower = sure(globalRisk({ lower: -1, upper: null }, { mean: 0, standardDeviation: 0.5 }, 0.1));
    near(upper.consumerRisk, lower.consumerRisk, 1e-12);
    near(upper.producerRisk, lower.producerRisk, 1e-12);
    const both = sure(globalRisk(limits, { mean: 0, standardDeviation: 0.5 }, 0.1));
    near(both.consumerRisk, 2 * upper.consumerRisk, 1e-9);
  });

  it('has no conditional share where nothing is accepted or refused, and refuses odd inputs', () => {
    expect(globalRisk({ lower: 100, upper: 101 }, { mean: 0, standardDeviation: 0.1 }, 0.1)).toMatchObject({
      conditionalConsumerRisk: null,
    });
    expect(globalRisk({ lower: -100, upper: 100 }, { mean: 0, standardDeviation: 0.1 }, 0.1)).toMatchObject({
      conditionalProducerRisk: null,
    });
    expect(globalRisk(limits, { mean: 0, standardDeviation: 0 }, 0.1)).toMatchObject({
      code: 'spread-not-positive',
    });
    expect(globalRisk(limits, { mean: 0, standardDeviation: 1 }, 0.1, { lower: 1, upper: 0 })).toMatchObject({
      code: 'limits-crossed',
    });
  });
});
