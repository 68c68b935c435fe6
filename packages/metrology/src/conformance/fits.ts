import { formatDecimal, negate, subtractDecimals } from '../decimal/decimal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { fitClassLimits } from './fit-class.ts';
import type { FitClassLimits } from './fit-class.ts';
import { readSizeLimits } from './bonus.ts';
import type { Limits } from './limits.ts';

/** How a hole and a shaft go together. Clearances are in the unit of the sizes; negative is interference. */
export interface Fit {
  readonly method: 'extremes of hole and shaft';
  readonly type: 'clearance' | 'transition' | 'interference';
  readonly maximumClearance: string;
  readonly minimumClearance: string;
  /** Largest interference as a positive number; null for a clearance fit. */
  readonly maximumInterference: string | null;
  /** Smallest interference; null unless every pair interferes. */
  readonly minimumInterference: string | null;
}

/**
 * The fit of any hole and shaft given by their size limits: maximum clearance = hole upper − shaft lower, minimum
 * clearance = hole lower − shaft upper, exact. A minimum clearance of exactly 0 is a clearance fit, a maximum clearance
 * of exactly 0 an interference fit (ISO 286-1:2010 clause 3.3); between, a transition fit.
 */
export function fitOfLimits(hole: Limits, shaft: Limits): Fit | Undetermined {
  const outer = readSizeLimits(hole);
  if ('undetermined' in outer) return outer;
  const inner = readSizeLimits(shaft);
  if ('undetermined' in inner) return inner;
  const most = subtractDecimals(outer.upper, inner.lower);
  const least = subtractDecimals(outer.lower, inner.upper);
  const type = least.digits >= 0n ? 'clearance' : most.digits <= 0n ? 'interference' : 'transition';
  return {
    method: 'extremes of hole and shaft',
    type,
    maximumClearance: formatDecimal(most),
    minimumClearance: formatDecimal(least),
    maximumInterference: type === 'clearance' ? null : formatDecimal(negate(least)),
    minimumInterference: type === 'interference' ? formatDecimal(negate(most)) : null,
  };
}

/** A fit of two tolerance classes at one nominal size. */
export interface ClassFit extends Fit {
  readonly nominal: string;
  readonly hole: FitClassLimits;
  readonly shaft: FitClassLimits;
}

/**
 * The fit of two tolerance classes, e.g. fit('25', 'H7', 'g6'): extremes and type, in millimetres as text.
 * Source: ISO 286-1:2010. Test: reference case iso286-fits. Undetermined where a class is not given at this size, or
 * the first class is not a hole and the second not a shaft.
 */
export function fit(nominal: string, hole: string, shaft: string): ClassFit | Undetermined {
  const outer = fitClassLimits(nominal, hole);
  if ('undetermined' in outer) return outer;
  const inner = fitClassLimits(nominal, shaft);
  if ('undetermined' in inner) return inner;
  if (outer.feature !== 'hole' || inner.feature !== 'shaft')
    return undetermined(
      'not-a-fit',
      'A fit is a hole (capital letter) and a shaft (small letter): check the two classes',
    );
  const together = fitOfLimits(outer, inner);
  return 'undetermined' in together
    ? together
    : { ...together, nominal: outer.nominal, hole: outer, shaft: inner };
}
