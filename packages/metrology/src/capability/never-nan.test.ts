import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { capabilityStudy, FAMILIES } from './index.ts';
import type { CapabilityStudyRequest } from './index.ts';
import {
  attributeAgreement,
  averageRangeStudy,
  biasStudy,
  cohenKappa,
  fleissKappa,
  gaugeAnova,
  linearityStudy,
  nestedGaugeStudy,
  stabilityStudy,
} from '../measurement-systems/index.ts';
import { operatingCharacteristic, planFromRiskPoints, zeroAcceptancePlan } from '../sampling/index.ts';

/** Paths of every NaN inside an answer. */
function nanPaths(value: unknown, path = 'answer'): string[] {
  if (typeof value === 'number') return Number.isNaN(value) ? [path] : [];
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) => nanPaths(inner, `${path}.${key}`));
}

/** The request itself may hold the NaN that was handed in; answers must not. */
function holdsNoNaN(answer: unknown): void {
  const paths = nanPaths(answer).filter((path) => !path.includes('.inputs'));
  expect(paths).toEqual([]);
}

const reading = fc.oneof(
  { weight: 6, arbitrary: fc.integer({ min: -40, max: 400 }).map((x) => x / 100) },
  { weight: 2, arbitrary: fc.double({ min: 0, max: 5, noNaN: true }) },
  { weight: 1, arbitrary: fc.constantFrom(0, 1e-320, 1e-9, 1e9, 1e200, 1.7e308, -1e308) },
  { weight: 1, arbitrary: fc.double() },
);
const tame = fc.integer({ min: 0, max: 30 }).map((x) => x / 10);

describe('no answer holds NaN', { timeout: 30_000 }, () => {
  it('capability studies, whatever the readings and limits', () => {
    const limit = fc.option(fc.oneof(tame, fc.double()), { nil: undefined });
    const request = fc.record({
      values: fc.oneof(fc.array(reading, { maxLength: 40 }), fc.array(tame, { minLength: 2, maxLength: 40 })),
      lower: limit,
      upper: limit,
      naturalLower: fc.option(fc.constantFrom(0, -1), { nil: undefined }),
      distribution: fc.constantFrom<CapabilityStudyRequest['distribution'][]>(
        undefined,
        'normal',
        'fitted',
        FAMILIES,
      ),
      subgroupSize: fc.constantFrom(1, 2, 5),
    });
    fc.assert(
      fc.property(request, ({ values, lower, upper, naturalLower, distribution, subgroupSize }) => {
        holdsNoNaN(
          capabilityStudy({
            values,
            limits: {
              ...(lower === undefined ? {} : { lower }),
              ...(upper === undefined ? {} : { upper }),
              ...(naturalLower === undefined ? {} : { naturalLower }),
            },
            ...(distribution === undefined ? {} : { distribution }),
            subgroupSize,
          }),
        );
      }),
      { numRuns: 200 },
    );
  });

  it('gauge studies, whatever the readings', () => {
    const block = (value: fc.Arbitrary<number>) =>
      fc.array(fc.array(fc.array(value, { minLength: 2, maxLength: 2 }), { minLength: 2, maxLength: 2 }), {
        minLength: 2,
        maxLength: 5,
      });
    fc.assert(
      fc.property(fc.oneof(block(reading), block(tame)), (readings) => {
        for (const interaction of ['by-rule', 'keep', 'pool'] as const)
          holdsNoNaN(gaugeAnova(readings, { interaction }));
        holdsNoNaN(averageRangeStudy(readings, { tolerance: { upper: 2 } }));
        holdsNoNaN(nestedGaugeStudy(readings));
        holdsNoNaN(biasStudy(readings.flat(2), 1, { spread: 'range' }));
        holdsNoNaN(biasStudy(readings.flat(2), 1));
        holdsNoNaN(linearityStudy(readings.map((row, place) => ({ reference: place, values: row.flat() }))));
        holdsNoNaN(
          stabilityStudy(
            [...readings, ...readings, ...readings, ...readings, ...readings].map((row) => row.flat()),
          ),
        );
      }),
      { numRuns: 100 },
    );
  });

  it('agreement studies, whatever the counts', () => {
    const counts = fc.array(fc.array(fc.nat(4), { minLength: 3, maxLength: 3 }), {
      minLength: 3,
      maxLength: 3,
    });
    const decision = fc.constantFrom('accept' as const, 'reject' as const);
    fc.assert(
      fc.property(
        counts,
        fc.array(fc.tuple(decision, decision, decision), { minLength: 1, maxLength: 6 }),
        (table, votes) => {
          holdsNoNaN(cohenKappa(table));
          holdsNoNaN(fleissKappa(table));
          holdsNoNaN(
            attributeAgreement({
              decisions: votes.map(([a, b]) => [[a], [b]]),
              reference: votes.map(([, , c]) => c),
            }),
          );
        },
      ),
    );
  });

  it('sampling, whatever the plan', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -1, max: 60 }),
        fc.integer({ min: -1, max: 9 }),
        fc.double(),
        fc.double({ min: 0, max: 1 }),
        (n, c, quality, risk) => {
          const plan = { sampleSize: n, acceptanceNumber: c };
          for (const model of [
            { kind: 'process' },
            { kind: 'nonconformities' },
            { kind: 'lot', lotSize: 70 },
          ] as const) {
            holdsNoNaN(operatingCharacteristic(plan, [quality, 0, 0.1, 1], model, { lotSize: 100 }));
            holdsNoNaN(zeroAcceptancePlan(quality, risk, model));
            holdsNoNaN(
              planFromRiskPoints(
                { goodQuality: 0.01, producerRisk: risk, badQuality: quality, consumerRisk: 0.1 },
                model,
              ),
            );
          }
        },
      ),
      { numRuns: 100 },
    );
  });
});
