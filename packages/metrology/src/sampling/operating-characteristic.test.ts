import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import published from '../testing/reference/nist-oc-52-3.json' with { type: 'json' };
import single from '../testing/reference/iso2859-single-normal.json' with { type: 'json' };
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { acceptanceProbability } from './acceptance-probability.ts';
import {
  operatingCharacteristic,
  outgoingQualityLimit,
  qualityAtAcceptance,
} from './operating-characteristic.ts';
import { planFromRiskPoints, zeroAcceptancePlan } from './plan-design.ts';

const process = { kind: 'process' } as const;

function sure<T>(answer: T | Undetermined): T {
  if (isUndetermined(answer)) throw new Error(answer.reason);
  return answer;
}

function near(actual: number, expected: number, relative: number): void {
  expect(Math.abs(actual - expected)).toBeLessThanOrEqual(relative * Math.abs(expected));
}

describe('operating characteristic of n = 52, c = 3 (NIST e-Handbook 6.2.3.2)', () => {
  const { n, c, N, p } = published.inputs;
  const plan = { sampleSize: n, acceptanceNumber: c };

  it('gives acceptance, outgoing quality and total inspection to nine digits', () => {
    const finite = sure(operatingCharacteristic(plan, p, process, { lotSize: N }));
    const endless = sure(operatingCharacteristic(plan, p, process));
    p.forEach((_, place) => {
      const point = finite.points[place];
      near(point?.acceptance ?? NaN, published.expected.pa[place] ?? NaN, 1e-9);
      near(point?.outgoingQuality ?? NaN, published.expected.aoq_with_finite_factor[place] ?? NaN, 1e-9);
      near(
        endless.points[place]?.outgoingQuality ?? NaN,
        published.expected.aoq_infinite_lot[place] ?? NaN,
        1e-9,
      );
      near(sure(point?.totalInspection ?? 0), published.expected.ati[place] ?? NaN, 1e-9);
      expect(endless.points[place]?.totalInspection).toMatchObject({ code: 'no-lot-size' });
    });
  });

  it('agrees with the printed columns within their rounding, two printed acceptances being 0.001 off', () => {
    const { points } = sure(operatingCharacteristic(plan, p, process, { lotSize: N }));
    const misprinted = points.filter(
      (point, place) => Math.abs(point.acceptance - (published.published.pa[place] ?? NaN)) > 0.0005,
    );
    expect(misprinted.map((point) => point.quality)).toEqual([0.04, 0.05]);
    points.forEach((point, place) => {
      expect(Math.abs(point.acceptance - (published.published.pa[place] ?? NaN))).toBeLessThan(0.0015);
      expect(Math.abs(sure(point.totalInspection) - (published.published.ati[place] ?? NaN))).toBeLessThan(
        1.5,
      );
    });
  });

  it('finds the outgoing quality limit of about 0.037 near 6 %', () => {
    const { limit, at } = sure(outgoingQualityLimit(plan, process));
    // scipy.optimize on p * binom.cdf(3, 52, p), version 1.10.1; the handbook reads 0.037 off its table of whole per cents.
    expect(limit).toBeCloseTo(0.0373845, 7);
    expect(at).toBeCloseTo(0.05591, 5);
  });
});

describe('outgoing quality limit of a lot', () => {
  it('is the highest point over every whole number of nonconforming pieces', () => {
    for (const [sampleSize, acceptanceNumber, lotSize] of [
      [13, 1, 60],
      [20, 0, 200],
      [80, 5, 1000],
      [50, 3, 51],
    ] as const) {
      const plan = { sampleSize, acceptanceNumber };
      const model = { kind: 'lot', lotSize } as const;
      const qualities = Array.from({ length: lotSize + 1 }, (_, pieces) => pieces / lotSize);
      const curve = sure(operatingCharacteristic(plan, qualities, model)).points.map(
        (point) => point.outgoingQuality,
      );
      const found = sure(outgoingQualityLimit(plan, model));
      expect(found.limit).toBeCloseTo(Math.max(...curve), 14);
      expect(curve[Math.round(found.at * lotSize)]).toBeCloseTo(found.limit, 14);
    }
  });
});

describe('acceptance at the AQL', () => {
  it('matches R for the sixteen reference plans', () => {
    for (const row of single.expected.rows) {
      const plan = { sampleSize: row.n, acceptanceNumber: row.Ac };
      near(sure(acceptanceProbability(plan, row.aql / 100, process)), row.pa_at_aql, 1e-8);
    }
  });

  it('shows that the producer risks printed by Birolini for (20, 0) and (500, 7) at 0.65 % do not reproduce', () => {
    const risk = (n: number, c: number) =>
      1 - sure(acceptanceProbability({ sampleSize: n, acceptanceNumber: c }, 0.0065, process));
    expect(risk(20, 0)).toBeCloseTo(0.1223, 4);
    expect(risk(500, 7)).toBeCloseTo(0.0179, 4);
  });
});

