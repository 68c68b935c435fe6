import { describe, expect, it } from 'vitest';
import { isUndetermined } from '../result.ts';
import numacc1 from '../testing/reference/strd-univariate-numacc1.json' with { type: 'json' };
import numacc2 from '../testing/reference/strd-univariate-numacc2.json' with { type: 'json' };
import numacc3 from '../testing/reference/strd-univariate-numacc3.json' with { type: 'json' };
import { evaluateReadings } from './evaluate-readings.ts';
import type { SampleEvaluation } from './evaluate-readings.ts';
import type { Limits } from './limits.ts';

const LIMITS: Limits = { lower: '25.000', upper: '25.021' };
const evaluate = (texts: readonly (string | null)[], limits = LIMITS) =>
  evaluateReadings(texts, limits) as SampleEvaluation;

describe('a sample of readings', () => {
  it('is judged reading by reading and summarised', () => {
    const found = evaluate(['25.010', '25.021', '25.0', '25.0211', '24.999']);
    expect(found).toMatchObject({
      method: 'Simple acceptance, absolute limits',
      n: 5,
      missing: 0,
      refused: [],
      min: '24.999',
      max: '25.0211',
      outCount: 2,
      undecidedCount: 0,
      worst: 'out-of-tolerance',
      outIndexes: [3, 4],
    });
    expect([...found.verdicts]).toEqual([1, 1, 1, 2, 2]);
    expect(found.mean).toBe(25.01022);
    expect(found.standardDeviation).toBeCloseTo(0.010781558328924442, 14);
    expect(found.naturalSpread?.lower).toBeCloseTo(25.01022 - 3 * 0.010781558328924442, 12);
    expect(found.naturalSpread?.upper).toBeCloseTo(25.01022 + 3 * 0.010781558328924442, 12);
  });

  it('names missing and refused readings by their place, and the row is then not measured', () => {
    const found = evaluate([null, '25.010', 'OK', '', '25,01']);
    expect(found).toMatchObject({ n: 1, missing: 1, worst: 'not-measured', outCount: 0 });
    expect(found.refused.map(({ index, code }) => [index, code])).toEqual([
      [2, 'not-a-number'],
      [3, 'empty'],
      [4, 'comma'],
    ]);
    expect(found.refused[0]?.reason).toContain('"OK" is not a number');
    expect([...found.verdicts]).toEqual([0, 1, 0, 0, 0]);
    expect(evaluate([null, '26']).worst).toBe('out-of-tolerance');
  });

  it('without readings has no figures, and with one has no spread', () => {
    expect(evaluate([])).toMatchObject({
      n: 0,
      min: null,
      max: null,
      mean: null,
      standardDeviation: null,
      naturalSpread: null,
      worst: 'not-measured',
    });
    expect(evaluate([null])).toMatchObject({ n: 0, missing: 1, worst: 'not-measured', mean: null });
    expect(evaluate(['25.010'])).toMatchObject({
      n: 1,
      mean: 25.01,
      standardDeviation: null,
      naturalSpread: null,
      worst: 'in-tolerance',
    });
  });

  it('reads every form a reading may have: signs, leading point, spaces, long numbers', () => {
    const long = `25.0${'1'.repeat(40)}`;
    const found = evaluate([
      '+25.01',
      ' 25.01 ',
      '\u221225.01',
      '.5',
      '25.',
      long,
      '25.0000000000000001',
      '-.5',
      '+',
      '-',
      '.',
      '1.2.3',
    ]);
    expect([...found.verdicts]).toEqual([1, 1, 2, 2, 1, 1, 1, 2, 0, 0, 0, 0]);
    expect(found).toMatchObject({ n: 8, min: '-25.01', max: long });
    expect(found.refused.map(({ index }) => index)).toEqual([8, 9, 10, 11]);
  });

  it('decides digits beyond the fast path exactly', () => {
    const found = evaluate([
      '25.021000000000000000',
      '25.021000000000000001',
      '24.999999999999999999',
      '999999999999999',
      '9999999999999999',
    ]);
    expect([...found.verdicts]).toEqual([1, 2, 2, 2, 2]);
    const wide = evaluate(['9999999999999999', '1'], { lower: '0', upper: '9999999999999999' });
    expect([...wide.verdicts]).toEqual([1, 1]);
    expect(wide.mean).toBe(5e15);
    expect([
      ...evaluate(['-9999999999999998', '999999999999999'], {
        lower: '-9999999999999998',
        upper: '9999999999999998',
      }).verdicts,
    ]).toEqual([1, 1]);
  });

  it('compares readings of every number of decimals with limits of another', () => {
    const limits = { lower: '-1.25', upper: '1.25' };
    const texts = [
      '1',
      '1.2',
      '1.3',
      '1.25',
      '1.250',
      '1.251',
      '-1.2',
      '-1.3',
      '-1.25',
      '-1.2501',
      '2',
      '-2',
      '-1',
    ];
    expect([...evaluate(texts, limits).verdicts]).toEqual([1, 1, 2, 1, 1, 2, 1, 2, 1, 2, 2, 2, 1]);
    expect([...evaluate(['-1', '-2'], { lower: '-1.5', upper: null }).verdicts]).toEqual([1, 2]);
    expect([...evaluate(['1', '2'], { lower: '1.5', upper: null }).verdicts]).toEqual([2, 1]);
  });

  it('compares with limits that are not multiples of the last digit read, on both sides of 0', () => {
    expect([...evaluate(['-1', '-2'], { lower: null, upper: '-1.25' }).verdicts]).toEqual([2, 1]);
    expect([...evaluate(['-1', '-2'], { lower: '-1.25', upper: null }).verdicts]).toEqual([1, 2]);
    const rounded = (texts: readonly string[], limits: Limits) => {
      const found = evaluateReadings(texts, limits, { kind: 'simple', rounding: 'e29' });
      return isUndetermined(found) ? found.code : [...found.verdicts];
    };
    const least = ['25.0005', '25.00051', '25.001', '25.00', '26'];
    expect(rounded(least, { lower: '25.001', upper: null })).toEqual([2, 1, 1, 2, 1]);
    const most = ['25.0215', '25.02149', '25.021', '25.03', '25'];
    expect(rounded(most, { lower: null, upper: '25.021' })).toEqual([2, 1, 1, 2, 1]);
  });

  it('without limits, or beyond a natural bound, is undecided', () => {
    expect(evaluate(['1', '2'], { lower: null, upper: null })).toMatchObject({
      worst: 'undecided',
      undecidedCount: 2,
    });
    expect(evaluate(['-0.1', '0.1'], { lower: '0', upper: '1', naturalLower: true })).toMatchObject({
      worst: 'undecided',
      undecidedCount: 1,
    });
    expect([
      ...evaluate(['-0.1000000000000000001'], { lower: '0', upper: '1', naturalLower: true }).verdicts,
    ]).toEqual([3]);
  });

  it('names the rule it used', () => {
    const method = (rule: Parameters<typeof evaluateReadings>[2]) =>
      (evaluateReadings(['1'], { lower: '0', upper: '1.0' }, rule) as SampleEvaluation).method;
    expect(method({ kind: 'simple', rounding: 'e29' })).toBe(
      'Simple acceptance, readings rounded to 1 decimals (ASTM E29)',
    );
    expect(method({ kind: 'guard-band', expandedUncertainty: ' 0.1 ', proves: 'customer' })).toBe(
      'Guard band 0.1, customer proves (ISO 14253-1)',
    );
  });

  it('is undetermined with limits that cannot be used', () => {
    expect(evaluateReadings(['1'], { lower: '2', upper: '1' })).toMatchObject({
      undetermined: true,
      code: 'limits-crossed',
    });
  });
});

