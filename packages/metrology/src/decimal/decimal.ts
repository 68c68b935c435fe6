/**
 * An exact decimal number as typed: value = digits · 10^(−scale), scale ≥ 0.
 * The scale is part of the number: 2.50 is { digits: 250n, scale: 2 } and stays 2.50.
 */
export interface Decimal {
  readonly digits: bigint;
  readonly scale: number;
}

const powers: bigint[] = [1n];

/** 10 to the power `exponent` (integer ≥ 0) as an integer; earlier powers are kept. */
export function powerOfTen(exponent: number): bigint {
  while (powers.length <= exponent) powers.push((powers[powers.length - 1] ?? 1n) * 10n);
  return powers[exponent] ?? 1n;
}

/** Makes a decimal of an integer and a scale, without reducing it. */
export function decimalOf(digits: bigint, scale = 0): Decimal {
  return { digits, scale };
}

/** The digits of `d` at a scale not below its own: the same value with zeros appended. */
export function digitsAtScale(d: Decimal, scale: number): bigint {
  return scale === d.scale ? d.digits : d.digits * powerOfTen(scale - d.scale);
}

/**
 * Exact order of two decimals: −1 when a < b, 0 when equal in value (2.5 equals 2.50), 1 when a > b.
 */
export function compareDecimals(a: Decimal, b: Decimal): -1 | 0 | 1 {
  const scale = Math.max(a.scale, b.scale);
  const left = digitsAtScale(a, scale);
  const right = digitsAtScale(b, scale);
  return left < right ? -1 : left > right ? 1 : 0;
}

/** Exact sum; the scale is the larger of the two, as in writing numbers below each other. */
export function addDecimals(a: Decimal, b: Decimal): Decimal {
  const scale = Math.max(a.scale, b.scale);
  return { digits: digitsAtScale(a, scale) + digitsAtScale(b, scale), scale };
}

/** Exact difference a − b; the scale is the larger of the two. */
export function subtractDecimals(a: Decimal, b: Decimal): Decimal {
  return addDecimals(a, negate(b));
}

/** Exact product; the scale is the sum of the two scales. */
export function multiplyDecimals(a: Decimal, b: Decimal): Decimal {
  return { digits: a.digits * b.digits, scale: a.scale + b.scale };
}

/** The number with the opposite sign; zero has no sign. */
export function negate(d: Decimal): Decimal {
  return { digits: -d.digits, scale: d.scale };
}

/** The magnitude |d|. */
export function absolute(d: Decimal): Decimal {
  return d.digits < 0n ? negate(d) : d;
}

/** The smaller of two decimals; of equals the first. */
export function smallerDecimal(a: Decimal, b: Decimal): Decimal {
  return compareDecimals(b, a) < 0 ? b : a;
}

/** The larger of two decimals; of equals the first. */
export function largerDecimal(a: Decimal, b: Decimal): Decimal {
  return compareDecimals(b, a) > 0 ? b : a;
}

/**
 * The number as text with every decimal it was given: { 250n, 2 } is "2.50", { -5n, 2 } is "-0.05".
 * Always a plain hyphen-minus and a point, never an exponent, so that `parseDecimal` reads it back unchanged.
 */
export function formatDecimal(d: Decimal): string {
  const negative = d.digits < 0n;
  const text = (negative ? -d.digits : d.digits).toString();
  const sign = negative ? '-' : '';
  if (d.scale === 0) return sign + text;
  const padded = text.padStart(d.scale + 1, '0');
  const point = padded.length - d.scale;
  return `${sign}${padded.slice(0, point)}.${padded.slice(point)}`;
}

/** Drops zeros at the end of the decimals, down to `keep` decimals: 2.500 becomes 2.5 with keep 0. */
export function trimZeros(d: Decimal, keep = 0): Decimal {
  let { digits, scale } = d;
  while (scale > keep && digits % 10n === 0n) {
    digits /= 10n;
    scale -= 1;
  }
  return { digits, scale };
}

/** The nearest double. For drawing and statistics only: a verdict is never taken from it. */
export function toNumber(d: Decimal): number {
  return Number(formatDecimal(d));
}
