import { addDecimals, compareDecimals, powerOfTen, subtractDecimals } from '../decimal/decimal.ts';
import type { Decimal } from '../decimal/decimal.ts';
import { MAXIMUM_DIGITS, parseDecimal } from '../decimal/parse-decimal.ts';
import { divideRounded } from '../decimal/round-decimal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { readLimits } from './limits.ts';
import type { Limits, ReadLimits } from './limits.ts';

/**
 * How a reading is compared with the limits.
 *
 * `simple`: simple acceptance (ISO 14253-1, JCGM 106:2012 clause 8.2): the reading decides, a reading equal to a limit
 * conforms. `rounding` 'absolute' (default; limits are exact, as ASME Y14.5 reads drawings) or 'e29' (ASTM E29
 * rounding method: the reading is first rounded half to even to the last place of the limit; `decimals` overrides
 * that place).
 *
 * `guard-band`: ISO 14253-1 with the expanded uncertainty U (text, in the unit of the limits). Conformity is proved
 * inside [lower + U, upper − U], non-conformity below lower − U or above upper + U; between, nothing is proved and
 * uncertainty counts against the party who must prove.
 */
export type DecisionRule =
  | { readonly kind: 'simple'; readonly rounding?: 'absolute' | 'e29'; readonly decimals?: number }
  | {
      readonly kind: 'guard-band';
      readonly expandedUncertainty: string;
      readonly proves: 'supplier' | 'customer';
    };

/** Simple acceptance against absolute limits: what holds where nothing else is agreed. */
export const SIMPLE_ACCEPTANCE: DecisionRule = { kind: 'simple' };

/** A boundary; `inclusive` tells whether the value itself belongs to the inside. */
export interface Bound {
  readonly value: Decimal;
  readonly inclusive: boolean;
}

/** An interval of the number line; null is no boundary on that side. */
export interface Zone {
  readonly low: Bound | null;
  readonly high: Bound | null;
}

/** Largest scale and number of digits handled by plain integers; beyond, BigInt decides. */
export const FAST_DIGITS = 15;

/**
 * The zones as integers at one scale: a reading of m units is accepted when acceptLow ≤ m ≤ acceptHigh, and refused
 * when m < possibleLow or m > possibleHigh.
 */
export interface ScaledBounds {
  readonly acceptLow: number;
  readonly acceptHigh: number;
  readonly possibleLow: number;
  readonly possibleHigh: number;
}

/**
 * Limits and rule made ready for many readings. A reading inside `accept` is in tolerance, outside `possible` it is
 * out of tolerance, between the two it is undecided.
 */
export interface CompiledLimits {
  readonly limits: ReadLimits;
  readonly rule: DecisionRule;
  readonly accept: Zone;
  readonly possible: Zone;
  /** True when no reading can be accepted: no limit is given, or the guard bands use up the band. */
  readonly acceptEmpty: boolean;
  /** Decimals readings are rounded to, null with absolute limits. */
  readonly roundingPlaces: number | null;
  /** Integer bounds by scale, made when a reading of that scale is first met. */
  readonly scaled: (ScaledBounds | undefined)[];
}

/** The outermost whole number of 10^(−scale) that a bound still lets in. */
function scaledBound(bound: Bound | null, scale: number, side: 'low' | 'high'): number {
  if (bound === null) return side === 'low' ? -Infinity : Infinity;
  const numerator = bound.value.digits * powerOfTen(scale);
  const denominator = powerOfTen(bound.value.scale);
  const threshold = divideRounded(numerator, denominator, side === 'low' ? 'ceiling' : 'floor');
  const onBound = threshold * denominator === numerator;
  if (bound.inclusive || !onBound) return Number(threshold);
  return Number(side === 'low' ? threshold + 1n : threshold - 1n);
}

/** The integer bounds for readings with `scale` decimals, 0 to 15. */
export function boundsAtScale(compiled: CompiledLimits, scale: number): ScaledBounds {
  const known = compiled.scaled[scale];
  if (known !== undefined) return known;
  const { accept, possible, acceptEmpty } = compiled;
  const bounds = {
    acceptLow: acceptEmpty ? Infinity : scaledBound(accept.low, scale, 'low'),
    acceptHigh: scaledBound(accept.high, scale, 'high'),
    possibleLow: scaledBound(possible.low, scale, 'low'),
    possibleHigh: scaledBound(possible.high, scale, 'high'),
  };
  compiled.scaled[scale] = bounds;
  return bounds;
}

