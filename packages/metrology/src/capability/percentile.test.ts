import { describe, expect, it } from 'vitest';
import boxCox from '../testing/reference/boxcox-rupture-strength.json' with { type: 'json' };
import known from '../testing/reference/capability-percentile-known.json' with { type: 'json' };
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { normalUpperQuantile } from '../distributions/normal.ts';
import { boxCoxTransformation } from './fits/box-cox-fit.ts';
import { distributionOf } from './fits/distribution-of.ts';
import type { KnownDistribution } from './fits/distribution-of.ts';
import { empiricalPercentileIndices, percentileIndices } from './percentile-indices.ts';

function sure<T>(answer: T | Undetermined): T {
  if (isUndetermined(answer)) throw new Error(answer.reason);
  return answer;
}

const models: readonly KnownDistribution[] = [
  { family: 'lognormal', parameters: { meanLog: 0, deviationLog: 0.5 } },
  { family: 'weibull', parameters: { shape: 1.5, scale: 2 } },
  { family: 'rayleigh', parameters: { deviation: 0.03 } },
  { family: 'folded-normal', parameters: { mean: 0, deviation: 0.02 } },
  { family: 'gamma', parameters: { shape: 4, scale: 0.5 } },
  { family: 'normal', parameters: { mean: 10, deviation: 0.5 } },
];

describe('indices by percentiles', () => {
  it.each(known.expected.results.map((expected, place) => [expected.name, place] as const))(
    'reproduces %s',
    (_, place) => {
      const expected = known.expected.results[place];
      const given = known.inputs.distributions[place];
      const model = models[place];
      if (!expected || !given || !model) throw new Error('case missing');
      const limits = {
        ...(given.lsl === null ? { naturalLower: 0 } : { lower: given.lsl }),
        upper: given.usl,
      };
      const result = sure(percentileIndices(model, limits));
      const near = (actual: number, wanted: number) =>
        expect(Math.abs(actual - wanted)).toBeLessThanOrEqual(1e-7 * Math.abs(wanted));
      near(result.x0135, expected.x_0p135);
      near(result.median, expected.median);
      near(result.x99865, expected.x_99p865);
      near(sure(result.upperSide), expected.ppu);
      near(result.minimum, expected.ppk);
      near(sure(result.expectedOutside).totalPpm, expected.ppm_true);
      if (expected.ppl === null) {
        expect(result.lowerSide).toMatchObject({ code: 'no-limit' });
        expect(result.potential).toMatchObject({ code: 'one-sided' });
      } else {
        near(sure(result.lowerSide), expected.ppl);
        near(sure(result.potential), expected.pp ?? NaN);
      }
    },
  );

  it('shows what the normal formula hides: 1.67 on half-normal data is 1.24, on radial position 1.37', () => {
    // Mean and deviation of |N(0, 1)| and of the Rayleigh distribution; the limit where the normal formula reads 1.67.
    const half = Math.sqrt(2 / Math.PI);
    const halfLimit = half + 3 * 1.67 * Math.sqrt(1 - 2 / Math.PI);
    const radial = Math.sqrt(Math.PI / 2) + 3 * 1.67 * Math.sqrt(2 - Math.PI / 2);
    const folded = sure(
      percentileIndices({ family: 'half-normal', parameters: { deviation: 1 } }, { upper: halfLimit }),
    );
    const position = sure(
      percentileIndices({ family: 'rayleigh', parameters: { deviation: 1 } }, { upper: radial }),
    );
    expect(folded.minimum.toFixed(2)).toBe('1.24');
    expect(position.minimum.toFixed(2)).toBe('1.37');
    expect(Math.abs(sure(folded.expectedOutside).abovePpm - 135)).toBeLessThan(3);
    expect(Math.abs(sure(position.expectedOutside).abovePpm - 34)).toBeLessThan(2);
  });

  it('refuses empirical percentiles of 740 readings and gives them of 741', () => {
    const normal = (n: number) => Array.from({ length: n }, (_, i) => -normalUpperQuantile((i + 0.5) / n));
    expect(empiricalPercentileIndices(normal(740), { lower: -4, upper: 4 })).toMatchObject({
      code: 'too-few',
    });
    const result = sure(empiricalPercentileIndices(normal(741), { lower: -4, upper: 4 }));
    expect(result.minimum).toBeGreaterThan(1.2);
    expect(result.minimum).toBeLessThan(1.4);
    expect(result.expectedOutside).toMatchObject({ code: 'no-distribution' });
    expect(empiricalPercentileIndices([NaN], { upper: 1 })).toMatchObject({ code: 'not-finite' });
  });

  it('says when a power runs out before the far quantile', () => {
    const model = {
      family: 'box-cox',
      parameters: { lambda: -2, scale: 1, mean: 0, deviation: 0.5 },
    } as const;
    expect(percentileIndices(model, { upper: 5 })).toMatchObject({ code: 'no-quantile' });
  });
});

