import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import mixed from '../testing/reference/rules-mixed-sequence-b.json';
import nelson from '../testing/reference/rules-statements-nelson-basic.json';
import westernElectric from '../testing/reference/rules-western-electric.json';
import { isUndetermined } from '../result.ts';
import { NELSON_RULES } from './rules.ts';
import type { RunRule } from './rules.ts';
import { applyRunRules } from './run-rules.ts';

/** The names the reference cases give the rules. */
const NAMES: Record<string, RunRule> = {
  '1_beyond_3s': 'beyond-three-sigma',
  '9_same_side': 'nine-on-one-side',
  '8_same_side': 'eight-on-one-side',
  '6_trend': 'six-in-trend',
  '14_alternating': 'fourteen-alternating',
  '2_of_3_beyond_2s': 'two-of-three-beyond-two-sigma',
  '4_of_5_beyond_1s': 'four-of-five-beyond-one-sigma',
  '15_within_1s': 'fifteen-within-one-sigma',
  '8_outside_1s_both_sides': 'eight-outside-one-sigma',
};

function signals(values: readonly number[], rules: readonly RunRule[], centre = 0, sigma = 1) {
  const result = applyRunRules(values, { centre, sigma }, rules);
  if (isUndetermined(result)) throw new Error(result.reason);
  return result;
}
const pointsOf = (values: readonly number[], rule: RunRule, centre = 0, sigma = 1) =>
  signals(values, [rule], centre, sigma).map((signal) => signal.point);

describe.each([
  ['Nelson', nelson],
  ['mixed sequence', mixed],
  ['Western Electric', westernElectric],
])('%s reference sequences', (_name, reference) => {
  it.each(
    reference.inputs.sequences.map((sequence, index) => [index + 1, sequence.rule, sequence.z] as const),
  )('sequence %i, %s', (number, rule, z) => {
    const name = NAMES[rule];
    if (name === undefined) throw new Error(rule);
    expect(pointsOf(z, name)).toEqual(reference.expected.signals[number - 1]);
  });
});

describe('conventions', () => {
  it('names the points of a pattern and its side', () => {
    expect(signals([0, -2.2, 1, -2.5], ['two-of-three-beyond-two-sigma'])).toEqual([
      { rule: 'two-of-three-beyond-two-sigma', point: 4, side: 'below', pattern: [2, 4] },
    ]);
    expect(signals([5, 4, 3, 2, 1, 0], ['six-in-trend'], 0, 10)[0]).toMatchObject({
      side: 'below',
      pattern: [1, 2, 3, 4, 5, 6],
    });
  });

  it('may signal in an incomplete first window', () => {
    expect(pointsOf([2.1, 2.2], 'two-of-three-beyond-two-sigma')).toEqual([2]);
    expect(pointsOf([1.1, 1.2, 1.3, 1.4], 'four-of-five-beyond-one-sigma')).toEqual([4]);
  });

  it('a point written on a line is on it, in decimals whose doubles are not', () => {
    for (const [centre, sigma] of [
      [10, 0.1],
      [1500.2, 0.001],
      [0.3, 0.1],
      [74.001, 0.005],
    ] as const) {
      const onLine = Number((centre + 3 * sigma).toFixed(4));
      const beyond = Number((centre + 3 * sigma + 0.0001).toFixed(4));
      expect(pointsOf([onLine, beyond], 'beyond-three-sigma', centre, sigma)).toEqual([2]);
    }
  });

  it('a point on the centre line breaks a run', () => {
    expect(pointsOf([1, 1, 1, 1, 0, 1, 1, 1, 1], 'nine-on-one-side', 0, 2)).toEqual([]);
  });

  it('gives a reason in place of signals', () => {
    expect(applyRunRules([1, NaN], { centre: 0, sigma: 1 }, NELSON_RULES)).toMatchObject({
      code: 'not-finite',
    });
    expect(applyRunRules([1, 2], { centre: 0, sigma: 0 }, NELSON_RULES)).toMatchObject({
      code: 'no-variation',
    });
  });
});

describe('laws', () => {
  const sequence = fc.array(
    fc.integer({ min: -40, max: 40 }).map((value) => value / 10),
    { maxLength: 60 },
  );

  it('a mirrored sequence gives the same points on the other side', () => {
    fc.assert(
      fc.property(sequence, (z) => {
        const turned = signals(
          z.map((value) => -value),
          NELSON_RULES,
        );
        const flip = { above: 'below', below: 'above' } as const;
        expect(turned).toEqual(
          signals(z, NELSON_RULES).map((signal) => ({
            ...signal,
            side: signal.side === null ? null : flip[signal.side],
          })),
        );
      }),
    );
  });

  it('shift and scale of values and lines change nothing', () => {
    fc.assert(
      fc.property(sequence, fc.integer({ min: -500, max: 500 }), (z, shift) => {
        const moved = z.map((value) => Number((value * 0.01 + shift).toFixed(3)));
        expect(signals(moved, NELSON_RULES, shift, 0.01)).toEqual(signals(z, NELSON_RULES));
      }),
    );
  });

  it('a later point never changes an earlier signal', () => {
    fc.assert(
      fc.property(sequence, fc.nat(60), (z, cut) => {
        const before = signals(z, NELSON_RULES).filter((signal) => signal.point <= cut);
        expect(signals(z.slice(0, cut), NELSON_RULES)).toEqual(before);
      }),
    );
  });
});