const inclusive = (value: Decimal | null): Bound | null =>
  value === null ? null : { value, inclusive: true };

/** The reading that still rounds, half to even at `places`, to a value inside the limit. */
function roundingBound(limit: Decimal | null, places: number, side: 'low' | 'high'): Bound | null {
  if (limit === null) return null;
  const up = side === 'high';
  const unit = divideRounded(
    limit.digits * powerOfTen(places),
    powerOfTen(limit.scale),
    up ? 'floor' : 'ceiling',
  );
  const value = { digits: unit * 10n + (up ? 5n : -5n), scale: places + 1 };
  return { value, inclusive: unit % 2n === 0n };
}

/** Limits moved inwards (positive margin) or outwards (negative margin). */
function shiftedZone(limits: ReadLimits, margin: Decimal): Zone {
  return {
    low: limits.lower && { value: addDecimals(limits.lower, margin), inclusive: true },
    high: limits.upper && { value: subtractDecimals(limits.upper, margin), inclusive: true },
  };
}

function isEmpty({ low, high }: Zone): boolean {
  return low !== null && high !== null && compareDecimals(low.value, high.value) > 0;
}

function zonesOf(limits: ReadLimits, rule: DecisionRule, places: number | null): [Zone, Zone] | Undetermined {
  if (rule.kind === 'simple') {
    const zone: Zone =
      places === null
        ? { low: inclusive(limits.lower), high: inclusive(limits.upper) }
        : {
            low: roundingBound(limits.lower, places, 'low'),
            high: roundingBound(limits.upper, places, 'high'),
          };
    return [zone, zone];
  }
  const uncertainty = parseDecimal(rule.expandedUncertainty);
  if ('undetermined' in uncertainty)
    return undetermined(
      'uncertainty-unreadable',
      `The expanded uncertainty cannot be read. ${uncertainty.reason}`,
    );
  if (uncertainty.digits < 0n)
    return undetermined(
      'uncertainty-negative',
      'The expanded uncertainty is negative: enter it as a positive number',
    );
  return [
    shiftedZone(limits, uncertainty),
    shiftedZone(limits, { digits: -uncertainty.digits, scale: uncertainty.scale }),
  ];
}

function placesOf(limits: ReadLimits, rule: DecisionRule): number | null | Undetermined {
  if (rule.kind !== 'simple' || rule.rounding !== 'e29') return null;
  const places = rule.decimals ?? Math.max(limits.lower?.scale ?? 0, limits.upper?.scale ?? 0);
  return Number.isInteger(places) && places >= 0 && places <= MAXIMUM_DIGITS
    ? places
    : undetermined(
        'decimals-invalid',
        `The decimals to round to are a whole number from 0 to ${MAXIMUM_DIGITS}`,
      );
}

/**
 * Prepares limits and a decision rule for many readings, so that each costs a few integer comparisons.
 *
 * Every rule becomes two intervals of exact decimals (accepted, and not refused). The rounding method is turned into
 * the limit a raw reading must keep: rounding half to even to D decimals is ≤ u exactly when the reading is below
 * u + ½·10⁻ᴰ, or equal to it with u even in its last place. With both limits given, D is the larger number of
 * decimals of the two, so that one rounded value is compared with both. A natural bound does not refuse: a reading
 * beyond it is impossible, hence undecided. Without any limit nothing is accepted or refused: undecided.
 * Undetermined when a limit, the uncertainty or the decimals cannot be read, or the limits are crossed.
 */
export function compileLimits(
  limits: Limits,
  rule: DecisionRule = SIMPLE_ACCEPTANCE,
): CompiledLimits | Undetermined {
  const read = readLimits(limits);
  if ('undetermined' in read) return read;
  const places = placesOf(read, rule);
  if (typeof places === 'object' && places !== null) return places;
  const zones = zonesOf(read, rule, places);
  if ('undetermined' in zones) return zones;
  const [banded, possible] = zones;
  const accept: Zone = {
    low: banded.low ?? inclusive(read.naturalLower),
    high: banded.high ?? inclusive(read.naturalUpper),
  };
  const acceptEmpty = (read.lower === null && read.upper === null) || isEmpty(accept);
  return {
    limits: read,
    rule,
    accept,
    possible,
    acceptEmpty,
    roundingPlaces: places,
    scaled: [],
  };
}
