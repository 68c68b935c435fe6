import { describe, expect, it } from 'vitest';
import reference from '../testing/reference/rules-false-alarm-probability.json';
import { relativeError } from '../testing/relative-error.ts';
import { isUndetermined } from '../result.ts';
import { falseAlarmRate, WINDOW_PROBABILITY } from './false-alarms.ts';
import { NELSON_RULES, WESTERN_ELECTRIC_RULES } from './rules.ts';
import type { RunRule } from './rules.ts';

function runLength(rules: readonly RunRule[]): number {
  const rate = falseAlarmRate(rules);
  if (isUndetermined(rate)) throw new Error(rate.reason);
  expect(rate.perPoint).toBe(1 / rate.averageRunLength);
  return rate.averageRunLength;
}

describe('false alarms', () => {
  it('has the chance of one window of each rule', () => {
    const { expected } = reference;
    const pairs: [RunRule, number][] = [
      ['beyond-three-sigma', expected.test1],
      ['nine-on-one-side', expected.test2_nine],
      ['eight-on-one-side', expected.we_eight],
      ['six-in-trend', expected.test3_six],
      ['two-of-three-beyond-two-sigma', expected.test5],
      ['four-of-five-beyond-one-sigma', expected.test6],
      ['fifteen-within-one-sigma', expected.test7],
    ];
    for (const [rule, probability] of pairs)
      expect(relativeError(WINDOW_PROBABILITY[rule], probability), rule).toBeLessThan(1e-11);
    // The case counts eight outside on any sides; the rule here wants both sides and so loses the two one-sided windows.
    const oneSided = 2 * (0.5 * expected.test8_any_sides ** (1 / 8)) ** 8;
    expect(
      relativeError(WINDOW_PROBABILITY['eight-outside-one-sigma'], expected.test8_any_sides - oneSided),
    ).toBeLessThan(1e-11);
  });

  it.each([
    [['beyond-three-sigma'], 370.4],
    [['beyond-three-sigma', 'two-of-three-beyond-two-sigma'], 225.44],
    [['beyond-three-sigma', 'four-of-five-beyond-one-sigma'], 166.05],
    [['beyond-three-sigma', 'eight-on-one-side'], 152.73],
    [WESTERN_ELECTRIC_RULES, 91.75],
  ] as [RunRule[], number][])(
    '%j: average run length of Champ and Woodall (1987), %d',
    (rules, published) => {
      expect(Math.abs(runLength(rules) - published)).toBeLessThan(0.006 + (published === 370.4 ? 0.05 : 0));
    },
  );

  it('has the closed forms 1/(2Q(3)) and 2^9 − 1', () => {
    expect(relativeError(runLength(['beyond-three-sigma']), 1 / reference.expected.test1)).toBeLessThan(
      1e-11,
    );
    expect(relativeError(runLength(['nine-on-one-side']), 511)).toBeLessThan(1e-11);
  });

  it('agrees with the simulation, whose program knows nothing of the chain', () => {
    // generate-false-alarms.mjs, set 1-2-5-6-7-8.
    const zoneRules = NELSON_RULES.filter(
      (rule) => rule !== 'six-in-trend' && rule !== 'fourteen-alternating',
    );
    expect(Math.abs(runLength(zoneRules) - 98.154)).toBeLessThan(4 * 0.171);
    expect(falseAlarmRate(NELSON_RULES)).toMatchObject({ method: 'simulation, committed with its seed' });
    expect(runLength(NELSON_RULES)).toBeLessThan(runLength(zoneRules));
  });

  it('does not guess', () => {
    expect(falseAlarmRate([])).toMatchObject({ code: 'no-rules' });
    expect(falseAlarmRate(['fourteen-alternating', 'eight-on-one-side'])).toMatchObject({
      code: 'outside-table',
    });
  });
});
