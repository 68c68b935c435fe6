import { describe, expect, it } from 'vitest';
import { toleranceLimits } from './tolerance-limits.ts';
import type { ToleranceSpec } from './tolerance-limits.ts';

const band = (spec: ToleranceSpec) => {
  const found = toleranceLimits(spec);
  return 'undetermined' in found ? found.code : [found.lower, found.upper];
};

describe('limits from the way a drawing states them', () => {
  it('adds ± in text, with the decimals of the finer number', () => {
    expect(band({ form: 'symmetric', nominal: '25', tolerance: '0.05' })).toEqual(['24.95', '25.05']);
    expect(band({ form: 'symmetric', nominal: '25.000', tolerance: '0.05' })).toEqual(['24.950', '25.050']);
    expect(band({ form: 'symmetric', nominal: '4.35', tolerance: '0.1' })).toEqual(['4.25', '4.45']);
    expect(band({ form: 'symmetric', nominal: '5', tolerance: '0' })).toEqual(['5', '5']);
    expect(toleranceLimits({ form: 'symmetric', nominal: '25', tolerance: '0.05' })).toMatchObject({
      nominal: '25',
      explanation: '25 ± 0.05',
    });
    expect(band({ form: 'symmetric', nominal: '25', tolerance: '-0.05' })).toBe('tolerance-negative');
    expect(toleranceLimits({ form: 'symmetric', nominal: '25,0', tolerance: '0.05' })).toMatchObject({
      code: 'comma',
      reason:
        'The nominal size cannot be read. "25,0" has a comma: write the decimal sign as a point and leave groups out',
    });
    expect(toleranceLimits({ form: 'symmetric', nominal: '25', tolerance: '±0.05' })).toMatchObject({
      code: 'not-a-number',
    });
  });

  it('adds signed deviations and gives both limits the same decimals', () => {
    expect(band({ form: 'deviations', nominal: '25', upper: '+0.021', lower: '0' })).toEqual([
      '25.000',
      '25.021',
    ]);
    expect(band({ form: 'deviations', nominal: '25', upper: '-0.02', lower: '-0.041' })).toEqual([
      '24.959',
      '24.980',
    ]);
    expect(
      toleranceLimits({ form: 'deviations', nominal: '25', upper: '0.021', lower: '-0.1' }),
    ).toMatchObject({ explanation: '25 +0.021 / -0.1', nominal: '25' });
    expect(band({ form: 'deviations', nominal: '25', upper: '0', lower: '0' })).toEqual(['25', '25']);
    expect(band({ form: 'deviations', nominal: '25', upper: '0', lower: '0.1' })).toBe('limits-crossed');
    expect(band({ form: 'deviations', nominal: '25', upper: '', lower: '0.1' })).toBe('empty');
  });

  it('takes two limits as they are', () => {
    expect(band({ form: 'limits', lower: '24.9', upper: '25.10' })).toEqual(['24.90', '25.10']);
    expect(toleranceLimits({ form: 'limits', lower: '1', upper: '2' })).toMatchObject({
      nominal: null,
      explanation: 'From 1 to 2',
    });
    expect(toleranceLimits({ form: 'limits', lower: '1', upper: '2', nominal: '1.50' })).toMatchObject({
      nominal: '1.50',
    });
    expect(band({ form: 'limits', lower: '2', upper: '2.0' })).toEqual(['2.0', '2.0']);
    expect(band({ form: 'limits', lower: '2', upper: '1' })).toBe('limits-crossed');
    expect(band({ form: 'limits', lower: '2', upper: 'max' })).toBe('not-a-number');
    expect(band({ form: 'limits', lower: '1', upper: '2', nominal: 'x' })).toBe('not-a-number');
  });

  it('leaves the other side open, and tells a natural bound from a limit', () => {
    expect(toleranceLimits({ form: 'max', upper: '0.05' })).toEqual({
      lower: null,
      upper: '0.05',
      nominal: null,
      explanation: '0.05 max',
    });
    expect(toleranceLimits({ form: 'max', upper: '0.05', naturalZero: true })).toEqual({
      lower: '0',
      upper: '0.05',
      naturalLower: true,
      nominal: null,
      explanation: '0.05 max; 0 is a natural bound, not a limit',
    });
    expect(toleranceLimits({ form: 'min', lower: '62' })).toEqual({
      lower: '62',
      upper: null,
      nominal: null,
      explanation: '62 min',
    });
    expect(band({ form: 'max', upper: '-1' })).toEqual([null, '-1']);
    expect(band({ form: 'max', upper: '-1', naturalZero: true })).toBe('limits-crossed');
    expect(band({ form: 'max', upper: '0', naturalZero: true })).toEqual(['0', '0']);
    expect(band({ form: 'max', upper: '?' })).toBe('not-a-number');
    expect(toleranceLimits({ form: 'min', lower: '?' })).toMatchObject({
      reason: expect.stringContaining('The lower limit cannot be read.') as string,
    });
  });

  it('looks up fits and general tolerances', () => {
    expect(toleranceLimits({ form: 'fit', nominal: '25', fitClass: 'H7' })).toEqual({
      lower: '25.000',
      upper: '25.021',
      nominal: '25',
      explanation: '25 H7, ISO 286',
    });
    expect(band({ form: 'fit', nominal: '25', fitClass: 'X' })).toBe('class-unreadable');
    expect(toleranceLimits({ form: 'general', nominal: '30', generalClass: 'm', feature: 'linear' })).toEqual(
      {
        lower: '29.8',
        upper: '30.2',
        nominal: '30',
        explanation: '± 0.2 mm, general tolerance ISO 2768-m',
      },
    );
    expect(band({ form: 'general', nominal: '3', generalClass: 'c', feature: 'radius-chamfer' })).toEqual([
      '2.6',
      '3.4',
    ]);
    expect(band({ form: 'general', nominal: '5000', generalClass: 'm', feature: 'linear' })).toBe(
      'outside-table',
    );
  });

  it('enters the table of angles with the shorter leg, and never widens the band in turning minutes to degrees', () => {
    const angle = (nominal: string, shorterLeg: string) =>
      band({ form: 'general', nominal, generalClass: 'm', feature: 'angular', shorterLeg });
    expect(angle('45', '10')).toEqual(['44.0', '46.0']);
    expect(angle('45', '50')).toEqual(['44.5', '45.5']);
    expect(angle('45', '51')).toEqual(['44.666667', '45.333333']);
    expect(angle('45', '121')).toEqual(['44.833334', '45.166666']);
    expect(angle('45.1234567', '121')).toEqual(['44.9567901', '45.2901233']);
    expect(
      toleranceLimits({
        form: 'general',
        nominal: '45',
        generalClass: 'm',
        feature: 'angular',
        shorterLeg: '50',
      }),
    ).toMatchObject({ explanation: '± 30′, general tolerance ISO 2768-m' });
    expect(
      toleranceLimits({
        form: 'general',
        nominal: '45',
        generalClass: 'm',
        feature: 'angular',
        shorterLeg: '51',
      }),
    ).toMatchObject({
      explanation: '± 20′, as degrees rounded inwards to 6 decimals, general tolerance ISO 2768-m',
    });
    expect(band({ form: 'general', nominal: '45', generalClass: 'm', feature: 'angular' })).toBe(
      'shorter-leg-missing',
    );
    expect(
      band({ form: 'general', nominal: 'x', generalClass: 'm', feature: 'angular', shorterLeg: '50' }),
    ).toBe('not-a-number');
  });

  it.each([
    ['The nominal size', { form: 'symmetric', nominal: '?', tolerance: '1' }],
    ['The tolerance', { form: 'symmetric', nominal: '1', tolerance: '?' }],
    ['The nominal size', { form: 'deviations', nominal: '?', lower: '0', upper: '0' }],
    ['The lower deviation', { form: 'deviations', nominal: '1', lower: '?', upper: '0' }],
    ['The upper deviation', { form: 'deviations', nominal: '1', lower: '0', upper: '?' }],
    ['The lower limit', { form: 'limits', lower: '?', upper: '1' }],
    ['The upper limit', { form: 'limits', lower: '0', upper: '?' }],
    ['The nominal size', { form: 'limits', lower: '0', upper: '1', nominal: '?' }],
    ['The upper limit', { form: 'max', upper: '?' }],
    ['The lower limit', { form: 'min', lower: '?' }],
  ] as const)('names %s when it cannot be read', (name, spec) => {
    expect(toleranceLimits(spec)).toMatchObject({
      code: 'not-a-number',
      reason: `${name} cannot be read. "?" is not a number: write digits with a point, such as 12.50`,
    });
  });

  it('gives no limits where the value is for reference', () => {
    expect(toleranceLimits({ form: 'none' })).toMatchObject({ lower: null, upper: null, nominal: null });
    expect(toleranceLimits({ form: 'none', nominal: '12' })).toMatchObject({ nominal: '12' });
  });
});
