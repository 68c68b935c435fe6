import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { normalSpread, relateSpreadToBand } from './band-relation.ts';

function sure<T>(answer: T | Undetermined): T {
  if (isUndetermined(answer)) throw new Error(answer.reason);
  return answer;
}

const band = { lower: -10, upper: 10 };
const at = (mean: number, sigma: number) => sure(relateSpreadToBand(normalSpread(mean, sigma), band));

describe('the combined verdict', () => {
  it('has a word for each way the spread can lie', () => {
    expect(at(0, 2).word).toBe('inside-with-room');
    expect(at(2, 2.2).word).toBe('inside-off-centre');
    expect(at(0, 3).word).toBe('at-the-edge');
    expect(at(6, 2).word).toBe('beyond-one-side');
    expect(at(0, 4).word).toBe('beyond-both');
    expect(at(5, 4).word).toBe('wider-than-the-band');
  });

  it('counts a spread that touches the limits as inside', () => {
    expect(sure(relateSpreadToBand({ low: -10, centre: 0, high: 10 }, band)).word).toBe('at-the-edge');
    expect(sure(relateSpreadToBand({ low: -10.001, centre: 0, high: 10 }, band)).word).toBe(
      'wider-than-the-band',
    );
    expect(sure(relateSpreadToBand({ low: -7.5, centre: 0, high: 7.5 }, band, 10 / 7.5)).word).toBe(
      'inside-with-room',
    );
  });

  it('decides exact ties towards the better word, and leaves a process alone that just has the room', () => {
    expect(sure(relateSpreadToBand({ low: -10, centre: 0, high: 11 }, band)).word).toBe(
      'wider-than-the-band',
    );
    expect(sure(relateSpreadToBand({ low: -6.5, centre: 1, high: 8.5 }, band, 20 / 15)).word).toBe(
      'inside-off-centre',
    );
    const justRoom = sure(relateSpreadToBand({ low: -5, centre: 1, high: 7 }, band, 1.5));
    expect(justRoom).toMatchObject({ word: 'inside-with-room', mend: { recentreBy: 0, advice: 'nothing' } });
    expect(
      sure(relateSpreadToBand({ low: 7, centre: 10, high: 13 }, band)).mend.reduceSpreadBy,
    ).toMatchObject({ code: 'centre-outside' });
  });

  it('carries what it was asked', () => {
    const spread = normalSpread(1, 2);
    expect(sure(relateSpreadToBand(spread, band, 1.5)).inputs).toEqual({
      spread,
      limits: band,
      wantedIndex: 1.5,
    });
  });

  it('says what would mend it', () => {
    expect(at(0, 2).mend).toMatchObject({ recentreBy: 0, reduceSpreadBy: 0, advice: 'nothing' });
    const offCentre = at(2, 2.2);
    expect(offCentre.mend).toMatchObject({
      recentreBy: -2,
      advice: 'recentre',
      reduceSpreadAfterRecentringBy: 0,
    });
    expect(offCentre.mend.indexAfterRecentring).toBeCloseTo(10 / 6.6, 12);
    expect(at(0, 3).mend.advice).toBe('reduce-spread');
    // 3 s = 9 must become 10/1.33 = 7.519: by 16.5 %.
    expect(at(0, 3).mend.reduceSpreadBy).toBeCloseTo(1 - 10 / 1.33 / 9, 12);
    expect(at(5, 4).mend.advice).toBe('recentre-and-reduce-spread');
    expect(at(12, 1).mend.reduceSpreadBy).toMatchObject({ code: 'centre-outside' });
  });

  it('gives rooms and the share of the band', () => {
    const relation = at(2, 2.2);
    expect(relation.lowerRoom).toBeCloseTo(5.4, 12);
    expect(relation.upperRoom).toBeCloseTo(1.4, 12);
    expect(relation.spreadShare).toBeCloseTo(0.66, 12);
  });

  it('balances a skewed spread by its two halves, not by its middle', () => {
    const skewed = sure(relateSpreadToBand({ low: 1, centre: 3, high: 11 }, { lower: 0, upper: 12 }));
    const moved = 3 + skewed.mend.recentreBy;
    expect((moved - 0) / 2).toBeCloseTo((12 - moved) / 8, 12);
  });
});

