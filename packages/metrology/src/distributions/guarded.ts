import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

/** What an argument must be, in words for the reason and as a test. */
export interface Domain {
  readonly words: string;
  readonly holds: (value: number) => boolean;
}

/** Any number, the two infinities included. */
export const anyNumber: Domain = { words: 'a number', holds: (v) => !Number.isNaN(v) };
/** Any finite number. */
export const finite: Domain = { words: 'a finite number', holds: Number.isFinite };
/** A shape or number of degrees of freedom; beyond these ends the series here are slow or lose digits. */
export const positive: Domain = { words: 'a number from 0.0001 to 1e8', holds: (v) => v >= 1e-4 && v <= 1e8 };
/** The mean of a count. */
export const notNegative: Domain = { words: 'a number from 0 to 1e8', holds: (v) => v >= 0 && v <= 1e8 };
/** Degrees of freedom; Infinity stands for a deviation that is known. */
export const degrees: Domain = {
  words: 'a number from 0.0001 to 1e8, or Infinity for a known deviation',
  holds: (v) => positive.holds(v) || v === Infinity,
};
/** A probability strictly between 0 and 1. */
export const probability: Domain = {
  words: 'a probability above 0 and below 1',
  holds: (v) => v > 0 && v < 1,
};
/** A probability from 0 to 1. */
export const share: Domain = { words: 'a number from 0 to 1', holds: (v) => v >= 0 && v <= 1 };
/** A number of pieces. */
export const count: Domain = {
  words: 'a whole number from 0 to 1e9',
  holds: (v) => Number.isInteger(v) && v >= 0 && v <= 1e9,
};
/** A whole number from 2 to 200. */
export const groupCount: Domain = {
  words: 'a whole number from 2 to 200',
  holds: (v) => Number.isInteger(v) && v >= 2 && v <= 200,
};

/**
 * A function that tests its arguments first and answers with a reason when one is outside its domain, when they do not
 * fit together, or when the result is not a finite number.
 */
export function guarded<A extends number[]>(
  name: string,
  f: (...values: A) => number,
  domains: readonly (readonly [string, Domain])[],
  together: (...values: A) => string | null = () => null,
): (...values: A) => number | Undetermined {
  return (...values) => {
    for (let index = 0; index < domains.length; index += 1) {
      const [label, domain] = domains[index] as readonly [string, Domain];
      const value = values[index];
      if (typeof value !== 'number' || !domain.holds(value))
        return undetermined(
          'outside-domain',
          `${name} needs ${label} to be ${domain.words}: it is ${String(value)}`,
        );
    }
    const conflict = together(...values);
    if (conflict !== null) return undetermined('outside-domain', `${name}: ${conflict}`);
    const result = f(...values);
    return Number.isFinite(result)
      ? result
      : undetermined('not-finite', `${name} has no finite value there: choose arguments nearer the centre`);
  };
}
