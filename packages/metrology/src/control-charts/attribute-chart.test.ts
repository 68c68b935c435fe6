import { describe, expect, it } from 'vitest';
import computers from '../testing/reference/chart-computers-u.json';
import surface from '../testing/reference/chart-ishikawa-c-surface.json';
import wire from '../testing/reference/chart-ishikawa-u-wire.json';
import juice from '../testing/reference/chart-juice-can-p-np.json';
import circuits from '../testing/reference/chart-printed-circuit-c.json';
import orders from '../testing/reference/chart-purchase-order-p-varying-n.json';
import wafersC from '../testing/reference/nist-c-chart-wafers.json';
import wafersP from '../testing/reference/nist-p-chart-wafers.json';
import { relativeError } from '../testing/relative-error.ts';
import { isUndetermined } from '../result.ts';
import { attributeChart } from './attribute-chart.ts';
import type { AttributeChartInput } from './attribute-chart.ts';

function chart(input: AttributeChartInput) {
  const result = attributeChart(input);
  if (isUndetermined(result)) throw new Error(result.reason);
  return result;
}
const near = (found: number | undefined, expected: number, tolerance = 1e-10) =>
  expect(relativeError(found ?? NaN, expected)).toBeLessThan(tolerance);
const limitsOf = (result: ReturnType<typeof chart>, index = 0) => {
  const limits = result.series.points[index]?.limits;
  if (limits === undefined) throw new Error('no point');
  return limits;
};

describe('p and np charts', () => {
  const { defectives, n, removed_1based: exclude } = juice.inputs;
  it.each([
    ['first pass', undefined, juice.expected.first_pass],
    ['after removal', { exclude }, juice.expected.after_removal],
  ])('orange juice cans, %s', (_name, phase, expected) => {
    const p = chart({ kind: 'p', counts: defectives, sizes: n, ...(phase && { phase }) });
    near(p.average, expected.p_bar);
    near(limitsOf(p).upper, expected.ucl);
    near(limitsOf(p).lower, expected.lcl);
    const np = chart({ kind: 'np', counts: defectives, sizes: n, ...(phase && { phase }) });
    near(limitsOf(np).centre, expected.np_center);
    near(limitsOf(np).upper, expected.np_ucl);
    near(limitsOf(np).lower, expected.np_lcl);
  });

  it('finds points 15 and 23 on both, and says so', () => {
    for (const kind of ['p', 'np'] as const) {
      const result = chart({ kind, counts: defectives, sizes: n });
      expect(result.series.beyond).toEqual(juice.expected.beyond_1based);
      expect(result.verdict).toMatchObject({ state: 'not-in-control' });
      expect(result.verdict.reasons[0]).toContain('points 15, 23');
    }
  });

  it('reproduces the wafers; the printed p̄ 0.2313 belongs to all 30 wafers, the case holds 28', () => {
    const result = chart({ kind: 'p', counts: wafersP.inputs.defectives, sizes: wafersP.inputs.n });
    near(result.average, wafersP.expected.p_bar);
    near(limitsOf(result).sigma, wafersP.expected.sigma);
    near(limitsOf(result).upper, wafersP.expected.ucl);
    expect(result.series.beyond).toEqual(wafersP.expected.points_beyond_limits_1based);
    const all = chart({ kind: 'p', counts: [12, 15, ...wafersP.inputs.defectives], sizes: 50 });
    expect(Math.abs(all.average - wafersP.published.p_bar)).toBeLessThan(5e-5);
    expect(Math.abs(limitsOf(all).upper - wafersP.published.ucl)).toBeLessThan(6e-5);
  });

  it('has limits of its own for each sample of purchase orders', () => {
    const result = chart({ kind: 'p', counts: orders.inputs.defectives, sizes: orders.inputs.n });
    near(result.average, orders.expected.p_bar);
    orders.expected.ucl.forEach((upper, index) => near(limitsOf(result, index).upper, upper));
    orders.expected.lcl.forEach((lower, index) => near(limitsOf(result, index).lower, lower));
    expect(result.series.beyond).toEqual(orders.expected.beyond_1based);
  });
});

