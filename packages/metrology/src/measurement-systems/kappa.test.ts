import { describe, expect, it } from 'vitest';
import fixture from '../testing/fixtures/gauge-intervals.json' with { type: 'json' };
import fleissCase from '../testing/reference/fleiss-kappa-14-raters.json' with { type: 'json' };
import cohenCase from '../testing/reference/msa-attribute-kappa.json' with { type: 'json' };
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { cohenKappa, fleissKappa, kappaWord } from './kappa.ts';

function sure<T>(answer: T | Undetermined): T {
  if (isUndetermined(answer)) throw new Error(answer.reason);
  return answer;
}

type TableName = keyof typeof cohenCase.inputs.tables;
const names = Object.keys(cohenCase.inputs.tables) as TableName[];

describe("Cohen's kappa", () => {
  it.each(names)('reproduces the published table %s', (name) => {
    const result = sure(cohenKappa(cohenCase.inputs.tables[name]));
    const expected = cohenCase.expected[name];
    expect(result.kappa).toBeCloseTo(expected.kappa, 9);
    expect(result.observed).toBeCloseTo(expected.po, 9);
    expect(result.expected).toBeCloseTo(expected.pe, 9);
    expect(Math.abs(result.kappa - cohenCase.published[name])).toBeLessThan(
      cohenCase.published.tolerance_abs,
    );
  });

  it.each(names)('has the standard error that the delta method gives for %s', (name) => {
    const result = sure(cohenKappa(cohenCase.inputs.tables[name]));
    expect(result.standardError).toBeCloseTo(fixture.cohen_delta_method[name].standard_error, 12);
    expect(result.upper).toBeCloseTo(
      Math.min(1, result.kappa + 1.959963984540054 * result.standardError),
      12,
    );
  });

  it('does not change when the two appraisers change places', () => {
    const table = [
      [12, 3, 1],
      [0, 9, 5],
      [2, 2, 20],
    ];
    const turned = table.map((_, i) => table.map((row) => row[i] ?? 0));
    expect(sure(cohenKappa(turned)).kappa).toBeCloseTo(sure(cohenKappa(table)).kappa, 14);
    expect(sure(cohenKappa(turned)).standardError).toBeCloseTo(sure(cohenKappa(table)).standardError, 14);
  });

  it('is 1 for full agreement and 0 for independence', () => {
    expect(
      sure(
        cohenKappa([
          [30, 0],
          [0, 20],
        ]),
      ),
    ).toMatchObject({ kappa: 1, standardError: 0, lower: 1, upper: 1 });
    expect(
      sure(
        cohenKappa([
          [20, 30],
          [20, 30],
        ]),
      ).kappa,
    ).toBeCloseTo(0, 14);
  });

  it('refuses tables it cannot judge', () => {
    expect(cohenKappa([[1, 2]])).toMatchObject({ code: 'table' });
    expect(
      cohenKappa([
        [1, 2],
        [3, 1.5],
      ]),
    ).toMatchObject({ code: 'counts' });
    expect(
      cohenKappa([
        [0, 0],
        [0, 0],
      ]),
    ).toMatchObject({ code: 'too-few' });
    expect(
      cohenKappa([
        [9, 0],
        [0, 0],
      ]),
    ).toMatchObject({ code: 'one-category' });
    expect(
      cohenKappa(
        [
          [9, 1],
          [1, 9],
        ],
        1,
      ),
    ).toMatchObject({ code: 'confidence' });
  });
});

describe("Fleiss' kappa", () => {
  const result = sure(fleissKappa(fleissCase.inputs.counts));

  it('reproduces the published case of ten subjects and fourteen raters', () => {
    expect(result.kappa).toBeCloseTo(fleissCase.expected.kappa, 9);
    expect(result.observed).toBeCloseTo(fleissCase.expected.P_bar, 9);
    expect(result.expected).toBeCloseTo(fleissCase.expected.P_e, 9);
    fleissCase.expected.P_i.forEach((value, place) =>
      expect(result.agreementBySubject[place]).toBeCloseTo(value, 9),
    );
    fleissCase.expected.p_j.forEach((value, place) =>
      expect(result.categoryShares[place]).toBeCloseTo(value, 9),
    );
    expect(Math.abs(result.kappa - fleissCase.published.kappa)).toBeLessThan(
      fleissCase.published.tolerance_abs,
    );
  });

  it('has limits whose width agrees with leaving out one subject at a time', () => {
    // Ten subjects only, so the two large-sample errors may differ by some per cent (0.0943 here against 0.1006 by delete-one).
    expect(result.standardError / fixture.fleiss_14_raters_jackknife_se).toBeGreaterThan(0.85);
    expect(result.standardError / fixture.fleiss_14_raters_jackknife_se).toBeLessThan(1.1);
    expect(result.lower).toBeLessThan(result.kappa);
    expect(result.upper).toBeGreaterThan(result.kappa);
  });

  it('weighs the categories so that their kappas average to the whole', () => {
    const weights = result.categoryShares.map((share) => share * (1 - share));
    const mean =
      result.kappaByCategory.reduce<number>(
        (sum, kappa, place) => sum + sure(kappa) * (weights[place] ?? 0),
        0,
      ) / weights.reduce((sum, weight) => sum + weight, 0);
    expect(mean).toBeCloseTo(result.kappa, 12);
  });

  it('refuses unequal raters and a single used category', () => {
    expect(
      fleissKappa([
        [3, 0],
        [1, 1],
      ]),
    ).toMatchObject({ code: 'unbalanced' });
    expect(
      fleissKappa([
        [3, 0],
        [3, 0],
      ]),
    ).toMatchObject({ code: 'one-category' });
    expect(fleissKappa([[3, 0]])).toMatchObject({ code: 'too-few' });
    expect(
      fleissKappa([
        [2.5, 0.5],
        [3, 0],
      ]),
    ).toMatchObject({ code: 'counts' });
    expect(
      sure(
        fleissKappa([
          [3, 0, 0],
          [1, 2, 0],
        ]),
      ).kappaByCategory[2],
    ).toMatchObject({ code: 'category-unused' });
  });
});

it('calls kappa good above 0.75 and poor below 0.40', () => {
  expect([0.76, 0.75, 0.4, 0.39].map(kappaWord)).toEqual(['good', 'fair', 'fair', 'poor']);
});
