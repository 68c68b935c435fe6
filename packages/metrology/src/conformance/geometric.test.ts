import { describe, expect, it } from 'vitest';
import { isUndetermined } from '../result.ts';
import mmc from '../testing/reference/gdt-mmc-bonus.json' with { type: 'json' };
import positions from '../testing/reference/gdt-true-position.json' with { type: 'json' };
import { bonusTolerance, virtualCondition } from './bonus.ts';
import type { BonusInput, MaterialModifier } from './bonus.ts';
import { judgeGeometric } from './geometric.ts';
import type { GeometricInput } from './geometric.ts';
import { comparePosition, positionBeyond, positionDiameter } from './position.ts';
import type { PositionDiameter } from './position.ts';

const MODIFIERS: Record<string, MaterialModifier> = { M: 'MMC', L: 'LMC', S: 'RFS' };
const plain = (value: number) => value.toFixed(6).replace(/0+$/, '').replace(/\.$/, '');

describe('position as a diameter', () => {
  it.each(
    positions.inputs.rows.map((row, index) => ({
      ...row,
      expected: positions.expected.position_diameter[index] ?? NaN,
    })),
  )('dx $dx, dy $dy: $expected', ({ dx, dy, expected }) => {
    const found = positionDiameter(String(dx), String(dy)) as PositionDiameter;
    expect(Math.abs(found.value - expected)).toBeLessThanOrEqual(1e-9 * Math.abs(expected) + 1e-12);
    expect(Math.abs(Number(found.text) - expected)).toBeLessThan(1e-4);
  });

  it('shows three decimals beyond the deviations, and no more where the root ends', () => {
    expect(positionDiameter('0.1', '0.1')).toMatchObject({
      text: '0.2828',
      exact: false,
      squared: { digits: 8n, scale: 2 },
    });
    expect(positionDiameter('0.03', '-0.04')).toMatchObject({ text: '0.10', exact: true });
    expect(positionDiameter('0.5', '0')).toMatchObject({ text: '1.0', exact: true });
    expect(positionDiameter('0.001', '0.001')).toMatchObject({ text: '0.002828' });
    expect(positionDiameter('0', '0')).toMatchObject({ text: '0', exact: true, value: 0 });
    expect(positionDiameter('1', '1')).toMatchObject({ text: '2.828' });
    expect(positionDiameter('2', '3')).toMatchObject({ text: '7.211' });
    expect(positionDiameter('1', '3')).toMatchObject({ text: '6.325' });
  });

  it('takes a third deviation as a spherical zone', () => {
    expect(positionDiameter('1', '2', '2')).toMatchObject({
      text: '6',
      exact: true,
      method: 'spherical zone, 2·√(dx² + dy² + dz²)',
    });
    expect(positionDiameter('1', '2')).toMatchObject({ method: 'cylindrical zone, 2·√(dx² + dy²)' });
    expect(positionDiameter('1', 'x')).toMatchObject({ code: 'not-a-number' });
    expect(positionDiameter('1', '2', '')).toMatchObject({ code: 'empty' });
  });

  it('is compared by squares: the limit itself conforms, the next digit does not', () => {
    const found = positionDiameter('0.12', '-0.05') as PositionDiameter;
    expect(comparePosition(found, { digits: 26n, scale: 2 })).toBe(0);
    expect(comparePosition(found, { digits: 259999999999999999999n, scale: 21 })).toBe(1);
    expect(comparePosition(found, { digits: 260000000000000000001n, scale: 21 })).toBe(-1);
    expect(comparePosition(found, { digits: -26n, scale: 2 })).toBe(1);
    expect(positionBeyond(found, { digits: 25n, scale: 2 })).toBe('0.01');
    expect(positionBeyond(found, { digits: 26n, scale: 2 })).toBeNull();
    const irrational = positionDiameter('0.1', '0.1') as PositionDiameter;
    expect(positionBeyond(irrational, { digits: 28284271n, scale: 8 })).toBe('0.00000000248');
    expect(positionBeyond(irrational, { digits: 28n, scale: 2 })).toBe('0.00285');
    expect(positionBeyond(irrational, { digits: 28284272n, scale: 8 })).toBeNull();
  });
});

