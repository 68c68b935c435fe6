import { addDecimals, formatDecimal, powerOfTen } from '../decimal/decimal.ts';
import type { Decimal } from '../decimal/decimal.ts';
import { parseDecimal } from '../decimal/parse-decimal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { DEVIATION_RANGES, FUNDAMENTAL_DEVIATIONS, HOLE_J, SHAFT_J } from '../tables/iso286-deviations.ts';
import {
  FINE_GRADE_LINES,
  GRADE_MULTIPLIERS,
  SIZE_RANGES,
  STANDARD_TOLERANCES,
} from '../tables/iso286-grades.ts';

/** Limits of a tolerance class such as 25 H7. Deviations are micrometres as text, sizes millimetres as text. */
export interface FitClassLimits {
  readonly method: 'ISO 286-1:2010 tables and rules';
  readonly nominal: string;
  readonly fitClass: string;
  readonly feature: 'hole' | 'shaft';
  readonly grade: string;
  readonly toleranceMicrometres: string;
  readonly upperMicrometres: string;
  readonly lowerMicrometres: string;
  readonly lower: string;
  readonly upper: string;
}

const CLASS = /^([A-Z]{1,2}|[a-z]{1,2})(01|0|[1-9]|1[0-8])$/;

/** Index of the range a size in millimetres lies in: over the end before, up to and including its own; −1 outside. */
function rangeOf(ranges: readonly number[], size: Decimal): number {
  if (size.digits <= 0n) return -1;
  const unit = powerOfTen(size.scale);
  return ranges.findIndex((end) => size.digits <= BigInt(end) * unit);
}

/** A size up to 500 mm, or why the tables do not hold it. */
function readSize(nominal: string): Decimal | Undetermined {
  const size = parseDecimal(nominal);
  if ('undetermined' in size) return size;
  if (rangeOf(SIZE_RANGES, size) < 0)
    return undetermined(
      'outside-table',
      'The nominal size is not above 0 and up to 500 mm, where these tables hold: enter the limits of the drawing',
    );
  return size;
}

function upToOne(size: Decimal): boolean {
  return size.digits <= powerOfTen(size.scale);
}

/** All deviations below are integers in tenths of a micrometre, doubled where IT/2 needs it: here 0.05 µm. */
const PER_MICROMETRE = 20;

/** From IT12 to IT18 a grade is ten times the grade five before it (ISO 286-1:2010). */
function gradeTolerance(size: Decimal, grade: string): number | null {
  const rank = Number(grade);
  if (rank > 11 && rank <= 18) {
    const finer = gradeTolerance(size, String(rank - 5));
    return finer === null ? null : 10 * finer;
  }
  const tenths = STANDARD_TOLERANCES[grade]?.[rangeOf(SIZE_RANGES, size)];
  return tenths === undefined ? null : tenths * 2;
}

/** Δ = IT(n) − IT(n−1) for IT3 to IT8 above 3 mm, else 0 (ISO 286-1:2010 Table 5). */
function delta(size: Decimal, grade: number): number {
  if (rangeOf(SIZE_RANGES, size) === 0) return 0;
  return (gradeTolerance(size, String(grade)) ?? 0) - (gradeTolerance(size, String(grade - 1)) ?? 0);
}

type Deviations = { lower: number; upper: number };

const NOT_GIVEN = (fitClass: string) =>
  undetermined(
    'class-not-given',
    `ISO 286-1 gives no ${fitClass} at this size: check the class, or enter the limits`,
  );

function shaftDeviations(letter: string, grade: string, size: Decimal, it: number): Deviations | null {
  if (letter === 'js') return { lower: -it / 2, upper: it / 2 };
  if (letter === 'j') {
    const lower = SHAFT_J[grade]?.[rangeOf(SIZE_RANGES, size)] ?? null;
    return lower === null ? null : { lower: lower * PER_MICROMETRE, upper: lower * PER_MICROMETRE + it };
  }
  const value = FUNDAMENTAL_DEVIATIONS[letter]?.[rangeOf(DEVIATION_RANGES, size)] ?? null;
  if (value === null) return null;
  if (letter < 'j') return { lower: -value * PER_MICROMETRE - it, upper: -value * PER_MICROMETRE };
  const inner = letter === 'k' && !['4', '5', '6', '7'].includes(grade) ? 0 : value * PER_MICROMETRE;
  return { lower: inner, upper: inner + it };
}

