import {
  addDecimals,
  compareDecimals,
  formatDecimal,
  largerDecimal,
  smallerDecimal,
  subtractDecimals,
} from '../decimal/decimal.ts';
import type { Decimal } from '../decimal/decimal.ts';
import { parseDecimal } from '../decimal/parse-decimal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { readLimits } from './limits.ts';
import type { Limits } from './limits.ts';
import type { Verdict } from './verdict.ts';

/** Material condition of a geometric tolerance: at maximum or least material, or regardless of feature size. */
export type MaterialModifier = 'MMC' | 'LMC' | 'RFS';

/** `hole`: an internal feature of size; `shaft`: an external one. */
export type FeatureKind = 'hole' | 'shaft';

/** What a bonus is computed from. */
export interface BonusInput {
  readonly modifier: MaterialModifier;
  readonly feature: FeatureKind;
  readonly sizeLimits: Limits | null;
  /** Actual size of that very piece as text; null when it was not measured. */
  readonly actualSize: string | null;
}

/** Bonus and the size it came from. */
export interface Bonus {
  readonly method:
    'departure of the actual size from the material limit, at most the size tolerance' | 'no bonus (RFS)';
  readonly bonus: Decimal;
  readonly bonusText: string;
  /** Verdict on the size of the piece; not measured when RFS is judged without a size. */
  readonly size: Verdict;
}

const ZERO: Decimal = { digits: 0n, scale: 0 };

/** Both size limits, or the reason why the feature has no material condition. */
export function readSizeLimits(
  sizeLimits: Limits | null,
): { readonly lower: Decimal; readonly upper: Decimal } | Undetermined {
  const limits = sizeLimits === null ? null : readLimits(sizeLimits);
  if (limits !== null && 'undetermined' in limits) return limits;
  if (limits === null || limits.lower === null || limits.upper === null)
    return undetermined(
      'size-limits-missing',
      'The feature of size needs a lower and an upper size limit: enter both',
    );
  return { lower: limits.lower, upper: limits.upper };
}

/**
 * Bonus tolerance of one piece: how far its actual size departs from maximum (MMC) or least (LMC) material, never
 * negative and never more than the size tolerance; 0 regardless of feature size.
 *
 * MMC hole: actual − lower; MMC shaft: upper − actual; LMC hole: upper − actual; LMC shaft: actual − lower. Exact text
 * arithmetic. The actual size should be that of the mating envelope where the form or orientation error is not
 * negligible; a two-point size is common practice. Datum shift is never added.
 * Source: ASME Y14.5-2018, ISO 2692:2021. Undetermined with code `size-missing` when the bonus needs a size and none
 * is given, `size-limits-missing` when the feature has no two size limits, or where a text cannot be read.
 */
export function bonusTolerance(input: BonusInput): Bonus | Undetermined {
  const { modifier, feature, actualSize } = input;
  if (modifier === 'RFS' && (actualSize === null || input.sizeLimits === null))
    return { method: 'no bonus (RFS)', bonus: ZERO, bonusText: '0', size: 'not-measured' };
  const limits = readSizeLimits(input.sizeLimits);
  if ('undetermined' in limits) return limits;
  if (actualSize === null)
    return undetermined('size-missing', 'The bonus needs the actual size of this piece: enter its size');
  const actual = parseDecimal(actualSize);
  if ('undetermined' in actual)
    return undetermined('size-unreadable', `The actual size cannot be read. ${actual.reason}`);
  const outside = compareDecimals(actual, limits.lower) < 0 || compareDecimals(actual, limits.upper) > 0;
  const size: Verdict = outside ? 'out-of-tolerance' : 'in-tolerance';
  if (modifier === 'RFS') return { method: 'no bonus (RFS)', bonus: ZERO, bonusText: '0', size };
  const fromLower = (modifier === 'MMC') === (feature === 'hole');
  const departure = fromLower
    ? subtractDecimals(actual, limits.lower)
    : subtractDecimals(limits.upper, actual);
  const most = subtractDecimals(limits.upper, limits.lower);
  const bonus = smallerDecimal(largerDecimal(departure, ZERO), most);
  return {
    method: 'departure of the actual size from the material limit, at most the size tolerance',
    bonus,
    bonusText: formatDecimal(bonus),
    size,
  };
}

/** The constant boundary a toleranced feature of size may not violate. */
export interface VirtualCondition {
  readonly kind: 'maximum-material' | 'least-material';
  readonly size: string;
}

/**
 * Virtual size of a feature: MMC hole: lower size limit − t; MMC shaft: upper + t (virtual condition in ASME Y14.5,
 * MMVS in ISO 2692); LMC hole: upper + t; LMC shaft: lower − t (LMVS). Null regardless of feature size.
 * `tolerance` is the stated geometric tolerance as text. Undetermined where limits or tolerance cannot be read.
 */
export function virtualCondition(
  input: Omit<BonusInput, 'actualSize'> & { readonly tolerance: string },
): VirtualCondition | null | Undetermined {
  if (input.modifier === 'RFS') return null;
  const limits = readSizeLimits(input.sizeLimits);
  if ('undetermined' in limits) return limits;
  const tolerance = parseDecimal(input.tolerance);
  if ('undetermined' in tolerance) return tolerance;
  const maximum = input.modifier === 'MMC';
  const inward = maximum === (input.feature === 'hole');
  const size = inward ? subtractDecimals(limits.lower, tolerance) : addDecimals(limits.upper, tolerance);
  return { kind: maximum ? 'maximum-material' : 'least-material', size: formatDecimal(size) };
}
