import { describe, expect, it } from 'vitest';
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { attributeAgreement } from './attribute-agreement.ts';
import type { Decision } from './attribute-agreement.ts';
import { exactProportion } from '../capability/proportion-interval.ts';
import type { Proportion } from '../capability/proportion-interval.ts';
import { signalDetection } from './signal-detection.ts';

function sure<T>(answer: T | Undetermined): T {
  if (isUndetermined(answer)) throw new Error(answer.reason);
  return answer;
}

const shareOf = (rate: Proportion | Undetermined | undefined): number =>
  rate && !isUndetermined(rate) ? rate.share : NaN;

/** Decisions for `good` good and `bad` bad parts, of which the named numbers of decisions are wrong, three trials. */
function study(good: number, bad: number, falseAlarms: readonly number[], misses: readonly number[]) {
  const decisions: Decision[][][] = [];
  for (let part = 0; part < good + bad; part += 1) {
    const isGood = part < good;
    const place = isGood ? part : part - good;
    const wrong = isGood ? falseAlarms : misses;
    decisions.push(
      wrong.map((count) =>
        [0, 1, 2].map((trial): Decision => (place * 3 + trial < count === isGood ? 'reject' : 'accept')),
      ),
    );
  }
  const reference: Decision[] = decisions.map((_, part) => (part < good ? 'accept' : 'reject'));
  return { decisions, reference };
}

describe('attribute agreement', () => {
  // 34 good and 16 bad parts, three appraisers, three trials: the margins of the AIAG cross-tabulations against the reference.
  const result = sure(attributeAgreement(study(34, 16, [5, 2, 9], [3, 3, 6])));

  it('gives the miss and false-alarm rates the AIAG manual prints for its cross-tabulations (from memory)', () => {
    const rates = result.appraisers.map((appraiser) => [
      (100 * sure(appraiser.missRate).share).toFixed(1),
      (100 * sure(appraiser.falseAlarmRate).share).toFixed(1),
    ]);
    // The printed 6.3 is 6.25 rounded up.
    expect(rates).toEqual([
      ['6.3', '4.9'],
      ['6.3', '2.0'],
      ['12.5', '8.8'],
    ]);
  });

  it('gives the same kappa as the cross-tabulation itself', () => {
    expect(sure(result.appraisers[0]?.kappaToReference ?? 0)).toMatchObject({ n: 150 });
    expect(result.appraisers.map((a) => sure(a.kappaToReference).kappa.toFixed(2))).toEqual([
      '0.88',
      '0.92',
      '0.77',
    ]);
  });

  it('counts effectiveness by parts and takes the worst appraiser', () => {
    expect(result.appraisers.map((a) => sure(a.effectiveness).count)).toEqual([47, 48, 45]);
    expect(sure(result.systemEffectiveness).count).toBe(45);
    expect(result.appraisers.map((a) => a.verdict)).toEqual([
      'not-acceptable',
      'not-acceptable',
      'not-acceptable',
    ]);
    expect(result.pairs.map(({ first, second }) => [first, second])).toEqual([
      [0, 1],
      [0, 2],
      [1, 2],
    ]);
  });

  it('is acceptable when every decision is right, and then has perfect kappa', () => {
    const perfect = sure(attributeAgreement(study(30, 20, [0, 0], [0, 0])));
    expect(perfect.verdict).toBe('acceptable');
    expect(sure(perfect.amongAll).kappa).toBe(1);
    expect(sure(perfect.systemEffectiveness)).toMatchObject({ share: 1, upper: 1 });
  });

  it('puts a rate exactly on a bound into the better band', () => {
    const marginal = sure(attributeAgreement(study(20, 20, [6], [3])));
    expect(shareOf(marginal.appraisers[0]?.falseAlarmRate)).toBeCloseTo(0.1, 12);
    expect(shareOf(marginal.appraisers[0]?.missRate)).toBeCloseTo(0.05, 12);
    expect(marginal.verdict).toBe('marginal');
  });

  it('does not judge a rate that had no opportunity', () => {
    const onlyGood = sure(attributeAgreement(study(20, 0, [0], [0])));
    expect(onlyGood.appraisers[0]?.missRate).toMatchObject({ code: 'too-few' });
    expect(onlyGood.verdict).toBe('acceptable');
  });

  it('refuses unbalanced studies and a reference of another length', () => {
    const whole = study(3, 3, [0], [0]);
    expect(attributeAgreement({ ...whole, reference: ['accept'] })).toMatchObject({ code: 'reference' });
    expect(
      attributeAgreement({ ...whole, decisions: [...whole.decisions.slice(1), [['accept']]] }),
    ).toMatchObject({ code: 'unbalanced' });
    expect(attributeAgreement({ decisions: [], reference: [] })).toMatchObject({ code: 'too-few' });
  });
});

describe('exact limits of a share', () => {
  it('agrees with scipy 1.10.1 binomtest(7, 50).proportion_ci()', () => {
    const share = sure(exactProportion(7, 50));
    expect(share.lower).toBeCloseTo(0.0581917, 7);
    expect(share.upper).toBeCloseTo(0.267396, 7);
    expect(sure(exactProportion(0, 50)).upper).toBeCloseTo(1 - 0.025 ** (1 / 50), 12);
  });
});

describe('signal detection', () => {
  const all = (word: Decision): Decision[] => [word, word, word];
  const mixed: Decision[] = ['accept', 'reject', 'accept'];
  const pieces = [
    { value: 9.4, decisions: all('reject') },
    { value: 9.5, decisions: mixed },
    { value: 9.52, decisions: all('reject') },
    { value: 9.6, decisions: all('accept') },
    { value: 10, decisions: all('accept') },
    { value: 10.45, decisions: all('accept') },
    { value: 10.5, decisions: mixed },
    { value: 10.6, decisions: all('reject') },
  ];

  it('measures the zones in dispute on both sides and sets them against the tolerance', () => {
    const result = sure(signalDetection(pieces, { lower: 9.5, upper: 10.5 }));
    expect(result.zones.map((zone) => [zone.lastAccepted, zone.firstRejected])).toEqual([
      [9.6, 9.4],
      [10.45, 10.6],
    ]);
    expect(result.gaugeSpread).toBeCloseTo(0.175, 12);
    expect(sure(result.percentTolerance)).toBeCloseTo(17.5, 10);
    expect(sure(result.verdict).verdict).toBe('conditional');
  });

  it('measures a single limit but gives no share of a tolerance', () => {
    const result = sure(signalDetection(pieces.slice(4), { upper: 10.5 }));
    expect(result.gaugeSpread).toBeCloseTo(0.15, 12);
    expect(result.percentTolerance).toMatchObject({ code: 'one-limit' });
  });

  it('says so when the study did not reach beyond a limit', () => {
    expect(signalDetection(pieces.slice(0, -1), { lower: 9.5, upper: 10.5 })).toMatchObject({
      code: 'study-too-narrow',
    });
    expect(signalDetection(pieces, {})).toMatchObject({ code: 'no-tolerance' });
  });
});
