import { digitsAtScale, formatDecimal, powerOfTen } from '../decimal/decimal.ts';
import type { Decimal } from '../decimal/decimal.ts';
import { ratioToNumber } from '../decimal/ratio.ts';
import { FAST_DIGITS } from './compile-limits.ts';

const POWERS = Float64Array.from({ length: FAST_DIGITS + 1 }, (_, exponent) => 10 ** exponent);

/** Readings that were accepted as numbers: integer units and scale where they fit, else the exact decimal. */
export class ReadingStore {
  readonly units: Float64Array;
  readonly scales: Uint8Array;
  readonly long = new Map<number, Decimal>();
  count = 0;
  largestScale = 0;
  sameScale = true;

  constructor(capacity: number) {
    this.units = new Float64Array(capacity);
    this.scales = new Uint8Array(capacity);
  }

  exact(position: number): Decimal {
    return (
      this.long.get(position) ?? {
        digits: BigInt(this.units[position] ?? 0),
        scale: this.scales[position] ?? 0,
      }
    );
  }
}

/** Extremes as typed, mean and standard deviation (divisor n − 1) of the readings of a sample. */
export interface Summary {
  min: string | null;
  max: string | null;
  mean: number | null;
  standardDeviation: number | null;
}

/** All readings as integers at the largest scale, or null when one of them would leave the safe integers. */
function alignedUnits(store: ReadingStore): Float64Array | null {
  const { units, scales, count, largestScale } = store;
  if (store.long.size > 0) return null;
  if (store.sameScale) return units;
  const aligned = new Float64Array(count);
  for (let position = 0; position < count; position += 1) {
    const lifted = (units[position] ?? 0) * (POWERS[largestScale - (scales[position] ?? 0)] ?? 1);
    if (Math.abs(lifted) > Number.MAX_SAFE_INTEGER) return null;
    aligned[position] = lifted;
  }
  return aligned;
}

/**
 * Integers in double form: differences from the first reading are exact, so that the mean carries one rounding and
 * the deviations start from exact numbers however large the readings are.
 */
function summariseIntegers(store: ReadingStore): Summary | null {
  const aligned = alignedUnits(store);
  if (aligned === null) return null;
  const { count, largestScale } = store;
  const origin = aligned[0] ?? 0;
  let low = 0;
  let high = 0;
  let lowest = 0;
  let highest = 0;
  let sum = 0;
  for (let position = 0; position < count; position += 1) {
    const difference = (aligned[position] ?? 0) - origin;
    sum += difference;
    if (difference < lowest) {
      lowest = difference;
      low = position;
    } else if (difference > highest) {
      highest = difference;
      high = position;
    }
  }
  if (Math.max(Math.abs(lowest), Math.abs(highest)) * count > Number.MAX_SAFE_INTEGER) return null;
  const centre = sum / count;
  let squares = 0;
  for (let position = 0; position < count; position += 1) {
    const deviation = (aligned[position] ?? 0) - origin - centre;
    squares += deviation * deviation;
  }
  const unit = powerOfTen(largestScale);
  return {
    min: formatDecimal(store.exact(low)),
    max: formatDecimal(store.exact(high)),
    mean: ratioToNumber({
      numerator: BigInt(origin) * BigInt(count) + BigInt(sum),
      denominator: unit * BigInt(count),
    }),
    standardDeviation: count < 2 ? null : Math.sqrt(squares / (count - 1)) / Number(unit),
  };
}

/** The same in BigInt, for readings of more than 15 digits or of very unlike scales. */
function summariseExactly(store: ReadingStore): Summary {
  let scale = store.largestScale;
  for (const value of store.long.values()) scale = Math.max(scale, value.scale);
  let low = 0;
  let high = 0;
  let lowest: bigint | null = null;
  let highest: bigint | null = null;
  let sum = 0n;
  let squares = 0n;
  for (let position = 0; position < store.count; position += 1) {
    const units = digitsAtScale(store.exact(position), scale);
    sum += units;
    squares += units * units;
    if (lowest === null || units < lowest) {
      lowest = units;
      low = position;
    }
    if (highest === null || units > highest) {
      highest = units;
      high = position;
    }
  }
  const n = BigInt(store.count);
  const unit = powerOfTen(scale);
  const variance = { numerator: n * squares - sum * sum, denominator: n * (n - 1n) * unit * unit };
  return {
    min: formatDecimal(store.exact(low)),
    max: formatDecimal(store.exact(high)),
    mean: ratioToNumber({ numerator: sum, denominator: n * unit }),
    standardDeviation: n < 2n ? null : Math.sqrt(ratioToNumber(variance)),
  };
}

/** Summarises the readings of a sample; every figure is null where there are too few readings for it. */
export function summarise(store: ReadingStore): Summary {
  if (store.count === 0) return { min: null, max: null, mean: null, standardDeviation: null };
  return summariseIntegers(store) ?? summariseExactly(store);
}
