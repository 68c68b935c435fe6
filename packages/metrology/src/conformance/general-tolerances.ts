import { compareDecimals } from '../decimal/decimal.ts';
import type { Decimal } from '../decimal/decimal.ts';
import { parseDecimal } from '../decimal/parse-decimal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import {
  ANGLE_RANGES,
  ANGLE_TOLERANCES,
  LINEAR_RANGES,
  LINEAR_TOLERANCES,
  RADIUS_RANGES,
  RADIUS_TOLERANCES,
} from '../tables/iso2768-tables.ts';
import type { GeneralClass } from '../tables/iso2768-tables.ts';

/** The kinds of size ISO 2768-1 has a table for. */
export type GeneralFeature = 'linear' | 'radius-chamfer' | 'angular';

/** A general tolerance: ± `tolerance` in `unit`. */
export interface GeneralTolerance {
  readonly method: 'ISO 2768-1:1989';
  readonly tolerance: string;
  readonly unit: 'mm' | 'arcmin';
  readonly generalClass: GeneralClass;
  readonly feature: GeneralFeature;
}

const SMALLEST: Decimal = { digits: 5n, scale: 1 };

function valueInRange<T>(ranges: readonly (string | null)[], values: readonly T[], size: Decimal): T | null {
  const index = ranges.findIndex((end) => {
    if (end === null) return true;
    const limit = parseDecimal(end);
    return !('undetermined' in limit) && compareDecimals(size, limit) <= 0;
  });
  return values[index] ?? null;
}

/**
 * The general tolerance of a size without an indicated tolerance, as ± text.
 *
 * `size` in mm: the nominal of a linear size, the radius or chamfer height, or for `angular` the length of the
 * shorter leg of the angle. Ranges are over the lower end, up to and including the upper; below 0.5 mm the drawing
 * must state the tolerance. Source: ISO 2768-1:1989 Tables 1 to 3; test: reference case iso2768-1-tables.
 * Undetermined: `below-table`, `outside-table`, `class-unreadable`, or a size that cannot be read.
 */
export function generalTolerance(
  size: string,
  generalClass: GeneralClass,
  feature: GeneralFeature,
): GeneralTolerance | Undetermined {
  if (!Object.hasOwn(LINEAR_TOLERANCES, generalClass))
    return undetermined(
      'class-unreadable',
      'The class of general tolerance is f, m, c or v: choose one of the four',
    );
  const value = parseDecimal(size);
  if ('undetermined' in value) return value;
  if (value.digits <= 0n)
    return undetermined(
      'below-table',
      'The size is not above 0: enter the nominal size, or the shorter leg of an angle',
    );
  if (feature !== 'angular' && compareDecimals(value, SMALLEST) < 0)
    return undetermined(
      'below-table',
      'Below 0.5 mm there is no general tolerance: enter the tolerance of the drawing',
    );
  const found =
    feature === 'linear'
      ? valueInRange(LINEAR_RANGES, LINEAR_TOLERANCES[generalClass], value)
      : feature === 'radius-chamfer'
        ? valueInRange(RADIUS_RANGES, RADIUS_TOLERANCES[generalClass], value)
        : valueInRange(ANGLE_RANGES, ANGLE_TOLERANCES[generalClass], value);
  if (found === null)
    return undetermined(
      'outside-table',
      `ISO 2768-1 gives no tolerance of class ${generalClass} at this size: enter the tolerance of the drawing`,
    );
  return {
    method: 'ISO 2768-1:1989',
    tolerance: found,
    unit: feature === 'angular' ? 'arcmin' : 'mm',
    generalClass,
    feature,
  };
}