/** Upper deviation of the holes K to ZC, or null where the standard gives none. */
function holeUpper(letter: string, grade: string, size: Decimal): number | null {
  const value = FUNDAMENTAL_DEVIATIONS[letter]?.[rangeOf(DEVIATION_RANGES, size)] ?? null;
  const rank = grade === '01' || grade === '0' ? 0 : Number(grade);
  if (value === null || rank < 3) return null;
  const small = rangeOf(SIZE_RANGES, size) === 0;
  const magnitude = value * PER_MICROMETRE;
  if (letter === 'k') {
    if (rank > 8) return small && !upToOne(size) ? 0 : null;
    return -magnitude + delta(size, rank);
  }
  if (letter === 'n' && rank > 8) return small ? (upToOne(size) ? null : -magnitude) : 0;
  if (letter === 'm' && rank === 6 && rangeOf(SIZE_RANGES, size) === 10) return -9 * PER_MICROMETRE;
  const lifted = letter === 'm' || letter === 'n' ? rank <= 8 : rank <= 7;
  return -magnitude + (lifted ? delta(size, rank) : 0);
}

function holeDeviations(letter: string, grade: string, size: Decimal, it: number): Deviations | null {
  if (letter === 'js') return { lower: -it / 2, upper: it / 2 };
  if (letter === 'j') {
    const upper = HOLE_J[grade]?.[rangeOf(SIZE_RANGES, size)];
    return upper === undefined ? null : { lower: upper * PER_MICROMETRE - it, upper: upper * PER_MICROMETRE };
  }
  if (letter < 'j') {
    const mirrored = shaftDeviations(letter, grade, size, it);
    return mirrored && { lower: 0 - mirrored.upper, upper: 0 - mirrored.lower };
  }
  const upper = holeUpper(letter, grade, size);
  return upper === null ? null : { lower: upper - it, upper };
}

function micrometres(units: number): Decimal {
  const hundredths = BigInt(units) * 5n;
  if (hundredths % 100n === 0n) return { digits: hundredths / 100n, scale: 0 };
  return hundredths % 10n === 0n ? { digits: hundredths / 10n, scale: 1 } : { digits: hundredths, scale: 2 };
}

function shifted(size: Decimal, deviation: Decimal): string {
  return formatDecimal(addDecimals(size, { digits: deviation.digits, scale: deviation.scale + 3 }));
}

/**
 * Limits of a tolerance class at a nominal size up to 500 mm, e.g. ('25', 'H7') → 25.000 to 25.021.
 *
 * Upper-case letters are holes, lower-case shafts: A to ZC, a to zc, IT01 to IT18. Grades and fundamental deviations
 * come from the tables; holes by rule: A to H mirror the shaft; JS = ±IT/2, half micrometres kept; K, M, N to IT8 and
 * P to ZC to IT7 are the shaft mirrored plus Δ = IT(n) − IT(n−1); N above IT8 is 0; M6 from 250 to 315 mm is −9 µm
 * (the standard's exception). A size range is over its lower and up to its upper end: 18 mm lies in 10 to 18.
 * Source: ISO 286-1:2010 Tables 1 to 5. Tests: reference cases iso286-limits-a, iso286-it-grades.
 * Undetermined: `outside-table` (size), `class-unreadable`, `class-not-given` (letter, grade and size not in the standard).
 */
