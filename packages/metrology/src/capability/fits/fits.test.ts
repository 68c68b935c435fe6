import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import fixture from '../../testing/fixtures/capability-fits.json' with { type: 'json' };
import fitTests from '../../testing/fixtures/fit-tests.json' with { type: 'json' };
import furnace from '../../testing/reference/nist-furnace-capability.json' with { type: 'json' };
import { demoStudy } from '../../testing/demo-studies.ts';
import { normalUpperTail } from '../../distributions/normal.ts';
import { isUndetermined } from '../../result.ts';
import type { Undetermined } from '../../result.ts';
import { distributionOf } from './distribution-of.ts';
import { BOUNDED_FAMILIES, compareFits, fitDistribution } from './fit-distribution.ts';
import { judgeFit, simulatedTail } from './fit-quality.ts';
import { FAMILIES } from './fitted-model.ts';
import { johnsonFromQuantiles } from './johnson-fit.ts';

function sure<T>(answer: T | Undetermined): T {
  if (isUndetermined(answer)) throw new Error(answer.reason);
  return answer;
}

const samples = {
  runout: demoStudy('TD-20417', '10', 'spindle 1'),
  furnace: furnace.inputs.x,
  position: fixture.samples.position,
  flatness: fixture.samples.flatness,
};
type SampleName = keyof typeof samples;
const names = Object.keys(samples) as SampleName[];

describe.each(names)('maximum likelihood on the %s readings against SciPy', (name) => {
  it.each(['lognormal', 'weibull', 'gamma', 'folded-normal', 'half-normal', 'rayleigh'] as const)(
    '%s',
    (family) => {
      const expected = fixture.fits[name][family];
      const model = sure(fitDistribution(samples[name], family));
      // Nelder-Mead stops a little short of the maximum: ours must be at least as likely and at most a hair more.
      expect(model.logLikelihood).toBeGreaterThan(
        expected.log_likelihood - 1e-8 * Math.abs(expected.log_likelihood),
      );
      expect(model.logLikelihood).toBeLessThan(
        expected.log_likelihood + 1e-6 * Math.abs(expected.log_likelihood),
      );
      const { lowerQuantile, upperQuantile } = distributionOf(model);
      expect(Math.abs(lowerQuantile(0.5) / expected.median - 1)).toBeLessThan(1e-4);
      expect(Math.abs(upperQuantile(0.00135) / expected.high - 1)).toBeLessThan(2e-4);
      expect(Math.abs(lowerQuantile(0.00135) / expected.low - 1)).toBeLessThan(1e-2);
      expect(Math.abs(judgeFit(model, samples[name]).squaredDistance / expected.a2 - 1)).toBeLessThan(1e-2);
    },
  );

  it('Box-Cox', () => {
    const expected = fixture.fits[name]['box-cox'];
    const model = sure(fitDistribution(samples[name], 'box-cox'));
    expect(model.parameters['lambda']).toBeCloseTo(expected.lambda_, 3);
    expect(Math.abs(model.logLikelihood / expected.log_likelihood - 1)).toBeLessThan(1e-8);
  });
});

describe('laws of the fits', () => {
  const sample = fc
    .array(fc.integer({ min: 1, max: 1000 }), { minLength: 20, maxLength: 60 })
    .filter((values) => new Set(values).size > 5);

  it('scale with the unit and move with the natural bound', () => {
    fc.assert(
      fc.property(
        sample,
        fc.constantFrom(0.001, 25.4, 40),
        fc.integer({ min: -50, max: 50 }),
        (values, scale, shift) => {
          for (const family of BOUNDED_FAMILIES) {
            const base = sure(fitDistribution(values, family));
            const moved = sure(
              fitDistribution(
                values.map((x) => x * scale + shift),
                family,
                shift,
              ),
            );
            const far = distributionOf(base).upperQuantile(0.00135);
            expect(
              Math.abs((distributionOf(moved).upperQuantile(0.00135) - shift) / (far * scale) - 1),
            ).toBeLessThan(1e-5);
            expect(
              judgeFit(
                moved,
                values.map((x) => x * scale + shift),
              ).p,
            ).toBeCloseTo(judgeFit(base, values).p, 4);
          }
        },
      ),
      { numRuns: 60 },
    );
  });

  it('do not depend on the order of the readings', () => {
    const turned = [...samples.flatness].reverse();
    for (const family of FAMILIES) {
      const [a, b] = [turned, samples.flatness].map((values) =>
        distributionOf(sure(fitDistribution(values, family))).upperQuantile(0.00135),
      );
      expect((a ?? NaN) / (b ?? NaN)).toBeCloseTo(1, 12);
    }
  });
});