describe('the three models', () => {
  it('counts a small lot exactly: 2 of 10 nonconforming, 3 drawn, none accepted has probability 7/15', () => {
    near(
      sure(acceptanceProbability({ sampleSize: 3, acceptanceNumber: 0 }, 0.2, { kind: 'lot', lotSize: 10 })),
      7 / 15,
      1e-14,
    );
  });

  it('gives exp(-np) for no nonconformity', () => {
    const poisson = { kind: 'nonconformities' } as const;
    near(
      sure(acceptanceProbability({ sampleSize: 20, acceptanceNumber: 0 }, 0.13, poisson)),
      Math.exp(-2.6),
      1e-14,
    );
  });

  it('never accepts more at worse quality, in any model', () => {
    const plans = fc.record({
      sampleSize: fc.integer({ min: 1, max: 300 }),
      acceptanceNumber: fc.integer({ min: 0, max: 20 }),
    });
    fc.assert(
      fc.property(
        plans,
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (plan, a, b) => {
          for (const model of [
            process,
            { kind: 'nonconformities' } as const,
            { kind: 'lot', lotSize: 400 } as const,
          ]) {
            const better = sure(acceptanceProbability(plan, Math.min(a, b), model));
            const worse = sure(acceptanceProbability(plan, Math.max(a, b), model));
            expect(worse).toBeLessThanOrEqual(better + 1e-12);
          }
        },
      ),
      { numRuns: 300 },
    );
  });

  it('finds the quality again that has a given acceptance', () => {
    for (const model of [process, { kind: 'nonconformities' } as const]) {
      for (const wanted of [0.95, 0.5, 0.1, 1e-4]) {
        const quality = sure(qualityAtAcceptance({ sampleSize: 80, acceptanceNumber: 2 }, wanted, model));
        near(
          sure(acceptanceProbability({ sampleSize: 80, acceptanceNumber: 2 }, quality, model)),
          wanted,
          1e-9,
        );
      }
    }
    const lot = { kind: 'lot', lotSize: 500 } as const;
    const plan = { sampleSize: 80, acceptanceNumber: 2 };
    const pieces = Math.round(sure(qualityAtAcceptance(plan, 0.1, lot)) * 500);
    expect(sure(acceptanceProbability(plan, pieces / 500, lot))).toBeGreaterThanOrEqual(0.1);
    expect(sure(acceptanceProbability(plan, (pieces + 1) / 500, lot))).toBeLessThan(0.1);
  });

  it('refuses broken plans and qualities', () => {
    const plan = { sampleSize: 5, acceptanceNumber: 0 };
    expect(acceptanceProbability({ ...plan, sampleSize: 2.5 }, 0.1, process)).toMatchObject({
      code: 'sample-size',
    });
    expect(acceptanceProbability({ ...plan, acceptanceNumber: -1 }, 0.1, process)).toMatchObject({
      code: 'acceptance-number',
    });
    expect(acceptanceProbability(plan, 1.1, process)).toMatchObject({ code: 'quality' });
    expect(acceptanceProbability(plan, Number.NaN, process)).toMatchObject({ code: 'quality' });
    expect(acceptanceProbability(plan, 0.1, { kind: 'lot', lotSize: 4 })).toMatchObject({ code: 'lot-size' });
    expect(qualityAtAcceptance(plan, 1, process)).toMatchObject({ code: 'probability' });
    expect(qualityAtAcceptance({ sampleSize: 2, acceptanceNumber: 2 }, 0.5, process)).toMatchObject({
      code: 'accepts-all',
    });
  });
});

describe('plans made to order', () => {
  it('finds the smallest plan for 1 % / 5 % and 6 % / 10 % and no smaller one', () => {
    const points = { goodQuality: 0.01, producerRisk: 0.05, badQuality: 0.06, consumerRisk: 0.1 };
    const plan = sure(planFromRiskPoints(points, process));
    // scipy.stats.binom 1.10.1: n = 110, c = 3 has risks 0.0250 and 0.0980, n = 109 has 0.1019 at 6 %, and c = 2 (n = 88) has 0.0587 at 1 %.
    expect([plan.sampleSize, plan.acceptanceNumber]).toEqual([110, 3]);
    expect(plan.producerRisk).toBeLessThanOrEqual(0.05);
    expect(plan.consumerRisk).toBeLessThanOrEqual(0.1);
  });

  it('finds a plan with a large acceptance number as surely as a small one', () => {
    const points = { goodQuality: 0.05, producerRisk: 0.05, badQuality: 0.06, consumerRisk: 0.1 };
    const plan = sure(planFromRiskPoints(points, process));
    expect(plan.producerRisk).toBeLessThanOrEqual(0.05);
    expect(plan.consumerRisk).toBeLessThanOrEqual(0.1);
    // SciPy 1.10.1, every acceptance number from 0 upwards.
    expect([plan.sampleSize, plan.acceptanceNumber]).toEqual([4445, 246]);
  });

  it('needs fewer pieces from a small lot, and all of them when nothing else will do', () => {
    expect(sure(zeroAcceptancePlan(0.05, 0.1, process)).sampleSize).toBe(45);
    expect(sure(zeroAcceptancePlan(0.05, 0.1, { kind: 'lot', lotSize: 100 })).sampleSize).toBe(37);
    expect(sure(zeroAcceptancePlan(0.001, 0.05, { kind: 'lot', lotSize: 20 }))).toMatchObject({
      sampleSize: 19,
      inspectAll: false,
    });
    expect(sure(zeroAcceptancePlan(0.001, 0.01, { kind: 'lot', lotSize: 20 }))).toMatchObject({
      sampleSize: 20,
      inspectAll: true,
    });
  });

  it('refuses points out of order and impossible risks', () => {
    const points = { goodQuality: 0.06, producerRisk: 0.05, badQuality: 0.01, consumerRisk: 0.1 };
    expect(planFromRiskPoints(points, process)).toMatchObject({ code: 'quality' });
    expect(planFromRiskPoints({ ...points, badQuality: 0.2, producerRisk: 0 }, process)).toMatchObject({
      code: 'risk',
    });
    expect(planFromRiskPoints({ ...points, goodQuality: 1e-8, badQuality: 2e-8 }, process)).toMatchObject({
      code: 'no-plan',
    });
    expect(zeroAcceptancePlan(1e-8, 0.1, process)).toMatchObject({ code: 'no-plan' });
  });
});
