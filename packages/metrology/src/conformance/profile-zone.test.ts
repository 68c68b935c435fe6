import { describe, expect, it } from 'vitest';
import { judgeReading } from './judge-reading.ts';
import type { Limits } from './limits.ts';
import { profileLimits, profileValue } from './profile-zone.ts';

describe('profile zones', () => {
  it('halve an equal zone without losing a digit', () => {
    expect(profileLimits({ zone: 'equal', tolerance: '0.4' })).toEqual({ lower: '-0.2', upper: '0.2' });
    expect(profileLimits({ zone: 'equal', tolerance: '0.25' })).toEqual({ lower: '-0.125', upper: '0.125' });
  });

  it('lie wholly on one side when unilateral', () => {
    expect(profileLimits({ zone: 'unilateral-outside', tolerance: '0.4' })).toEqual({
      lower: '0.0',
      upper: '0.4',
    });
    expect(profileLimits({ zone: 'unilateral-inside', tolerance: '0.4' })).toEqual({
      lower: '-0.4',
      upper: '0',
    });
  });

  it('are parted unequally by the outer share, or displaced by an offset', () => {
    expect(profileLimits({ zone: 'unequal', tolerance: '0.4', outside: '0.1' })).toEqual({
      lower: '-0.3',
      upper: '0.1',
    });
    expect(profileLimits({ zone: 'unequal', tolerance: '0.4', outside: '0' })).toEqual({
      lower: '-0.4',
      upper: '0',
    });
    expect(profileLimits({ zone: 'unequal', tolerance: '0.4', outside: '0.4' })).toEqual({
      lower: '0.0',
      upper: '0.4',
    });
    expect(profileLimits({ zone: 'offset', tolerance: '0.4', offset: '-0.25' })).toEqual({
      lower: '-0.45',
      upper: '-0.05',
    });
    expect(profileLimits({ zone: 'offset', tolerance: '0.4', offset: '0.1' })).toEqual({
      lower: '-0.1',
      upper: '0.3',
    });
  });

  it('refuse a width that is not above 0 and an outer share beyond the width', () => {
    expect(profileLimits({ zone: 'equal', tolerance: '0' })).toMatchObject({
      code: 'tolerance-not-positive',
    });
    expect(profileLimits({ zone: 'equal', tolerance: '' })).toMatchObject({ code: 'empty' });
    expect(profileLimits({ zone: 'unequal', tolerance: '0.4', outside: '0.41' })).toMatchObject({
      code: 'outside-beyond-width',
    });
    expect(profileLimits({ zone: 'unequal', tolerance: '0.4', outside: '-0.1' })).toMatchObject({
      code: 'outside-beyond-width',
    });
    expect(profileLimits({ zone: 'unequal', tolerance: '0.4', outside: 'U' })).toMatchObject({
      code: 'not-a-number',
    });
    expect(profileLimits({ zone: 'offset', tolerance: '0.4', offset: 'U' })).toMatchObject({
      code: 'not-a-number',
    });
  });

  it('judge signed deviations at the edge', () => {
    const zone = profileLimits({ zone: 'unequal', tolerance: '0.4', outside: '0.1' }) as Limits;
    expect(['-0.3', '0.1', '-0.3001', '0.1001'].map((text) => judgeReading(text, zone).verdict)).toEqual([
      'in-tolerance',
      'in-tolerance',
      'out-of-tolerance',
      'out-of-tolerance',
    ]);
  });

  it('report twice the largest deviation of an equal zone', () => {
    expect(profileValue('-0.12', '0.08')).toBe('0.24');
    expect(profileValue('0.01', '0.080')).toBe('0.160');
    expect(profileValue('0', '0')).toBe('0');
    expect(profileValue('a', '0')).toMatchObject({ code: 'not-a-number' });
    expect(profileValue('0', 'b')).toMatchObject({ code: 'not-a-number' });
  });
});
