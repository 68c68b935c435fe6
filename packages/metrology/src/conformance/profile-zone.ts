import { addDecimals, compareDecimals, formatDecimal, negate, subtractDecimals } from '../decimal/decimal.ts';
import type { Decimal } from '../decimal/decimal.ts';
import { parseDecimal } from '../decimal/parse-decimal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import type { Limits } from './limits.ts';

/**
 * A profile tolerance zone of total width `tolerance`. Deviations are signed: positive adds material to the part.
 *
 * `equal`: half to each side. `unilateral-outside` / `unilateral-inside`: all on the side that adds / takes material.
 * `unequal`: ASME Y14.5 Ⓤ, `outside` is the part of the width that adds material. `offset`: ISO 1660 UZ, the middle
 * of the zone is displaced by the signed `offset` (positive adds material).
 */
export type ProfileZone =
  | { readonly zone: 'equal'; readonly tolerance: string }
  | { readonly zone: 'unilateral-outside'; readonly tolerance: string }
  | { readonly zone: 'unilateral-inside'; readonly tolerance: string }
  | { readonly zone: 'unequal'; readonly tolerance: string; readonly outside: string }
  | { readonly zone: 'offset'; readonly tolerance: string; readonly offset: string };

const ZERO: Decimal = { digits: 0n, scale: 0 };

function half(d: Decimal): Decimal {
  return d.digits % 2n === 0n
    ? { digits: d.digits / 2n, scale: d.scale }
    : { digits: d.digits * 5n, scale: d.scale + 1 };
}

function outerLimit(zone: ProfileZone, width: Decimal): Decimal | Undetermined {
  switch (zone.zone) {
    case 'equal':
      return half(width);
    case 'unilateral-outside':
      return width;
    case 'unilateral-inside':
      return ZERO;
    case 'offset': {
      const offset = parseDecimal(zone.offset);
      return 'undetermined' in offset ? offset : addDecimals(half(width), offset);
    }
    case 'unequal': {
      const outside = parseDecimal(zone.outside);
      if ('undetermined' in outside) return outside;
      return outside.digits < 0n || compareDecimals(outside, width) > 0
        ? undetermined(
            'outside-beyond-width',
            'The outer part of the zone is between 0 and its whole width: for a zone beyond the profile state an offset',
          )
        : outside;
    }
  }
}

/**
 * Limits of the signed deviation from the true profile: lower = outer − width, upper = outer, exact.
 *
 * Judge with them the smallest and the largest deviation of a piece (`judgeReading`). Halving keeps every digit:
 * 0.25 becomes ±0.125. Source: ASME Y14.5-2018 (profile, Ⓤ); ISO 1660:2017 (UZ).
 * Undetermined when the width is not above 0, a text cannot be read, or Ⓤ exceeds the width.
 */
export function profileLimits(zone: ProfileZone): Limits | Undetermined {
  const width = parseDecimal(zone.tolerance);
  if ('undetermined' in width) return width;
  if (width.digits <= 0n)
    return undetermined(
      'tolerance-not-positive',
      'The profile tolerance is not above 0: enter the whole width of the zone',
    );
  const outer = outerLimit(zone, width);
  if ('undetermined' in outer) return outer;
  return { lower: formatDecimal(subtractDecimals(outer, width)), upper: formatDecimal(outer) };
}

/**
 * The profile value reported for an equal zone: twice the larger deviation, 2·max(|smallest|, |largest|), exact.
 * It is compared with the whole width (common practice of profile reports).
 */
export function profileValue(smallest: string, largest: string): string | Undetermined {
  const low = parseDecimal(smallest);
  if ('undetermined' in low) return low;
  const high = parseDecimal(largest);
  if ('undetermined' in high) return high;
  const candidates = [low, negate(low), high, negate(high)];
  const most = candidates.reduce((a, b) => (compareDecimals(a, b) < 0 ? b : a));
  return formatDecimal({ digits: most.digits * 2n, scale: most.scale });
}
