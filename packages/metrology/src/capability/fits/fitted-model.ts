/** Distributions a characteristic may be fitted with. `half-normal` is the folded normal of mean 0. */
export const FAMILIES = [
  'normal',
  'lognormal',
  'weibull',
  'gamma',
  'folded-normal',
  'half-normal',
  'rayleigh',
  'box-cox',
  'johnson',
] as const;

export type Family = (typeof FAMILIES)[number];

/** A fitted distribution as plain data; `distributionOf` turns it into functions. */
export interface FittedModel {
  readonly family: Family;
  /** Which of a system of curves it is (Johnson: unbounded SU, bounded SB, lognormal SL). */
  readonly variant?: 'unbounded' | 'bounded' | 'lognormal';
  readonly method: string;
  readonly n: number;
  /** What was subtracted from the readings first: the natural bound, or 0. */
  readonly origin: number;
  /** Named parameters of the distribution of (reading - origin). */
  readonly parameters: Readonly<Record<string, number>>;
  /** Parameters estimated, for the information criterion. */
  readonly estimated: number;
  /** Natural logarithm of the likelihood of the readings, no constant dropped. */
  readonly logLikelihood: number;
}

/** The functions of a distribution, in the unit of the readings; each tail by itself, so that small ones keep their digits. */
export interface Distribution {
  /** P(X <= x) */
  readonly lowerTail: (x: number) => number;
  /** P(X > x) */
  readonly upperTail: (x: number) => number;
  /** x with P(X <= x) = p; -Infinity where the distribution does not reach that far */
  readonly lowerQuantile: (p: number) => number;
  /** x with P(X > x) = p; Infinity where the distribution does not reach that far */
  readonly upperQuantile: (p: number) => number;
}