describe('tails and quantiles of every family', () => {
  const all: readonly KnownDistribution[] = [
    ...models,
    { family: 'folded-normal', parameters: { mean: 0.01, deviation: 0.02 } },
    { family: 'folded-normal', parameters: { mean: 5, deviation: 0.7 } },
    { family: 'half-normal', parameters: { deviation: 3 } },
    { family: 'box-cox', parameters: { lambda: 0.3, scale: 2, mean: 0.01, deviation: 0.3 } },
    { family: 'johnson', variant: 'unbounded', parameters: { gamma: -1, delta: 2, xi: 3, lambda: 0.5 } },
    { family: 'johnson', variant: 'bounded', parameters: { gamma: 0.4, delta: 1.5, xi: -2, lambda: 7 } },
    { family: 'johnson', variant: 'lognormal', parameters: { gamma: 0.4, delta: 1.5, xi: -2, lambda: 1 } },
    { family: 'gamma', origin: 4, parameters: { shape: 2, scale: 0.5 } },
  ];

  it('undo each other down to one in a billion', () => {
    for (const model of all) {
      const { lowerQuantile, lowerTail, upperQuantile, upperTail } = distributionOf(model);
      for (const p of [1e-9, 0.00135, 0.05, 0.5, 0.9]) {
        expect(Math.abs(lowerTail(lowerQuantile(p)) / p - 1)).toBeLessThan(1e-6);
        expect(Math.abs(upperTail(upperQuantile(p)) / p - 1)).toBeLessThan(1e-6);
      }
      const x = upperQuantile(0.3);
      expect(lowerTail(x) + upperTail(x)).toBeCloseTo(1, 12);
    }
  });

  it('put nothing below the bound of a positive quantity', () => {
    for (const model of all.filter(({ family, variant }) => family !== 'normal' && variant !== 'unbounded')) {
      const bottom = model.family === 'johnson' ? -2 : (model.origin ?? 0);
      expect(distributionOf(model).lowerTail(bottom)).toBe(0);
      expect(distributionOf(model).upperTail(bottom)).toBe(1);
    }
  });
});

describe('Box-Cox power of the rupture strengths (Bury, example 11.1)', () => {
  const { expected, inputs, tolerance } = boxCox;
  const transformation = () => sure(boxCoxTransformation(inputs.x));

  it('finds the likeliest power and the likelihoods at 0 and 1', () => {
    const result = transformation();
    expect(Math.abs(result.lambda - expected.lambda_hat)).toBeLessThan(tolerance.lambda_abs);
    expect(Math.abs(result.logLikelihood / expected.loglik_at_lambda_hat - 1)).toBeLessThan(
      tolerance.loglik_rel,
    );
    expect(Math.abs(result.logLikelihoodAt0 / expected.loglik_at_0 - 1)).toBeLessThan(tolerance.loglik_rel);
    expect(Math.abs(result.logLikelihoodAt1 / expected.loglik_at_1 - 1)).toBeLessThan(tolerance.loglik_rel);
    expect([result.includesLog, result.includesIdentity]).toEqual([
      expected.lambda_ci95_includes_0,
      expected.lambda_ci95_includes_1,
    ]);
  });

  it('does not change its power with the unit', () => {
    const result = transformation();
    expect(sure(boxCoxTransformation(inputs.x.map((x) => x / 25.4))).lambda).toBeCloseTo(result.lambda, 5);
  });

  it('refuses readings on or below the bound', () => {
    expect(boxCoxTransformation([0, 1, 2, 3])).toMatchObject({ code: 'on-bound' });
    expect(boxCoxTransformation([-1, 1, 2, 3])).toMatchObject({ code: 'below-bound' });
    expect(boxCoxTransformation([1, 1, 1])).toMatchObject({ code: 'no-variation' });
    expect(boxCoxTransformation([1, 2])).toMatchObject({ code: 'too-few' });
  });
});
