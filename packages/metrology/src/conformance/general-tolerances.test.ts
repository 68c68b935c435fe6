import { describe, expect, it } from 'vitest';
import { isUndetermined } from '../result.ts';
import tables from '../testing/reference/iso2768-1-tables.json' with { type: 'json' };
import { generalTolerance } from './general-tolerances.ts';
import type { GeneralFeature } from './general-tolerances.ts';

const CLASSES = ['f', 'm', 'c', 'v'] as const;
type Ranges = readonly (readonly (number | null)[])[];

const value = (size: string, cls: (typeof CLASSES)[number], feature: GeneralFeature) => {
  const found = generalTolerance(size, cls, feature);
  return isUndetermined(found) ? null : Number(found.tolerance);
};

/** A size inside each range, its upper end, and a size just above its lower end. */
const probes = (ranges: Ranges) =>
  ranges.map(([from, to]) =>
    [`${from}.001`, to === null || to === undefined ? '100000' : String(to)].map((text) =>
      text.replace('0.5.001', '0.501'),
    ),
  );

describe('general tolerances of ISO 2768-1', () => {
  it.each(CLASSES)('class %s reproduces the three tables in every range, ends included', (cls) => {
    const { linear, radius_chamfer, angular_arcminutes } = tables.expected;
    const { linear_ranges_mm, radius_ranges_mm, angular_ranges_shorter_leg_mm } = tables.inputs;
    const check = (ranges: Ranges, feature: GeneralFeature, row: readonly (number | null)[]) =>
      probes(ranges).forEach((sizes, index) => {
        for (const size of sizes) expect(value(size, cls, feature)).toBe(row[index] ?? null);
      });
    check(linear_ranges_mm, 'linear', linear[cls]);
    check(radius_ranges_mm, 'radius-chamfer', radius_chamfer[cls]);
    check(angular_ranges_shorter_leg_mm, 'angular', angular_arcminutes[cls]);
  });

  it('starts at 0.5 mm, below which the drawing must state the tolerance', () => {
    expect(value('0.5', 'm', 'linear')).toBe(0.1);
    expect(generalTolerance('0.499', 'm', 'linear')).toMatchObject({ code: 'below-table' });
    expect(generalTolerance('0.499', 'm', 'radius-chamfer')).toMatchObject({ code: 'below-table' });
    expect(value('0.4', 'm', 'angular')).toBe(60);
    expect(generalTolerance('0', 'm', 'angular')).toMatchObject({ code: 'below-table' });
    expect(generalTolerance('-30', 'm', 'linear')).toMatchObject({ code: 'below-table' });
  });

  it('ends at 4000 mm and names its unit', () => {
    expect(generalTolerance('4000.1', 'm', 'linear')).toMatchObject({ code: 'outside-table' });
    expect(generalTolerance('3000', 'f', 'linear')).toMatchObject({ code: 'outside-table' });
    expect(generalTolerance('2', 'v', 'linear')).toMatchObject({ code: 'outside-table' });
    expect(generalTolerance('30', 'm', 'linear')).toMatchObject({ tolerance: '0.2', unit: 'mm' });
    expect(generalTolerance('30', 'm', 'angular')).toMatchObject({ tolerance: '30', unit: 'arcmin' });
    expect(generalTolerance('30 mm', 'm', 'linear')).toMatchObject({ code: 'not-a-number' });
    expect(generalTolerance('30', 'x' as 'm', 'linear')).toMatchObject({ code: 'class-unreadable' });
  });
});