describe('bonus tolerance', () => {
  it.each(mmc.inputs.rows.map((row, index) => ({ ...row, ...mmc.expected.rows[index]! })))(
    '$kind at $modifier, size $actual, dx $dx, dy $dy',
    (row) => {
      const low = Math.min(row.mmc, row.lmc);
      const high = Math.max(row.mmc, row.lmc);
      const judged = judgeGeometric({
        reading: { dx: plain(row.dx), dy: plain(row.dy) },
        tolerance: plain(row.stated_tol),
        modifier: MODIFIERS[row.modifier]!,
        feature: row.kind === 'hole' ? 'hole' : 'shaft',
        sizeLimits: { lower: plain(low), upper: plain(high) },
        actualSize: plain(row.actual),
      });
      if (isUndetermined(judged)) throw new Error(judged.reason);
      expect(Number(judged.bonus)).toBe(row.bonus);
      expect(Number(judged.allowed)).toBe(row.total_tol);
      expect(Math.abs(Number(judged.value) - row.position)).toBeLessThan(1e-4);
      expect(judged.size === 'in-tolerance').toBe(row.size_ok);
      expect(judged.geometry === 'in-tolerance').toBe(row.position_ok);
      expect(judged.verdict === 'in-tolerance').toBe(row.accept);
      expect(judged.virtualCondition === null ? null : Number(judged.virtualCondition)).toBe(
        row.virtual_condition,
      );
    },
  );

  const hole: BonusInput = {
    modifier: 'MMC',
    feature: 'hole',
    sizeLimits: { lower: '10.0', upper: '10.3' },
    actualSize: '10.15',
  };

  it('is the departure from the material limit of the piece itself', () => {
    expect(bonusTolerance(hole)).toMatchObject({ bonusText: '0.15', size: 'in-tolerance' });
    expect(bonusTolerance({ ...hole, feature: 'shaft', actualSize: '10.1' })).toMatchObject({
      bonusText: '0.2',
    });
    expect(bonusTolerance({ ...hole, modifier: 'LMC', actualSize: '10.1' })).toMatchObject({
      bonusText: '0.2',
    });
    expect(bonusTolerance({ ...hole, modifier: 'LMC', feature: 'shaft', actualSize: '10.1' })).toMatchObject({
      bonusText: '0.1',
    });
    expect(bonusTolerance({ ...hole, modifier: 'RFS' })).toMatchObject({
      bonusText: '0',
      size: 'in-tolerance',
    });
  });

  it('is never negative and never more than the size tolerance, and the size then fails', () => {
    expect(bonusTolerance({ ...hole, actualSize: '9.99' })).toMatchObject({
      bonusText: '0',
      size: 'out-of-tolerance',
    });
    expect(bonusTolerance({ ...hole, actualSize: '10.4' })).toMatchObject({
      bonusText: '0.3',
      size: 'out-of-tolerance',
    });
    expect(bonusTolerance({ ...hole, actualSize: '10.3' })).toMatchObject({
      bonusText: '0.3',
      size: 'in-tolerance',
    });
    expect(bonusTolerance({ ...hole, actualSize: '10' })).toMatchObject({
      bonusText: '0.0',
      size: 'in-tolerance',
    });
  });

  it('cannot be told without the size or its limits', () => {
    expect(bonusTolerance({ ...hole, actualSize: null })).toMatchObject({ code: 'size-missing' });
    expect(bonusTolerance({ ...hole, actualSize: '10,1' })).toMatchObject({ code: 'size-unreadable' });
    expect(bonusTolerance({ ...hole, sizeLimits: null })).toMatchObject({ code: 'size-limits-missing' });
    expect(bonusTolerance({ ...hole, sizeLimits: { lower: '10', upper: null } })).toMatchObject({
      code: 'size-limits-missing',
    });
    expect(bonusTolerance({ ...hole, sizeLimits: { lower: '11', upper: '10' } })).toMatchObject({
      code: 'limits-crossed',
    });
    expect(bonusTolerance({ ...hole, modifier: 'RFS', actualSize: null })).toMatchObject({
      bonusText: '0',
      size: 'not-measured',
    });
    expect(bonusTolerance({ ...hole, modifier: 'RFS', sizeLimits: null })).toMatchObject({
      size: 'not-measured',
    });
  });

  it('leaves a virtual size that the piece may not violate', () => {
    const of = (modifier: MaterialModifier, feature: 'hole' | 'shaft', tolerance = '0.10') =>
      virtualCondition({ modifier, feature, tolerance, sizeLimits: { lower: '10.0', upper: '10.3' } });
    expect(of('MMC', 'hole')).toEqual({ kind: 'maximum-material', size: '9.90' });
    expect(of('MMC', 'shaft')).toEqual({ kind: 'maximum-material', size: '10.40' });
    expect(of('LMC', 'hole')).toEqual({ kind: 'least-material', size: '10.40' });
    expect(of('LMC', 'shaft')).toEqual({ kind: 'least-material', size: '9.90' });
    expect(of('RFS', 'hole')).toBeNull();
    expect(of('MMC', 'hole', 'Ø0.1')).toMatchObject({ code: 'not-a-number' });
    expect(
      virtualCondition({ modifier: 'MMC', feature: 'hole', tolerance: '0.1', sizeLimits: null }),
    ).toMatchObject({ code: 'size-limits-missing' });
  });
});

