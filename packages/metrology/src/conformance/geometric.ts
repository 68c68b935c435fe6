import { addDecimals, compareDecimals, formatDecimal, subtractDecimals } from '../decimal/decimal.ts';
import type { Decimal } from '../decimal/decimal.ts';
import { parseDecimal } from '../decimal/parse-decimal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { bonusTolerance, virtualCondition } from './bonus.ts';
import type { BonusInput } from './bonus.ts';
import { comparePosition, positionBeyond, positionDiameter } from './position.ts';
import type { PositionDiameter } from './position.ts';
import type { Verdict } from './verdict.ts';

/** Deviations from the basic location, as text. */
export interface CoordinateDeviations {
  readonly dx: string;
  readonly dy: string;
  readonly dz?: string;
}

/** One piece of a geometric row: its value (or its coordinate deviations), the stated tolerance and its size. */
export interface GeometricInput extends Partial<Omit<BonusInput, 'modifier'>> {
  /** The value as text: for position the zone diameter; or the coordinate deviations; null when not measured. */
  readonly reading: string | CoordinateDeviations | null;
  /** The stated geometric tolerance as text (the zone width or diameter), ≥ 0. */
  readonly tolerance: string;
  readonly modifier?: BonusInput['modifier'];
}

/** The verdict on a geometric row of one piece with the figures it rests on. */
export interface GeometricJudgement {
  readonly verdict: Verdict;
  readonly code?: 'size-missing' | 'size-out' | 'size-unreadable' | 'missing' | (string & {});
  readonly reason?: string;
  /** The value as text: as typed, or the diameter computed from deviations. */
  readonly value: string | null;
  /** Bonus and stated tolerance + bonus; null where the bonus cannot be told. */
  readonly bonus: string | null;
  readonly allowed: string | null;
  readonly deviationBeyond?: string;
  /** Whether the geometry alone is within the allowed tolerance, whatever the size. */
  readonly geometry: Verdict;
  readonly size: Verdict;
  /** Virtual condition at maximum material; null otherwise. */
  readonly virtualCondition: string | null;
  /** Least material virtual size; null otherwise. */
  readonly leastMaterialVirtualSize: string | null;
}

type Measured = { value: string; order(limit: Decimal): -1 | 0 | 1; beyond(limit: Decimal): string | null };

function measuredPosition(position: PositionDiameter): Measured {
  return {
    value: position.text,
    order: (limit) => comparePosition(position, limit),
    beyond: (limit) => positionBeyond(position, limit),
  };
}

function measure(reading: string | CoordinateDeviations): Measured | Undetermined {
  if (typeof reading !== 'string') {
    const position = positionDiameter(reading.dx, reading.dy, reading.dz);
    return 'undetermined' in position ? position : measuredPosition(position);
  }
  const value = parseDecimal(reading);
  if ('undetermined' in value) return value;
  if (value.digits < 0n)
    return undetermined('negative-geometry', 'A geometric deviation cannot be below 0: check the reading');
  return {
    value: formatDecimal(value),
    order: (limit) => compareDecimals(value, limit),
    beyond: (limit) => formatDecimal(subtractDecimals(value, limit)),
  };
}

function virtualSizes(input: GeometricInput, full: BonusInput) {
  const condition = virtualCondition({ ...full, tolerance: input.tolerance });
  const size = condition !== null && 'size' in condition ? condition.size : null;
  const maximum = full.modifier === 'MMC';
  return { virtualCondition: maximum ? size : null, leastMaterialVirtualSize: maximum ? null : size };
}

/**
 * Judges one piece against a geometric tolerance with its own bonus: in tolerance when value ≤ tolerance + bonus.
 *
 * The comparison is exact, for coordinate deviations by squares. A piece whose size is outside its limits fails
 * whatever its geometry (code `size-out`). With MMC or LMC and no size the row is undecided (code `size-missing`):
 * the bonus is never guessed. Datum shift is never added. A value equal to the allowed tolerance conforms.
 * Source: ASME Y14.5-2018; ISO 1101:2017; ISO 2692:2021. Undetermined when the stated tolerance cannot be read.
 */
export function judgeGeometric(input: GeometricInput): GeometricJudgement | Undetermined {
  const tolerance = parseDecimal(input.tolerance);
  if ('undetermined' in tolerance) return tolerance;
  if (tolerance.digits < 0n)
    return undetermined(
      'tolerance-negative',
      'The geometric tolerance is negative: enter its width or diameter',
    );
  const full: BonusInput = {
    modifier: input.modifier ?? 'RFS',
    feature: input.feature ?? 'hole',
    sizeLimits: input.sizeLimits ?? null,
    actualSize: input.actualSize ?? null,
  };
  const sizes = virtualSizes(input, full);
  const bonus = bonusTolerance(full);
  const known = 'undetermined' in bonus ? null : bonus;
  const allowed = known === null ? null : addDecimals(tolerance, known.bonus);
  const figures = {
    ...sizes,
    bonus: known?.bonusText ?? null,
    allowed: allowed && formatDecimal(allowed),
    size: known?.size ?? ('not-measured' as const),
  };
  if (input.reading === null)
    return {
      ...figures,
      verdict: 'not-measured',
      code: 'missing',
      reason: 'No reading is entered',
      value: null,
      geometry: 'not-measured',
    };
  const measured = measure(input.reading);
  if ('undetermined' in measured)
    return {
      ...figures,
      verdict: 'not-measured',
      code: measured.code,
      reason: measured.reason,
      value: null,
      geometry: 'not-measured',
    };
  const { value } = measured;
  if ('undetermined' in bonus)
    return {
      ...figures,
      verdict: 'undecided',
      code: bonus.code,
      reason: bonus.reason,
      value,
      geometry: 'undecided',
    };
  const limit = addDecimals(tolerance, bonus.bonus);
  const beyond = measured.order(limit) > 0 ? measured.beyond(limit) : null;
  const geometry: Verdict = beyond === null ? 'in-tolerance' : 'out-of-tolerance';
  const sizeOut = bonus.size === 'out-of-tolerance';
  return {
    ...figures,
    verdict: sizeOut ? 'out-of-tolerance' : geometry,
    value,
    geometry,
    ...(beyond === null ? {} : { deviationBeyond: beyond }),
    ...(sizeOut
      ? {
          code: 'size-out',
          reason: 'The size of this piece is outside its limits, so its geometry cannot pass',
        }
      : {}),
  };
}
