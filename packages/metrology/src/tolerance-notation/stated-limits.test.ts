import { describe, expect, it } from 'vitest';
import { statedLimits } from './stated-limits.ts';

describe('the limits of a stated tolerance', () => {
  it('looks a fit up in mm: 25 H7 is 25.000 to 25.021 (ISO 286-2 table 6, from memory)', () => {
    expect(statedLimits({ form: 'fit', nominal: '25', fitClass: 'H7' }, 'mm')).toMatchObject({
      lower: '25.000',
      upper: '25.021',
    });
  });

  it('refuses a fit or a general tolerance in another unit than that of its table', () => {
    expect(statedLimits({ form: 'fit', nominal: '1', fitClass: 'H7' }, 'in')).toMatchObject({
      code: 'unit-of-table',
    });
    const angle = {
      form: 'general',
      nominal: '45',
      generalClass: 'm',
      feature: 'angular',
      shorterLeg: '50',
    } as const;
    expect(statedLimits(angle, 'mm')).toMatchObject({ code: 'unit-of-table' });
    expect(statedLimits({ ...angle, feature: 'linear' }, 'deg')).toMatchObject({ code: 'unit-of-table' });
  });

  it('marks zero as natural bound only where it was said', () => {
    expect(statedLimits({ form: 'max', upper: '0.15', zeroBound: true }, 'mm')).toMatchObject({
      lower: '0',
      naturalLower: true,
      upper: '0.15',
    });
    expect(statedLimits({ form: 'max', upper: '0.15', zeroBound: false }, 'mm')).toMatchObject({
      lower: null,
    });
  });

  it('keeps a nominal without a tolerance and gives it no limits', () => {
    expect(statedLimits({ form: 'none', nominal: '27.0' }, 'mm')).toMatchObject({
      lower: null,
      upper: null,
      nominal: '27.0',
    });
  });
});