export function fitClassLimits(nominal: string, fitClass: string): FitClassLimits | Undetermined {
  const match = CLASS.exec(fitClass.trim());
  const name = match?.[1] ?? '';
  const grade = match?.[2] ?? '';
  const letter = name.toLowerCase();
  if (!['js', 'j'].includes(letter) && !Object.hasOwn(FUNDAMENTAL_DEVIATIONS, letter))
    return undetermined(
      'class-unreadable',
      'The class is not a letter and a grade such as H7 or g6: check how it is written',
    );
  const size = readSize(nominal);
  if ('undetermined' in size) return size;
  const it = gradeTolerance(size, grade);
  const coarse = Number(grade) >= 14;
  if (it === null || (upToOne(size) && (coarse || letter === 'a' || letter === 'b')))
    return NOT_GIVEN(fitClass.trim());
  const hole = name !== letter;
  const deviations = (hole ? holeDeviations : shaftDeviations)(letter, grade, size, it);
  if (deviations === null) return NOT_GIVEN(fitClass.trim());
  const lower = micrometres(deviations.lower);
  const upper = micrometres(deviations.upper);
  const places = Math.max(lower.scale, upper.scale);
  const even = (d: Decimal): Decimal => ({ digits: d.digits * powerOfTen(places - d.scale), scale: places });
  return {
    method: 'ISO 286-1:2010 tables and rules',
    nominal: formatDecimal(size),
    fitClass: fitClass.trim(),
    feature: hole ? 'hole' : 'shaft',
    grade: `IT${grade}`,
    toleranceMicrometres: formatDecimal(micrometres(it)),
    upperMicrometres: formatDecimal(upper),
    lowerMicrometres: formatDecimal(lower),
    lower: shifted(size, even(lower)),
    upper: shifted(size, even(upper)),
  };
}

/**
 * Standard tolerance of a grade ('IT7', '7', '01' …) at a nominal size up to 500 mm, in micrometres as text.
 * Source: ISO 286-1:2010 Table 1. IT14 and coarser are not used up to 1 mm; undetermined there and outside the table.
 */
export function standardTolerance(nominal: string, grade: string): string | Undetermined {
  const size = readSize(nominal);
  if ('undetermined' in size) return size;
  const number = grade.trim().replace(/^IT/i, '');
  const it = gradeTolerance(size, number);
  if (it === null || (Number(number) >= 14 && upToOne(size))) return NOT_GIVEN(grade.trim());
  return formatDecimal(micrometres(it));
}

/** What the formula of the standard gives before its rounding. */
export interface ToleranceFactor {
  readonly method: 'i = 0.45·∛D + 0.001·D';
  /** Geometric mean of the size range in mm; for the first range √(1·3). */
  readonly geometricMean: number;
  /** Standard tolerance factor i in µm. */
  readonly factor: number;
  /** Unrounded tolerance in µm by grade: IT01, IT0, IT1, IT5 to IT18. */
  readonly grades: Readonly<Record<string, number>>;
}

/**
 * The standard tolerance factor of the size range a nominal size lies in, and the unrounded grades it gives.
 *
 * i = 0.45·∛D + 0.001·D with i in µm and D in mm, D the geometric mean of the ends of the range. For explanation
 * and checking: the tolerance itself is the table's rounded value (`standardTolerance`).
 * Source: ISO 286-1:2010 annex A. Test: reference case iso286-it-formula.
 */
export function standardToleranceFactor(nominal: string): ToleranceFactor | Undetermined {
  const size = readSize(nominal);
  if ('undetermined' in size) return size;
  const range = rangeOf(SIZE_RANGES, size);
  const mean = Math.sqrt((SIZE_RANGES[range - 1] ?? 1) * (SIZE_RANGES[range] ?? 1));
  const factor = 0.45 * Math.cbrt(mean) + 0.001 * mean;
  const grades: Record<string, number> = {};
  for (const [grade, [constant, slope]] of Object.entries(FINE_GRADE_LINES))
    grades[`IT${grade}`] = constant + slope * mean;
  for (const [grade, multiplier] of Object.entries(GRADE_MULTIPLIERS))
    grades[`IT${grade}`] = multiplier * factor;
  return { method: 'i = 0.45·∛D + 0.001·D', geometricMean: mean, factor, grades };
}