describe('certified digits from decimal text', () => {
  const digits = (found: number, certified: number) =>
    found === certified ? 16 : -Math.log10(Math.abs(found / certified - 1));
  const paired = (first: string, pair: readonly [string, string], repeats: number) => [
    first,
    ...Array.from({ length: repeats }, () => pair).flat(),
  ];
  const check = (texts: readonly string[], mean: number, sd: number) => {
    const found = evaluate(texts, { lower: null, upper: '1000000000' });
    if (isUndetermined(found) || found.mean === null || found.standardDeviation === null)
      throw new Error('no figures');
    expect(digits(found.mean, mean)).toBeGreaterThan(14.9);
    expect(digits(found.standardDeviation, sd)).toBeGreaterThan(14.9);
  };

  it('NIST StRD NumAcc1', () =>
    check(numacc1.inputs.x.map(String), numacc1.expected.mean, numacc1.expected.s));
  it('NIST StRD NumAcc2', () =>
    check(paired('1.2', ['1.1', '1.3'], 500), numacc2.expected.mean, numacc2.expected.s));
  it('NIST StRD NumAcc3', () =>
    check(paired('1000000.2', ['1000000.1', '1000000.3'], 500), numacc3.expected.mean, numacc3.expected.s));
  it('NIST StRD NumAcc4 (certified mean 10000000.2, deviation 0.1)', () =>
    check(paired('10000000.2', ['10000000.1', '10000000.3'], 500), 10000000.2, 0.1));
  it('the same through long numbers, where integers of the machine do not hold', () => {
    const zeros = '0'.repeat(20);
    check(paired(`10000000.2${zeros}`, [`10000000.1${zeros}`, `10000000.3${zeros}`], 500), 10000000.2, 0.1);
  });
  it('mixed scales that need more than the safe integers', () => {
    const found = evaluate(['900000000000000', '0.000000000000001', '5'], { lower: '0', upper: null });
    expect(found.mean).toBe(300000000000001.7);
    expect(found).toMatchObject({ min: '0.000000000000001', max: '900000000000000' });
  });
});