describe('c and u charts', () => {
  it('reproduces the wafers; the printed c̄ = 16 belongs to all 25, where 28 lies exactly on the limit', () => {
    const result = chart({ kind: 'c', counts: wafersC.inputs.count });
    near(result.average, wafersC.expected.c_bar);
    near(limitsOf(result).upper, wafersC.expected.ucl);
    near(limitsOf(result).lower, wafersC.expected.lcl);
    expect(result.series.beyond).toEqual(wafersC.expected.points_beyond_limits_1based);
    const all = chart({ kind: 'c', counts: [16, 14, ...wafersC.inputs.count] });
    expect([limitsOf(all).lower, all.average, limitsOf(all).upper]).toEqual([4, 16, 28]);
    expect(all.series.beyond).toEqual([24]);
  });

  it('reproduces the printed circuits before and after removal', () => {
    const { count: counts, removed_1based: exclude } = circuits.inputs;
    const first = chart({ kind: 'c', counts });
    near(limitsOf(first).upper, circuits.expected.first_pass.ucl);
    expect(first.series.beyond).toEqual(circuits.expected.first_pass.beyond_1based);
    const after = chart({ kind: 'c', counts, phase: { exclude } });
    near(after.average, circuits.expected.after_removal.c_bar);
    near(limitsOf(after).lower, circuits.expected.after_removal.lcl);
  });

  it('cuts a lower limit at 0', () => {
    const result = chart({ kind: 'c', counts: surface.inputs.count });
    near(limitsOf(result).upper, surface.expected.ucl);
    expect(limitsOf(result).lower).toBe(0);
    expect(result.series.beyond).toEqual(surface.expected.beyond_1based);
  });

  it('reproduces the u charts of computers and of wire', () => {
    const equal = chart({ kind: 'u', counts: computers.inputs.count, sizes: computers.inputs.units });
    near(equal.average, computers.expected.u_bar);
    near(limitsOf(equal).upper, computers.expected.ucl);
    near(limitsOf(equal).lower, computers.expected.lcl);
    const varying = chart({ kind: 'u', counts: wire.inputs.count, sizes: wire.inputs.units });
    near(varying.average, wire.expected.u_bar);
    wire.expected.ucl.forEach((upper, index) => near(limitsOf(varying, index).upper, upper));
    expect(varying.series.beyond).toEqual(wire.expected.beyond_1based);
  });
});

describe('Laney', () => {
  // Worked by hand: n 10000, p̄ 0.02, σ 0.0014; z ±(4/1.4); every moving range of z is 8/1.4.
  const counts = [160, 240, 160, 240, 160, 240];
  it('widens the limits by the spread between samples', () => {
    const plain = chart({ kind: 'p', counts, sizes: 10000 });
    near(plain.dispersion ?? NaN, 8 / 1.4 / (2 / Math.sqrt(Math.PI)), 1e-12);
    const laney = chart({ kind: 'p', counts, sizes: 10000, laney: true });
    expect(laney.method).toBe("p'");
    near(limitsOf(laney).sigma, limitsOf(plain).sigma * (plain.dispersion ?? NaN), 1e-12);
    expect([plain.series.beyond.length, laney.series.beyond.length]).toEqual([0, 0]);
    expect(chart({ kind: 'u', counts, sizes: 3.5, laney: true }).method).toBe("u'");
  });
});

describe('what cannot be charted', () => {
  it.each([
    [{ kind: 'p', counts: [1, 2] }, 'too-few'],
    [{ kind: 'p', counts: [1, 2], sizes: [5] }, 'outside-domain'],
    [{ kind: 'p', counts: [1, 6], sizes: 5 }, 'outside-domain'],
    [{ kind: 'p', counts: [1, 2], sizes: 5.5 }, 'outside-domain'],
    [{ kind: 'c', counts: [1, -2] }, 'outside-domain'],
    [{ kind: 'c', counts: [1.5] }, 'outside-domain'],
    [{ kind: 'c', counts: [0, 0] }, 'no-variation'],
    [{ kind: 'np', counts: [5, 5], sizes: 5 }, 'no-variation'],
    [{ kind: 'c', counts: [1, 2], laney: true }, 'outside-domain'],
    [{ kind: 'u', counts: [1], sizes: 2, laney: true }, 'too-few'],
    [{ kind: 'c', counts: [] }, 'too-few'],
  ] as [AttributeChartInput, string][])('%j is refused as %s', (input, code) => {
    expect(attributeChart(input)).toMatchObject({ undetermined: true, code });
  });
});
