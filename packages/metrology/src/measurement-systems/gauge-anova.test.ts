import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import fixture from '../testing/fixtures/gauge-intervals.json' with { type: 'json' };
import published from '../testing/reference/grr-aiag-anova.json' with { type: 'json' };
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { gaugeAnova } from './gauge-anova.ts';
import type { GaugeAnova } from './gauge-anova.ts';

function sure<T>(answer: T | Undetermined): T {
  if (isUndetermined(answer)) throw new Error(answer.reason);
  return answer;
}

function near(actual: number | undefined, expected: number, relative = 1e-8): void {
  expect(actual).toBeDefined();
  expect(Math.abs((actual ?? NaN) - expected)).toBeLessThanOrEqual(
    relative * Math.max(1e-12, Math.abs(expected)),
  );
}

/** The case lists appraiser, trial, part; the study wants part, appraiser, trial. */
const readings = published.inputs.data[0]?.[0]?.map((_, part) =>
  published.inputs.data.map((appraiser) => appraiser.map((trial) => trial[part] ?? NaN)),
) as number[][][];

function matchesComponents(
  result: GaugeAnova,
  expected: typeof published.expected.components_with_interaction,
): void {
  near(result.repeatability.variance, expected.repeatability_var);
  near(result.interaction.variance, expected.interaction_var);
  near(result.appraiser.variance, expected.operator_var);
  near(result.reproducibility.variance, expected.reproducibility_var);
  near(result.part.variance, expected.part_var);
  near(result.gauge.variance, expected.grr_var);
  near(result.total.variance, expected.total_var);
  near(result.gauge.standardDeviation, expected.GRR);
  near(result.gauge.percentStudy, expected.pct_study.GRR);
  near(result.part.percentStudy, expected.pct_study.PV);
  near(result.repeatability.percentContribution, expected.pct_contribution.EV);
  near(result.distinctCategoriesRaw, expected.ndc_raw);
  expect(result.distinctCategories).toBe(expected.ndc);
}

describe('gauge study of 10 parts, 3 appraisers, 3 trials by analysis of variance', () => {
  const kept = sure(gaugeAnova(readings, { interaction: 'keep' }));
  const byRule = sure(gaugeAnova(readings));

  it('reproduces sums of squares, mean squares and the F ratios over the interaction', () => {
    const { SS, df, MS, F_with_interaction_error_term: f, p } = published.expected;
    near(kept.table.appraiser.sumOfSquares, SS.operator);
    near(kept.table.part.sumOfSquares, SS.part);
    near(kept.table.interaction?.sumOfSquares, SS.interaction);
    near(kept.table.error.sumOfSquares, SS.error);
    near(kept.table.total.sumOfSquares, SS.total);
    near(kept.table.interaction?.meanSquare, MS.interaction);
    expect(kept.table.error.degreesOfFreedom).toBe(df.error);
    near(kept.table.appraiser.f, f.operator);
    near(kept.table.part.f, f.part);
    near(kept.table.interaction?.f, f.interaction);
    near(kept.table.appraiser.p, p.operator);
    near(kept.table.part.p, p.part);
    near(kept.table.interaction?.p, p.interaction);
  });

  it('shows that the printed F ratios divide by the error, which is not right for random parts and appraisers', () => {
    const { error, appraiser, part } = kept.table;
    expect((appraiser.meanSquare / error.meanSquare).toFixed(2)).toBe(
      published.published.F.appraiser.toFixed(2),
    );
    expect((part.meanSquare / error.meanSquare).toFixed(2)).toBe(published.published.F.parts.toFixed(2));
    expect(appraiser.f).not.toBeCloseTo(published.published.F.appraiser, 0);
  });

  it('sets the negative interaction component to 0 and shows what it was', () => {
    matchesComponents(kept, published.expected.components_with_interaction);
    near(kept.componentsBeforeClipping.interaction, published.expected.interaction_variance_before_clipping);
  });

  it('pools the interaction by rule at p = 0.97 and then gives the printed components', () => {
    expect(byRule.pooled).toBe(true);
    expect(byRule.table.interaction).toBeUndefined();
    near(byRule.table.error.meanSquare, published.expected.pooled_error_MS);
    expect(byRule.table.error.degreesOfFreedom).toBe(published.expected.pooled_error_df);
    near(byRule.table.appraiser.f, published.expected.F_pooled.operator);
    near(byRule.table.part.f, published.expected.F_pooled.part);
    matchesComponents(byRule, published.expected.components_without_interaction_pooled);
    const printed = published.published.pooled;
    for (const [share, value] of [
      [byRule.repeatability, printed.EV],
      [byRule.reproducibility, printed.AV],
      [byRule.gauge, printed.GRR],
      [byRule.part, printed.PV],
    ] as const) {
      expect(Math.abs(share.standardDeviation - value)).toBeLessThan(published.published.tolerance_abs);
    }
  });

  it('is not acceptable with four categories, though the share of 27.9 % alone would be conditional', () => {
    expect(byRule.verdict).toMatchObject({ verdict: 'not-acceptable' });
    expect(byRule.gauge.percentTolerance).toMatchObject({ code: 'no-tolerance' });
  });

  it('keeps the interaction when the rule asks for a p value above 0.99', () => {
    expect(sure(gaugeAnova(readings, { alphaToPool: 0.99 })).pooled).toBe(false);
  });

  it('has the confidence intervals of an independent implementation whose coverage was simulated', () => {
    const intervals = sure(kept.intervals);
    const expected = fixture.intervals_grr_aiag_anova_95;
    for (const name of [
      'repeatability',
      'appraiser',
      'interaction',
      'reproducibility',
      'gauge',
      'part',
      'total',
    ] as const) {
      near(intervals[name]?.lower, expected[name][0] ?? NaN, 1e-9);
      near(intervals[name]?.upper, expected[name][1] ?? NaN, 1e-9);
      expect(fixture.coverage_of_95_10x3x3[name]).toBeGreaterThan(0.94);
    }
  });
});

