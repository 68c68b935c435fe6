import { describe, expect, it } from 'vitest';
import { isUndetermined } from '../result.ts';
import e29 from '../testing/reference/astm-e29-methods.json' with { type: 'json' };
import zones from '../testing/reference/decision-rule-zones.json' with { type: 'json' };
import { compileLimits } from './compile-limits.ts';
import type { CompiledLimits, DecisionRule } from './compile-limits.ts';
import { evaluateReadings } from './evaluate-readings.ts';
import { acceptanceLimits, judgeReading } from './judge-reading.ts';

const LIMITS = { lower: '25.000', upper: '25.021' };
const guard = (proves: 'supplier' | 'customer', expandedUncertainty = '0.004'): DecisionRule => ({
  kind: 'guard-band',
  expandedUncertainty,
  proves,
});

describe('simple acceptance', () => {
  it.each(zones.inputs.rows.map(({ y }, index) => ({ y, expected: zones.expected.simple[index] })))(
    '25 H7: $y is to $expected',
    ({ y, expected }) => {
      const { verdict } = judgeReading(String(y), LIMITS);
      expect(verdict).toBe(expected === 'accept' ? 'in-tolerance' : 'out-of-tolerance');
    },
  );

  it('takes a reading equal to a limit as conforming, whatever zeros are written', () => {
    for (const text of ['25', '25.0', '25.000', '25.0000000', '25.021', '25.02100'])
      expect(judgeReading(text, LIMITS)).toMatchObject({ verdict: 'in-tolerance', value: text });
    expect(judgeReading('4.45', { lower: null, upper: '4.45' }).verdict).toBe('in-tolerance');
  });

  it('says how far beyond which limit a reading lies', () => {
    expect(judgeReading('25.0211', LIMITS)).toEqual({
      verdict: 'out-of-tolerance',
      value: '25.0211',
      deviationBeyond: '0.0001',
      beyond: 'upper',
    });
    expect(judgeReading('\u22120.5', LIMITS)).toEqual({
      verdict: 'out-of-tolerance',
      value: '-0.5',
      deviationBeyond: '25.500',
      beyond: 'lower',
    });
    expect(judgeReading('25.01', LIMITS)).toEqual({ verdict: 'in-tolerance', value: '25.01' });
  });

  it('does not measure text: a missing or unreadable reading is not 0', () => {
    expect(judgeReading(null, LIMITS)).toMatchObject({ verdict: 'not-measured', code: 'missing' });
    expect(judgeReading('', { lower: '-1', upper: '1' })).toMatchObject({
      verdict: 'not-measured',
      code: 'empty',
    });
    expect(judgeReading('OK', LIMITS)).toMatchObject({ verdict: 'not-measured', code: 'not-a-number' });
  });

  it('cannot decide with limits that cannot be used, and says why', () => {
    expect(judgeReading('1', { lower: '2', upper: '1' })).toMatchObject({
      verdict: 'undecided',
      code: 'limits-crossed',
    });
    expect(judgeReading('1', { lower: 'a', upper: '1' })).toMatchObject({
      verdict: 'undecided',
      code: 'lower-limit-unreadable',
    });
    expect(judgeReading('1', { lower: '0', upper: '1,5' })).toMatchObject({
      verdict: 'undecided',
      code: 'upper-limit-unreadable',
      reason:
        'The upper limit cannot be read. "1,5" has a comma: write the decimal sign as a point and leave groups out',
    });
    expect(judgeReading('1', { lower: null, upper: null })).toMatchObject({
      verdict: 'undecided',
      code: 'no-limits',
    });
    expect(judgeReading('1', { lower: '1', upper: '1.0' })).toMatchObject({ verdict: 'in-tolerance' });
  });

  it('does not take a natural bound for a limit: a value beyond it cannot be, so it is not decided', () => {
    const flatness = { lower: '0', upper: '0.05', naturalLower: true };
    expect(judgeReading('0', flatness).verdict).toBe('in-tolerance');
    expect(judgeReading('-0.001', flatness)).toMatchObject({
      verdict: 'undecided',
      code: 'beyond-natural-bound',
    });
    expect(judgeReading('-0.001', flatness)).not.toHaveProperty('deviationBeyond');
    expect(judgeReading('0.051', flatness)).toMatchObject({
      verdict: 'out-of-tolerance',
      deviationBeyond: '0.001',
    });
    const purity = { lower: '99.5', upper: '100', naturalUpper: true };
    expect(judgeReading('100.1', purity)).toMatchObject({
      verdict: 'undecided',
      code: 'beyond-natural-bound',
    });
    expect(judgeReading('99.4', purity)).toMatchObject({ verdict: 'out-of-tolerance', beyond: 'lower' });
    expect(
      judgeReading('0.3', { lower: '0', upper: '1', naturalLower: true, naturalUpper: true }),
    ).toMatchObject({ verdict: 'undecided', code: 'no-limits' });
  });
});

