import {
  addDecimals,
  compareDecimals,
  decimalOf,
  digitsAtScale,
  formatDecimal,
  multiplyDecimals,
  powerOfTen,
  subtractDecimals,
  toNumber,
} from '../decimal/decimal.ts';
import type { Decimal } from '../decimal/decimal.ts';
import { parseDecimal } from '../decimal/parse-decimal.ts';
import { integerSquareRoot } from '../decimal/ratio.ts';
import type { Undetermined } from '../result.ts';

/** A position as the diameter of the smallest zone that holds the axis or point. */
export interface PositionDiameter {
  readonly method: 'cylindrical zone, 2·√(dx² + dy²)' | 'spherical zone, 2·√(dx² + dy² + dz²)';
  /** The diameter rounded half up, three decimals beyond the deviations, exact where the root ends before. */
  readonly text: string;
  readonly exact: boolean;
  /** For drawing only. */
  readonly value: number;
  /** Exact square of the diameter: what a comparison with a limit uses. */
  readonly squared: Decimal;
}

const FOUR = decimalOf(4n);
const EXTRA_PLACES = 3;

/** Square root to `places` decimals at least, rounded half up or up, with the answer whether it is exact. */
function squareRoot(square: Decimal, places: number, up = false): { root: Decimal; exact: boolean } {
  const even = square.scale % 2 === 0 ? square.scale : square.scale + 1;
  const scale = Math.max(even / 2, places);
  const digits = digitsAtScale(square, even) * powerOfTen(2 * scale - even);
  const floor = integerSquareRoot(digits);
  const rest = digits - floor * floor;
  const away = up ? rest > 0n : rest > floor;
  return { root: { digits: away ? floor + 1n : floor, scale }, exact: rest === 0n };
}

/**
 * Position of an axis or point from its coordinate deviations, as a diameter: 2·√(dx² + dy²), with dz the spherical
 * zone 2·√(dx² + dy² + dz²). Deviations are decimal text in one unit, of either sign, measured from the basic location.
 *
 * The root is rarely a finite decimal, so the exact square is kept beside the text to be read: a comparison with a
 * limit compares squares (`comparePosition`). Source: ASME Y14.5-2018, ISO 1101:2017 (position, zone ⌀ and S⌀).
 * Undetermined where a deviation cannot be read.
 */
export function positionDiameter(dx: string, dy: string, dz?: string): PositionDiameter | Undetermined {
  const texts = dz === undefined ? [dx, dy] : [dx, dy, dz];
  let sum = decimalOf(0n);
  let places = 0;
  for (const text of texts) {
    const deviation = parseDecimal(text);
    if ('undetermined' in deviation) return deviation;
    places = Math.max(places, deviation.scale);
    sum = addDecimals(sum, multiplyDecimals(deviation, deviation));
  }
  const squared = multiplyDecimals(FOUR, sum);
  const { root, exact } = squareRoot(squared, places + EXTRA_PLACES);
  const shown = exact ? shorten(root, places) : root;
  return {
    method: dz === undefined ? 'cylindrical zone, 2·√(dx² + dy²)' : 'spherical zone, 2·√(dx² + dy² + dz²)',
    text: formatDecimal(shown),
    exact,
    value: Math.sqrt(toNumber(squared)),
    squared,
  };
}

function shorten(d: Decimal, places: number): Decimal {
  const extra = powerOfTen(d.scale - places);
  return d.digits % extra === 0n ? { digits: d.digits / extra, scale: places } : d;
}

/** Exact order of a position and a tolerance ≥ 0, by their squares: −1 inside, 0 on, 1 beyond the zone. */
export function comparePosition(position: PositionDiameter, tolerance: Decimal): -1 | 0 | 1 {
  return tolerance.digits < 0n
    ? 1
    : compareDecimals(position.squared, multiplyDecimals(tolerance, tolerance));
}

/**
 * How far a position lies beyond the zone, null inside or on it. Rounded up, three decimals beyond the finer of the
 * deviations and the tolerance, so that a position that is out never shows a distance of 0.
 */
export function positionBeyond(position: PositionDiameter, tolerance: Decimal): string | null {
  if (comparePosition(position, tolerance) <= 0) return null;
  const places = Math.max(position.squared.scale / 2, tolerance.scale);
  const { root, exact } = squareRoot(position.squared, places + EXTRA_PLACES, true);
  return formatDecimal(subtractDecimals(exact ? shorten(root, places) : root, tolerance));
}