describe('a geometric row of one piece', () => {
  const row: GeometricInput = {
    reading: '0.25',
    tolerance: '0.1',
    modifier: 'MMC',
    feature: 'hole',
    sizeLimits: { lower: '10', upper: '10.3' },
    actualSize: '10.15',
  };

  it('conforms at the allowed tolerance and fails beyond it', () => {
    expect(judgeGeometric(row)).toMatchObject({
      verdict: 'in-tolerance',
      allowed: '0.25',
      bonus: '0.15',
      virtualCondition: '9.9',
      leastMaterialVirtualSize: null,
    });
    expect(judgeGeometric({ ...row, reading: '0.2501' })).toMatchObject({
      verdict: 'out-of-tolerance',
      deviationBeyond: '0.0001',
    });
    expect(judgeGeometric({ ...row, modifier: 'LMC' })).toMatchObject({
      virtualCondition: null,
      leastMaterialVirtualSize: '10.4',
    });
  });

  it('conforms with no deviation where no tolerance is left, and states how far coordinates are beyond', () => {
    const exact = { reading: { dx: '0', dy: '0' }, tolerance: '0' };
    expect(judgeGeometric(exact)).toMatchObject({ verdict: 'in-tolerance' });
    expect(judgeGeometric({ reading: { dx: '0.03', dy: '0.04' }, tolerance: '0.08' })).toMatchObject({
      verdict: 'out-of-tolerance',
      deviationBeyond: '0.02',
    });
  });

  it('is undecided without the size and never fails or passes by guess', () => {
    for (const reading of ['0.05', '0.2', '9'])
      expect(judgeGeometric({ ...row, reading, actualSize: null })).toMatchObject({
        verdict: 'undecided',
        code: 'size-missing',
        bonus: null,
        allowed: null,
        value: reading,
        geometry: 'undecided',
      });
  });

  it('fails with the size, whatever the geometry', () => {
    expect(judgeGeometric({ ...row, reading: '0', actualSize: '10.31' })).toMatchObject({
      verdict: 'out-of-tolerance',
      code: 'size-out',
      geometry: 'in-tolerance',
      size: 'out-of-tolerance',
    });
    expect(judgeGeometric({ ...row, modifier: 'RFS', reading: '0', actualSize: '9.99' })).toMatchObject({
      verdict: 'out-of-tolerance',
      code: 'size-out',
    });
  });

  it('needs no size regardless of feature size, nor for form', () => {
    expect(judgeGeometric({ reading: '0.1', tolerance: '0.1' })).toMatchObject({
      verdict: 'in-tolerance',
      bonus: '0',
      allowed: '0.1',
      size: 'not-measured',
      virtualCondition: null,
      leastMaterialVirtualSize: null,
    });
    expect(judgeGeometric({ reading: '0.11', tolerance: '0.1' })).toMatchObject({
      verdict: 'out-of-tolerance',
      deviationBeyond: '0.01',
    });
  });

  it('does not measure what is missing or cannot be', () => {
    expect(judgeGeometric({ ...row, reading: null })).toMatchObject({
      verdict: 'not-measured',
      code: 'missing',
      value: null,
      allowed: '0.25',
    });
    expect(judgeGeometric({ ...row, reading: 'OK' })).toMatchObject({
      verdict: 'not-measured',
      code: 'not-a-number',
    });
    expect(judgeGeometric({ ...row, reading: '-0.01' })).toMatchObject({
      verdict: 'not-measured',
      code: 'negative-geometry',
    });
    expect(judgeGeometric({ ...row, reading: { dx: '0.1', dy: '?' } })).toMatchObject({
      verdict: 'not-measured',
      geometry: 'not-measured',
    });
    expect(judgeGeometric({ ...row, tolerance: 'x' })).toMatchObject({ code: 'not-a-number' });
    expect(judgeGeometric({ ...row, tolerance: '-0.1' })).toMatchObject({ code: 'tolerance-negative' });
  });
});
