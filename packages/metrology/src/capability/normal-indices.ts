import { isUndetermined, undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { oneSided } from './capability-limits.ts';
import type { CapabilityLimits } from './capability-limits.ts';
import { normalFractionOutside } from './fraction-outside.ts';
import type { ExpectedOutside } from './fraction-outside.ts';

/** What the spread was taken from; it decides the letters: within subgroups C, over all readings P. */
export type SpreadBasis = 'within' | 'overall';

/** Trade symbols of a set of indices, for headings. */
export const INDEX_SYMBOLS = {
  within: { potential: 'Cp', lowerSide: 'CpkL', upperSide: 'CpkU', minimum: 'Cpk' },
  overall: { potential: 'Pp', lowerSide: 'PpkL', upperSide: 'PpkU', minimum: 'Ppk' },
} as const satisfies Record<SpreadBasis, unknown>;

export interface NormalIndices {
  readonly method: string;
  readonly basis: SpreadBasis;
  readonly symbols: (typeof INDEX_SYMBOLS)[SpreadBasis];
  readonly inputs: { readonly mean: number; readonly sigma: number; readonly limits: CapabilityLimits };
  /** Cp or Pp: band / 6 s; undetermined with one limit */
  readonly potential: number | Undetermined;
  readonly lowerSide: number | Undetermined;
  readonly upperSide: number | Undetermined;
  /** Cpk or Ppk: the smaller side, or the only one */
  readonly minimum: number;
  readonly worstSide: 'lower' | 'upper';
  /** how far off the middle, in half bands, without sign: 0 at the middle, 1 on a limit */
  readonly offCentre: number | Undetermined;
  /** Cpm: band / 6 sqrt(s^2 + (mean - target)^2) */
  readonly cpm: number | Undetermined;
  /** Cpmk: smaller side / sqrt(1 + ((mean - target)/s)^2) */
  readonly cpmk: number | Undetermined;
  readonly expectedOutside: ExpectedOutside;
}

/**
 * Capability indices of a normal characteristic from its mean and one standard deviation.
 *
 * Cp = (U - L)/6 s; CpkL = (mean - L)/3 s; CpkU = (U - mean)/3 s; Cpk the smaller; k = |mean - M|/((U - L)/2), M the middle;
 * Cpm = (U - L)/(6 sqrt(s^2 + (mean - T)^2)) (Chan, Cheng, Spiring, J. Qual. Technol. 20, 1988), T the target or else the middle.
 * With one limit only that side exists: Cp, k, Cpm and Cpmk are undetermined. A natural bound gives no side.
 * Symbols follow the basis: the same formulas are Pp, Ppk when `sigma` is the spread over all readings (ISO 22514-2; AIAG SPC, 2nd ed.).
 * @param sigma standard deviation, above 0, in the unit of the limits
 * Tested against nist-capability-616, capability-cpm-two-processes, capability-one-sided and nist-furnace-capability.
 */
export function normalIndices(
  mean: number,
  sigma: number,
  limits: CapabilityLimits,
  basis: SpreadBasis = 'overall',
): NormalIndices | Undetermined {
  const expectedOutside = normalFractionOutside(mean, sigma, limits);
  if (isUndetermined(expectedOutside)) return expectedOutside;
  const { lower, upper } = limits;
  const lowerSide = lower === undefined ? noSide('lower') : (mean - lower) / (3 * sigma);
  const upperSide = upper === undefined ? noSide('upper') : (upper - mean) / (3 * sigma);
  const sides = { lower: sideOr(lowerSide), upper: sideOr(upperSide) };
  const minimum = Math.min(sides.lower, sides.upper);
  const band =
    lower === undefined || upper === undefined
      ? undefined
      : { half: (upper - lower) / 2, middle: (upper + lower) / 2 };
  const target = limits.target ?? band?.middle ?? 0;
  const towards = Math.hypot(1, (mean - target) / sigma);
  return {
    method: `normal distribution, ${basis} spread`,
    basis,
    symbols: INDEX_SYMBOLS[basis],
    inputs: { mean, sigma, limits },
    potential: band ? band.half / (3 * sigma) : oneSided(),
    lowerSide,
    upperSide,
    minimum,
    worstSide: sides.lower < sides.upper ? 'lower' : 'upper',
    offCentre: band ? Math.abs(mean - band.middle) / band.half : oneSided(),
    cpm: band ? band.half / (3 * sigma * towards) : oneSided(),
    cpmk: band ? minimum / towards : oneSided(),
    expectedOutside,
  };
}

function noSide(side: 'lower' | 'upper'): Undetermined {
  return undetermined('no-limit', `There is no ${side} tolerance limit`);
}

function sideOr(side: number | Undetermined): number {
  return typeof side === 'number' ? side : Infinity;
}