describe('guard bands in the sense of ISO 14253-1', () => {
  const VERDICTS: Record<string, string> = {
    'conformity proved': 'in-tolerance',
    'nonconformity proved': 'out-of-tolerance',
    'uncertainty zone': 'undecided',
  };

  it.each(
    zones.inputs.rows.map(({ y, U }, index) => ({ y, U, expected: zones.expected.iso14253[index] ?? '' })),
  )('25 H7 with U = $U: $y is $expected', ({ y, U, expected }) => {
    for (const party of ['supplier', 'customer'] as const) {
      const judged = judgeReading(String(y), LIMITS, guard(party, String(U)));
      expect(judged.verdict).toBe(VERDICTS[expected]);
      expect(judged.countsAgainst).toBe(expected === 'uncertainty zone' ? party : undefined);
    }
  });

  it('moves the acceptance limits inwards by U exactly', () => {
    const compiled = compileLimits(LIMITS, guard('supplier')) as CompiledLimits;
    const found = acceptanceLimits(compiled);
    expect(found).toEqual({ lower: '25.004', upper: '25.017' });
    expect([found.lower, found.upper].map(Number)).toEqual(zones.expected.acceptance_limits);
    expect(
      acceptanceLimits(
        compileLimits({ lower: null, upper: '1' }, guard('supplier', '0.1')) as CompiledLimits,
      ),
    ).toEqual({ lower: null, upper: '0.9' });
  });

  it('guards only limits, not natural bounds', () => {
    const flatness = { lower: '0', upper: '0.05', naturalLower: true };
    expect(judgeReading('0.001', flatness, guard('supplier', '0.01')).verdict).toBe('in-tolerance');
    expect(judgeReading('0.041', flatness, guard('supplier', '0.01'))).toMatchObject({
      verdict: 'undecided',
      code: 'within-uncertainty',
    });
    expect(judgeReading('0.06', flatness, guard('customer', '0.01'))).toMatchObject({
      verdict: 'undecided',
      deviationBeyond: '0.01',
    });
    expect(judgeReading('0.061', flatness, guard('customer', '0.01')).verdict).toBe('out-of-tolerance');
  });

  it('says who has not proved what, also exactly on a limit or a natural bound', () => {
    expect(judgeReading('25.021', LIMITS, guard('supplier'))).toEqual({
      verdict: 'undecided',
      value: '25.021',
      code: 'within-uncertainty',
      countsAgainst: 'supplier',
      reason: 'Within the uncertainty of a limit: the supplier has not proved that the value conforms',
    });
    expect(judgeReading('25.000', LIMITS, guard('customer'))).toEqual({
      verdict: 'undecided',
      value: '25.000',
      code: 'within-uncertainty',
      countsAgainst: 'customer',
      reason:
        'Within the uncertainty of a limit: the customer has not proved that the value does not conform',
    });
    const flatness = { lower: '0', upper: '0.005', naturalLower: true };
    const purity = { lower: '99.5', upper: '100', naturalUpper: true };
    for (const [text, limits] of [
      ['0', flatness],
      ['100', purity],
      ['99.4', purity],
    ] as const)
      expect(judgeReading(text, limits, guard('supplier', '0.6'))).toMatchObject({
        code: 'within-uncertainty',
      });
  });

  it('accepts nothing when the bands use up the tolerance, yet still refuses', () => {
    const compiled = compileLimits({ lower: '0', upper: '1' }, guard('supplier', '0.6')) as CompiledLimits;
    expect(compiled.acceptEmpty).toBe(true);
    expect(judgeReading('0.5', { lower: '0', upper: '1' }, guard('supplier', '0.6')).verdict).toBe(
      'undecided',
    );
    expect(judgeReading('1.61', { lower: '0', upper: '1' }, guard('supplier', '0.6')).verdict).toBe(
      'out-of-tolerance',
    );
    expect(judgeReading('0.5', { lower: '0', upper: '1' }, guard('supplier', '0.5')).verdict).toBe(
      'in-tolerance',
    );
    expect(
      evaluateReadings(['0.5', '1.61'], { lower: '0', upper: '1' }, guard('supplier', '0.6')),
    ).toMatchObject({ outIndexes: [1], undecidedCount: 1 });
  });

  it('refuses an uncertainty that is no number or negative', () => {
    expect(compileLimits(LIMITS, guard('supplier', 'k=2'))).toMatchObject({ code: 'uncertainty-unreadable' });
    expect(compileLimits(LIMITS, guard('supplier', '-0.004'))).toMatchObject({
      code: 'uncertainty-negative',
    });
    expect(compileLimits(LIMITS, guard('supplier', '0'))).toMatchObject({ acceptEmpty: false });
  });
});

