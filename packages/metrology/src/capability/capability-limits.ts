import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

/**
 * What a characteristic is asked to keep. A natural bound is where the quantity itself ends (0 for flatness, runout, position): it is not a
 * limit, gives no index and no fraction outside, and never makes a one-sided characteristic two-sided.
 */
export interface CapabilityLimits {
  readonly lower?: number;
  readonly upper?: number;
  readonly naturalLower?: number;
  readonly naturalUpper?: number;
  /** Wanted value; the middle of the band when missing and both limits are given. */
  readonly target?: number;
}

/** A refusal when the limits cannot be used, otherwise nothing. */
export function limitsFault(limits: CapabilityLimits): Undetermined | undefined {
  const { lower, upper, naturalLower, naturalUpper, target } = limits;
  if (
    [lower, upper, naturalLower, naturalUpper, target].some(
      (value) => value !== undefined && !Number.isFinite(value),
    )
  ) {
    return undetermined('not-finite', 'A limit is not a number');
  }
  if (lower === undefined && upper === undefined) {
    return undetermined(
      'no-limits',
      'An index needs an upper or a lower tolerance limit; a natural bound is not one',
    );
  }
  if (lower !== undefined && upper !== undefined && !(upper > lower)) {
    return undetermined('limits', 'The upper limit must be greater than the lower limit');
  }
  if (upper !== undefined && naturalLower !== undefined && !(upper > naturalLower)) {
    return undetermined('limits', 'The upper limit must be greater than the natural bound below it');
  }
  if (lower !== undefined && naturalUpper !== undefined && !(lower < naturalUpper)) {
    return undetermined('limits', 'The lower limit must be less than the natural bound above it');
  }
  return undefined;
}

/** The answer to any figure that needs two limits where there is one. */
export function oneSided(): Undetermined {
  return undetermined(
    'one-sided',
    'A characteristic with one limit has no figure that compares with the width of a band',
  );
}
