// @vitest-environment node
import { describe, expect, it } from 'vitest';
import type { Verdict } from '@trammel/shared/status';
import { frame, layOutBeam, scaleOf, type BeamData } from './beam-geometry.ts';

const point = (value: number | null, verdict: Verdict = 'in-tolerance') => ({ value, verdict, label: '' });
const lay = (data: Partial<BeamData> & Pick<BeamData, 'limits'>) => layOutBeam({ points: [], ...data });

describe('two limits', () => {
  it.each([
    [141.8, 142.2],
    [0.001, 0.002],
    [-5, 1000],
  ])('stand at the same two places whatever they are (%d to %d)', (lower, upper) => {
    const beam = lay({ limits: { lower, upper } });
    expect([beam.lowerPoint, beam.upperPoint, beam.from, beam.to]).toEqual([
      frame.left,
      frame.right,
      frame.left,
      frame.right,
    ]);
  });

  it('place nominal and pieces between them in proportion', () => {
    const beam = lay({ limits: { lower: 10, upper: 20 }, nominal: 15, points: [point(12.5), point(20)] });
    expect(beam.nominal).toBe(120);
    expect(beam.inside).toEqual([86, 188]);
  });

  it('draw pieces of the same place once', () => {
    expect(
      lay({ limits: { lower: 10, upper: 20 }, points: [point(15), point(15), point(15.0001)] }).inside,
    ).toEqual([120]);
  });

  it('show a piece one last digit beyond the limit clear of it', () => {
    const beam = lay({
      limits: { lower: 19, upper: 19.05 },
      points: [point(19.0501, 'out-of-tolerance'), point(18.9999, 'out-of-tolerance')],
    });
    expect(beam.outside).toEqual([
      { x: frame.right + frame.past, beyond: null },
      { x: frame.left - frame.past, beyond: null },
    ]);
  });

  it('hold what lies further out at the rim, with the side it is on', () => {
    const beam = lay({
      limits: { lower: 1, upper: 2 },
      points: [point(50, 'out-of-tolerance'), point(-50, 'out-of-tolerance')],
    });
    expect(beam.outside).toEqual([
      { x: frame.width - frame.edge, beyond: 'right' },
      { x: frame.edge, beyond: 'left' },
    ]);
  });

  it('keep a nominal outside the limits where it is, as fits have it', () => {
    const beam = lay({ limits: { lower: 25.002, upper: 25.015 }, nominal: 25 });
    expect(beam.nominal).toBeCloseTo(52 - (0.002 / 0.013) * 136, 1);
  });
});

describe('one limit', () => {
  it('has one point, and a scale from nature’s bound', () => {
    const beam = lay({ limits: { lower: 0, upper: 0.015, naturalLower: true }, points: [point(0.0075)] });
    expect([beam.lowerPoint, beam.upperPoint]).toEqual([null, frame.right]);
    expect(beam.inside).toEqual([120]);
  });

  it('starts at zero for an upper limit alone', () => {
    const scale = scaleOf({ limits: { lower: null, upper: 0.8 }, points: [point(0.4)] });
    expect(scale(0)).toBe(frame.left);
    expect(scale(0.4)).toBe(120);
  });

  it('leaves the beam open beyond a lower limit, and the best piece within it', () => {
    const beam = lay({ limits: { lower: 45, upper: null }, points: [point(53.8), point(64.3)] });
    expect([beam.lowerPoint, beam.upperPoint]).toEqual([frame.left, null]);
    expect(beam.to).toBe(frame.width - frame.edge);
    expect(beam.inside.at(-1)).toBe(frame.right);
  });

  it('makes room below a lower limit for the pieces that fail it', () => {
    const beam = lay({ limits: { lower: 3, upper: null }, points: [point(2.85, 'out-of-tolerance')] });
    expect(beam.outside[0]?.beyond).toBeNull();
    expect(beam.outside[0]?.x).toBeLessThan(frame.left);
  });
});

it('draws guard bands inside the limits, never across each other’s limit', () => {
  const limits = { lower: 10, upper: 20 };
  expect(lay({ limits, guard: 1 }).guards).toEqual([
    { from: 52, to: 65.6 },
    { from: 174.4, to: 188 },
  ]);
  expect(lay({ limits, guard: 15 }).guards).toEqual([
    { from: 52, to: 188 },
    { from: 52, to: 188 },
  ]);
  expect(lay({ limits: { lower: 0, upper: 10, naturalLower: true }, guard: 1 }).guards).toHaveLength(1);
});

it('draws the natural spread, open at a side where it leaves the drawing', () => {
  const limits = { lower: 10, upper: 20 };
  expect(lay({ limits, spread: { lower: 9, upper: 21 } }).bracket).toEqual({
    from: 38.4,
    to: 201.6,
    openLeft: false,
    openRight: false,
  });
  expect(lay({ limits, spread: { lower: 9, upper: 99 } }).bracket).toMatchObject({
    to: 231,
    openRight: true,
  });
});

it('counts what nobody measured instead of placing it', () => {
  const beam = lay({ limits: { lower: 1, upper: 2 }, points: [point(null, 'not-measured'), point(1.5)] });
  expect(beam.unmeasured).toBe(1);
  expect(beam.inside).toEqual([120]);
});

it('survives equal limits, no limits and no pieces', () => {
  expect(lay({ limits: { lower: 5, upper: 5 }, points: [point(5)] }).inside).toEqual([120]);
  const none = lay({ limits: { lower: null, upper: null }, points: [point(3, 'no-verdict')] });
  expect([none.lowerPoint, none.upperPoint, none.unjudged[0]]).toEqual([null, null, 120]);
  for (const value of Object.values(lay({ limits: { lower: null, upper: -4 } }))) {
    expect(JSON.stringify(value)).not.toMatch(/NaN|Infinity/);
  }
});