describe('laws and edges', () => {
  const block = fc.array(
    fc.array(fc.array(fc.integer({ min: -500, max: 500 }), { minLength: 2, maxLength: 2 }), {
      minLength: 3,
      maxLength: 3,
    }),
    {
      minLength: 4,
      maxLength: 4,
    },
  );

  it('does not move with the origin and scales with the square of the unit', () => {
    fc.assert(
      fc.property(
        block,
        fc.integer({ min: -10_000, max: 10_000 }),
        fc.constantFrom(0.25, 2, 8),
        (cells, shift, scale) => {
          const base = gaugeAnova(cells, { interaction: 'keep' });
          const moved = gaugeAnova(
            cells.map((row) => row.map((cell) => cell.map((x) => (x + shift) * scale))),
            { interaction: 'keep' },
          );
          if (isUndetermined(base)) return expect(moved).toMatchObject({ code: base.code });
          const result = sure(moved);
          expect(result.total.variance / (scale * scale)).toBeCloseTo(base.total.variance, 6);
          expect(result.gauge.percentStudy).toBeCloseTo(base.gauge.percentStudy, 6);
          expect(result.table.total.sumOfSquares).toBeCloseTo(
            result.table.part.sumOfSquares +
              result.table.appraiser.sumOfSquares +
              (result.table.interaction?.sumOfSquares ?? 0) +
              result.table.error.sumOfSquares,
            3,
          );
        },
      ),
      { numRuns: 60 },
    );
  });

  it('uses the additive model without repeats', () => {
    const once = sure(gaugeAnova(readings.map((row) => row.map((cell) => cell.slice(0, 1)))));
    expect(once.pooled).toBe(true);
    expect(once.table.error.degreesOfFreedom).toBe(18);
    expect(once.interactionP).toMatchObject({ code: 'no-repeats' });
  });

  it('gives shares of a two-sided and of a one-sided tolerance', () => {
    const both = sure(gaugeAnova(readings, { tolerance: { lower: -4, upper: 4 }, judgedBy: 'tolerance' }));
    expect(sure(both.gauge.percentTolerance)).toBeCloseTo((100 * 6 * both.gauge.standardDeviation) / 8, 10);
    const one = sure(gaugeAnova(readings, { tolerance: { upper: 4 } }));
    expect(sure(one.gauge.percentTolerance)).toBeCloseTo(
      (100 * 3 * one.gauge.standardDeviation) / (4 - one.mean),
      10,
    );
    expect(sure(gaugeAnova(readings, { judgedBy: 'tolerance' })).verdict).toMatchObject({
      code: 'no-tolerance',
    });
  });

  it('refuses what it cannot judge, each with its reason', () => {
    expect(gaugeAnova([[[1, 2]], [[1, 3]]])).toMatchObject({ code: 'too-few' });
    expect(gaugeAnova([[[1], [2]], [[1]]])).toMatchObject({ code: 'unbalanced' });
    expect(
      gaugeAnova([
        [[1], [2]],
        [[1], [NaN]],
      ]),
    ).toMatchObject({ code: 'not-finite' });
    expect(
      gaugeAnova([
        [
          [1, 1],
          [1, 1],
        ],
        [
          [1, 1],
          [1, 1],
        ],
      ]),
    ).toMatchObject({ code: 'no-variation' });
  });

  it('says that a gauge without any spread of its own has no interval and countless categories', () => {
    const silent = sure(
      gaugeAnova([
        [
          [1, 1],
          [1, 1],
        ],
        [
          [2, 2],
          [2, 2],
        ],
      ]),
    );
    expect(silent.distinctCategories).toBe(Infinity);
    expect(silent.intervals).toMatchObject({ code: 'no-variation' });
  });
});
