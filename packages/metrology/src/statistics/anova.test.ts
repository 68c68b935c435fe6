import { describe, expect, it } from 'vitest';
import fromR from '../testing/fixtures/statistics-r.json';
import sirstv from '../testing/reference/strd-anova-sirstv.json';
import smls01 from '../testing/reference/strd-anova-smls01.json';
import smls03 from '../testing/reference/strd-anova-smls03.json';
import smls04 from '../testing/reference/strd-anova-smls04.json';
import smls06 from '../testing/reference/strd-anova-smls06.json';
import smls07 from '../testing/reference/strd-anova-smls07.json';
import smls09 from '../testing/reference/strd-anova-smls09.json';
import { relativeError } from '../testing/relative-error.ts';
import { isUndetermined } from '../result.ts';
import { oneWayAnova } from './one-way-anova.ts';
import { twoWayAnova } from './two-way-anova.ts';

interface Case {
  inputs: { groups: ({ x: number[] } | { first: number; pair: number[]; repeats: number })[] };
  expected: Record<string, number>;
}

const readingsOf = (group: Case['inputs']['groups'][number]): number[] =>
  'x' in group ? group.x : [group.first, ...Array.from({ length: group.repeats }, () => group.pair).flat()];

describe('NIST StRD one-way analysis of variance', () => {
  const cases: [string, Case][] = Object.entries({ sirstv, smls01, smls03, smls04, smls06, smls07, smls09 });
  it.each(cases)('%s: every certified value to 14 digits', (_name, { inputs, expected }) => {
    const result = oneWayAnova(inputs.groups.map(readingsOf));
    if (isUndetermined(result)) throw new Error(result.reason);
    const found: Record<string, unknown> = {
      df_between: result.between.df,
      df_within: result.within.df,
      ss_between: result.between.sumOfSquares,
      ms_between: result.between.meanSquare,
      F: result.f,
      ss_within: result.within.sumOfSquares,
      ms_within: result.within.meanSquare,
      r_squared: result.rSquared,
      residual_sd: result.residualStandardDeviation,
    };
    expect(Object.keys(found).sort()).toEqual(Object.keys(expected).sort());
    for (const [key, value] of Object.entries(expected))
      expect(relativeError(found[key] as number, value), key).toBeLessThan(1e-14);
  });

  it('refuses one group, an empty group, single readings and a group that cannot be read', () => {
    expect(oneWayAnova([[1, 2]])).toMatchObject({ code: 'too-few' });
    expect(oneWayAnova([[1, 2], []])).toMatchObject({
      code: 'too-few',
      reason: expect.stringContaining('Group 2') as string,
    });
    expect(oneWayAnova([[1], [2]])).toMatchObject({ code: 'too-few' });
    expect(oneWayAnova([['1', 'x'], ['2']])).toMatchObject({ code: 'not-a-number' });
  });

  it('has no ratio when nothing varies within', () => {
    expect(
      oneWayAnova([
        ['1', '1'],
        ['2', '2'],
      ]),
    ).toMatchObject({ f: { code: 'no-variation' }, rSquared: 1 });
  });
});

describe('two-way analysis of variance against R', () => {
  const cells = Array.from({ length: 3 }, (_, i) =>
    Array.from({ length: 4 }, (_unused, j) => fromR.x.slice((i * 4 + j) * 2, (i * 4 + j) * 2 + 2)),
  );
  const near = (found: unknown, expected: number | undefined) =>
    expect(relativeError(found as number, expected ?? NaN)).toBeLessThan(1e-12);

  it('with interaction', () => {
    const result = twoWayAnova(cells);
    if (isUndetermined(result) || result.interaction === null) throw new Error('no result');
    [result.rows, result.columns, result.interaction].forEach((line, index) => {
      expect(line.df).toBe(fromR.interaction.df[index]);
      near(line.sumOfSquares, fromR.interaction.ss[index]);
      near(line.f, fromR.interaction.f[index]);
      near(line.p, fromR.interaction.p[index]);
    });
    expect(result.residual.df).toBe(12);
    near(result.residual.sumOfSquares, fromR.interaction.ss[3]);
  });

  it('without interaction where each cell holds one reading', () => {
    const result = twoWayAnova(cells.map((row) => row.map((cell) => cell.slice(0, 1))));
    if (isUndetermined(result)) throw new Error(result.reason);
    expect(result.interaction).toBeNull();
    near(result.rows.f, fromR.additive.f[0]);
    near(result.columns.p, fromR.additive.p[1]);
    near(result.residual.sumOfSquares, fromR.additive.ss[2]);
  });

  it('names the cell that makes a layout unbalanced', () => {
    expect(
      twoWayAnova([
        [
          [1, 2],
          [3, 4],
        ],
        [[1, 2], [3]],
      ]),
    ).toMatchObject({
      code: 'unbalanced',
      reason: expect.stringContaining('Row 2, column 2') as string,
    });
    expect(twoWayAnova([[[1]]])).toMatchObject({ code: 'too-few' });
  });
});