describe('one limit', () => {
  it('knows room, edge and beyond, and moves away from the limit as far as the wanted index', () => {
    const one = (mean: number) => sure(relateSpreadToBand(normalSpread(mean, 1), { upper: 10 }));
    expect([one(5).word, one(6.5).word, one(8).word]).toEqual([
      'inside-with-room',
      'at-the-edge',
      'beyond-one-side',
    ]);
    expect(one(8).mend.recentreBy).toBeCloseTo(10 - 3.99 - 8, 12);
    expect(one(8).mend.indexAfterRecentring).toBeCloseTo(1.33, 12);
    expect(one(8).spreadShare).toMatchObject({ code: 'one-sided' });
    expect(one(8).lowerRoom).toMatchObject({ code: 'no-limit' });
    const strength = sure(relateSpreadToBand(normalSpread(402, 1), { lower: 400 }));
    expect(strength.mend.recentreBy).toBeCloseTo(1.99, 12);
    expect(strength.mend.indexAfterRecentring).toBeCloseTo(1.33, 12);
    expect(strength.upperRoom).toMatchObject({ reason: 'There is no upper tolerance limit' });
    expect(one(8).lowerRoom).toMatchObject({ reason: 'There is no lower tolerance limit' });
    const skewed = sure(relateSpreadToBand({ low: 401, centre: 403, high: 409 }, { lower: 400 }, 2));
    expect(skewed.mend).toMatchObject({ recentreBy: 1, indexAfterRecentring: 2 });
  });

  it('does not push a process past its natural bound', () => {
    const relation = sure(
      relateSpreadToBand({ low: 0.5, centre: 4, high: 11 }, { upper: 10, naturalLower: 0 }),
    );
    expect(relation.mend.recentreBy).toBe(-0.5);
    expect(relation.mend.advice).toBe('recentre-and-reduce-spread');
    expect(
      sure(relateSpreadToBand({ low: 0, centre: 4, high: 11 }, { upper: 10, naturalLower: 0 })).mend.advice,
    ).toBe('reduce-spread');
    const purity = sure(
      relateSpreadToBand({ low: 90, centre: 97, high: 99.5 }, { lower: 92, naturalUpper: 100 }),
    );
    expect(purity.mend.recentreBy).toBe(0.5);
  });
});

describe('laws', () => {
  const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });

  it('keep the word under shift and scale, and mirror it', () => {
    fc.assert(
      fc.property(
        number(-15, 15),
        number(0.2, 6),
        number(-100, 100),
        number(0.1, 50),
        (mean, sigma, shift, scale) => {
          const base = at(mean, sigma);
          const moved = sure(
            relateSpreadToBand(normalSpread((mean + shift) * scale, sigma * scale), {
              lower: (shift - 10) * scale,
              upper: (shift + 10) * scale,
            }),
          );
          const onEdge = Math.min(
            Math.abs(Math.abs(mean) + 3 * sigma - 10),
            Math.abs(3 * sigma - 10),
            Math.abs((10 - Math.abs(mean)) / (3 * sigma) - 1.33),
            Math.abs(10 / (3 * sigma) - 1.33),
          );
          if (onEdge > 1e-9) expect(moved.word).toBe(base.word);
          expect(at(-mean, sigma).mend.recentreBy).toBeCloseTo(-base.mend.recentreBy, 9);
        },
      ),
    );
  });

  it('keep their promise: after the mend the wanted index is there', () => {
    fc.assert(
      fc.property(number(-15, 15), number(0.2, 6), (mean, sigma) => {
        const { mend } = at(mean, sigma);
        const mended = at(mean + mend.recentreBy, sigma * (1 - mend.reduceSpreadAfterRecentringBy));
        expect(mended.mend.indexAfterRecentring).toBeGreaterThan(1.33 - 1e-9);
        if (typeof mend.reduceSpreadBy === 'number') {
          const narrowed = sigma * (1 - mend.reduceSpreadBy);
          expect((10 - Math.abs(mean)) / (3 * narrowed)).toBeGreaterThan(1.33 - 1e-9);
        }
      }),
    );
  });

  it('refuse a spread without width and a band without limits', () => {
    expect(relateSpreadToBand(normalSpread(0, 0), band)).toMatchObject({ code: 'no-variation' });
    for (const spread of [
      { low: 1, centre: 1, high: 2 },
      { low: 1, centre: 2, high: 2 },
      { low: 2, centre: 1, high: 3 },
      { low: 1, centre: 3, high: 2 },
      { low: -Infinity, centre: 0, high: 1 },
      { low: 0, centre: 1, high: Infinity },
      { low: -1.7e308, centre: 0, high: 1.7e308 },
    ]) {
      expect(relateSpreadToBand(spread, band)).toMatchObject({ code: 'no-variation' });
    }
    expect(relateSpreadToBand(normalSpread(0, 1), {})).toMatchObject({ code: 'no-limits' });
    expect(relateSpreadToBand(normalSpread(0, 1), band, 0)).toMatchObject({ code: 'wanted-index' });
  });
});