describe('comparison of fits', () => {
  it('puts gamma first for the runout and rejects normal, Weibull and the one-parameter families', () => {
    const { chosen, fits, allRejected } = compareFits(samples.runout, [...BOUNDED_FAMILIES, 'normal']);
    expect(chosen?.model.family).toBe('gamma');
    expect(allRejected).toBe(false);
    expect(
      fits
        .filter((fit) => fit.quality.rejected)
        .map((fit) => fit.model.family)
        .sort(),
    ).toEqual(['folded-normal', 'half-normal', 'normal', 'rayleigh', 'weibull']);
  });

  it('keeps the best of rejected fits and says that all were', () => {
    const twoHumps = Array.from({ length: 60 }, (_, i) => (i < 30 ? 1 + i / 1000 : 9 + i / 1000));
    const comparison = compareFits(twoHumps, BOUNDED_FAMILIES);
    expect(comparison.allRejected).toBe(true);
    expect(comparison.chosen).toBe(comparison.fits[0]);
  });

  it('lists the families that could not be fitted, with the reason', () => {
    const comparison = compareFits([0, 0.1, 0.2, 0.3], ['lognormal', 'rayleigh', 'half-normal', 'johnson']);
    expect(comparison.failed.map(({ family, why }) => [family, why.code])).toEqual([
      ['lognormal', 'on-bound'],
      ['rayleigh', 'on-bound'],
      ['johnson', 'too-few'],
    ]);
    expect(compareFits([1, 2, NaN], ['gamma']).failed[0]?.why.code).toBe('not-finite');
    expect(compareFits([1, 2, 3], ['gamma'], 2).failed[0]?.why.code).toBe('below-bound');
  });
});

describe('Johnson curves', () => {
  const curves = [
    { family: 'johnson', variant: 'unbounded', parameters: { gamma: -1, delta: 2, xi: 3, lambda: 0.5 } },
    { family: 'johnson', variant: 'bounded', parameters: { gamma: 0.4, delta: 1.5, xi: -2, lambda: 7 } },
    { family: 'johnson', variant: 'lognormal', parameters: { gamma: 0.4, delta: 1.5, xi: -2, lambda: 1 } },
  ] as const;

  it('come back from their own four quantiles', () => {
    for (const curve of curves) {
      const at = (z: number) => distributionOf(curve).lowerQuantile(normalUpperTail(-z));
      const found = sure(johnsonFromQuantiles([at(-1.8), at(-0.6), at(0.6), at(1.8)], 0.6));
      expect(found.variant).toBe(curve.variant);
      for (const key of ['gamma', 'delta', 'xi', 'lambda'] as const)
        expect(found[key]).toBeCloseTo(curve.parameters[key], 8);
    }
  });

  it('describe a sample drawn along a curve and hold every reading', () => {
    for (const curve of curves) {
      const values = Array.from({ length: 200 }, (_, i) =>
        distributionOf(curve).lowerQuantile((i + 0.5) / 200),
      );
      const model = sure(fitDistribution(values, 'johnson'));
      expect(judgeFit(model, values).p).toBeGreaterThan(0.5);
      const truth = distributionOf(curve).upperQuantile(0.00135);
      expect(Math.abs(distributionOf(model).upperQuantile(0.00135) / truth - 1)).toBeLessThan(0.05);
    }
  });

  it('need distinct quantiles', () => {
    expect(johnsonFromQuantiles([1, 1, 2, 3], 0.5)).toMatchObject({ code: 'no-fit' });
    expect(
      fitDistribution(
        Array.from({ length: 30 }, (_, i) => (i < 28 ? 1 : 2)),
        'johnson',
      ),
    ).toMatchObject({ code: 'no-fit' });
  });
});

describe('p values of fits', () => {
  it('give every simulated point its tail, and mix neighbouring shapes', () => {
    fitTests.tails.forEach((tail, place) => {
      for (const [family, points] of [
        ['weibull', fitTests.weibull],
        ['half-normal', fitTests.half_normal],
        ['rayleigh', fitTests.rayleigh],
      ] as const) {
        expect(simulatedTail(family, 0, points[place] ?? NaN)).toBeCloseTo(tail, 10);
      }
      expect(simulatedTail('gamma', 2, fitTests.gamma['2'][place] ?? NaN)).toBeCloseTo(tail, 10);
      expect(simulatedTail('folded-normal', 7, fitTests.folded_normal['3'][place] ?? NaN)).toBeCloseTo(
        tail,
        10,
      );
    });
    const between = simulatedTail('gamma', 1.5, 0.77);
    expect(between).toBeGreaterThan(simulatedTail('gamma', 2, 0.77));
    expect(between).toBeLessThan(simulatedTail('gamma', 1, 0.77));
  });

  it('fall as the distance grows, past the last point too, and stop at 0.9', () => {
    expect(simulatedTail('rayleigh', 0, 0.01)).toBe(0.9);
    let last = 1;
    for (const squared of [0.2, 0.3, 0.6, 1.3, 2.9, 3, 4, 10, 40]) {
      const p = simulatedTail('rayleigh', 0, squared);
      expect(p).toBeLessThan(last);
      last = p;
    }
    expect(last).toBeGreaterThan(0);
  });

  it('lie within 0.004 of the published points of Stephens for exponential and extreme value (from memory) at 5 %', () => {
    // Rayleigh squared is exponential; the logarithm of Weibull is extreme value. n = 100 undoes the factors 1 + 0.6/n and 1 + 0.2/sqrt(n).
    expect(Math.abs(simulatedTail('rayleigh', 0, 1.321 / 1.006) - 0.05)).toBeLessThan(0.004);
    expect(Math.abs(simulatedTail('weibull', 0, 0.757 / 1.02) - 0.05)).toBeLessThan(0.004);
  });
});
