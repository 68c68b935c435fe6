import { compareDecimals } from '../decimal/decimal.ts';
import type { Decimal } from '../decimal/decimal.ts';
import { parseDecimal } from '../decimal/parse-decimal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

/**
 * The tolerance limits of a characteristic as decimal text; null where a side has none.
 *
 * `naturalLower` / `naturalUpper` mark a bound that nature sets (a flatness cannot be below 0): it is drawn and it
 * tells an impossible reading, but it is not a tolerance limit, so the row counts as one-sided.
 */
export interface Limits {
  readonly lower: string | null;
  readonly upper: string | null;
  readonly naturalLower?: boolean;
  readonly naturalUpper?: boolean;
}

/** Limits read once: the tolerance limits and, apart from them, the natural bounds. */
export interface ReadLimits {
  readonly lower: Decimal | null;
  readonly upper: Decimal | null;
  readonly naturalLower: Decimal | null;
  readonly naturalUpper: Decimal | null;
}

function readSide(text: string | null, side: string): Decimal | null | Undetermined {
  if (text === null) return null;
  const parsed = parseDecimal(text);
  return 'undetermined' in parsed
    ? undetermined(`${side}-limit-unreadable`, `The ${side} limit cannot be read. ${parsed.reason}`)
    : parsed;
}

/**
 * Reads limits and checks that the lower is not above the upper. Equal limits are allowed: one value conforms.
 * Undetermined with code `lower-limit-unreadable`, `upper-limit-unreadable` or `limits-crossed`.
 */
export function readLimits(limits: Limits): ReadLimits | Undetermined {
  const lower = readSide(limits.lower, 'lower');
  if (lower !== null && 'undetermined' in lower) return lower;
  const upper = readSide(limits.upper, 'upper');
  if (upper !== null && 'undetermined' in upper) return upper;
  if (lower !== null && upper !== null && compareDecimals(lower, upper) > 0)
    return undetermined(
      'limits-crossed',
      'The lower limit is above the upper limit: exchange or correct them',
    );
  return {
    lower: limits.naturalLower ? null : lower,
    upper: limits.naturalUpper ? null : upper,
    naturalLower: limits.naturalLower ? lower : null,
    naturalUpper: limits.naturalUpper ? upper : null,
  };
}