describe('the two methods of ASTM E29', () => {
  it.each(e29.inputs.rows.map((row, index) => ({ ...row, expected: e29.expected.rows[index] })))(
    '$observed against $kind $spec',
    ({ spec, kind, observed, expected }) => {
      const limits = kind === 'max' ? { lower: null, upper: spec } : { lower: spec, upper: null };
      const absolute = judgeReading(observed, limits, { kind: 'simple', rounding: 'absolute' });
      const rounded = judgeReading(observed, limits, { kind: 'simple', rounding: 'e29' });
      expect(absolute.verdict === 'in-tolerance').toBe(expected?.absolute_conforms);
      expect(rounded.verdict === 'in-tolerance').toBe(expected?.rounding_conforms);
      expect(rounded).toMatchObject({ rounded: expected?.rounded, value: observed });
      expect(absolute).not.toHaveProperty('rounded');
      const sample = evaluateReadings([observed], limits, { kind: 'simple', rounding: 'e29' });
      expect(isUndetermined(sample) ? null : sample.worst).toBe(rounded.verdict);
    },
  );

  it('rounds to the finer of two limits, or to the decimals asked for', () => {
    const rule: DecisionRule = { kind: 'simple', rounding: 'e29' };
    expect(judgeReading('-0.4', { lower: '0', upper: '2.50' }, rule)).toMatchObject({
      verdict: 'out-of-tolerance',
      rounded: '-0.40',
    });
    expect(judgeReading('2.54', { lower: null, upper: '2.50' }, { ...rule, decimals: 1 })).toMatchObject({
      verdict: 'in-tolerance',
      rounded: '2.5',
    });
    expect(judgeReading('2.56', { lower: null, upper: '2.57' }, { ...rule, decimals: 1 })).toMatchObject({
      verdict: 'out-of-tolerance',
      rounded: '2.6',
      deviationBeyond: '0.03',
    });
    expect(judgeReading('2.44', { lower: '2.43', upper: null }, { ...rule, decimals: 1 })).toMatchObject({
      verdict: 'out-of-tolerance',
      rounded: '2.4',
    });
    expect(judgeReading('-2.45', { lower: '-2.4', upper: null }, rule)).toMatchObject({
      verdict: 'in-tolerance',
      rounded: '-2.4',
    });
    expect(judgeReading('-2.35', { lower: '-2.3', upper: null }, rule)).toMatchObject({
      verdict: 'out-of-tolerance',
      rounded: '-2.4',
    });
    expect(judgeReading('-1.24', { lower: null, upper: '-1.25' }, { ...rule, decimals: 1 }).verdict).toBe(
      'out-of-tolerance',
    );
    expect(judgeReading('26', { lower: '25.001', upper: null }, rule).verdict).toBe('in-tolerance');
    expect(compileLimits({ lower: '0', upper: '1' }, { ...rule, decimals: 60 })).not.toHaveProperty('code');
    for (const decimals of [-1, 1.5, 61, NaN])
      expect(compileLimits({ lower: '0', upper: '1' }, { ...rule, decimals })).toMatchObject({
        code: 'decimals-invalid',
      });
  });
});
