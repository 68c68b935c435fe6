import { z } from 'zod';

export const requestStates = ['draft', 'issued', 'withdrawn'] as const;
export const requestState = z.enum(requestStates);
export type RequestState = z.infer<typeof requestState>;

/** State of one round of a package. */
export const packageStates = [
  'requested',
  'in-preparation',
  'submitted',
  'in-review',
  'sent-back',
  'approved',
  'interim-approval',
  'rejected',
  'lapsed',
  'withdrawn',
  'superseded',
] as const;
export const packageState = z.enum(packageStates);
export type PackageState = z.infer<typeof packageState>;

/** The supplier may still change the round's evidence. */
export const openForSupplier: readonly PackageState[] = ['in-preparation'];
/** The customer may mark rows and sign the disposition. */
export const openForReview: readonly PackageState[] = ['submitted', 'in-review'];
/** A disposition has been signed. */
export const decidedStates: readonly PackageState[] = [
  'sent-back',
  'approved',
  'interim-approval',
  'rejected',
  'lapsed',
  'superseded',
];

export const verdicts = [
  'in-tolerance',
  'out-of-tolerance',
  'undecided',
  'not-measured',
  'no-verdict',
] as const;
/** Of a reading or of a row; `no-verdict` is for reference and basic dimensions. */
export const verdict = z.enum(verdicts);
export type Verdict = z.infer<typeof verdict>;

export const weights = ['stops-submission', 'reviewer-decides', 'for-information'] as const;
export const weight = z.enum(weights);
export type Weight = z.infer<typeof weight>;

export const buyingVerdicts = ['may-buy', 'may-buy-within-limits', 'hold'] as const;
export const buyingVerdict = z.enum(buyingVerdicts);
export type BuyingVerdict = z.infer<typeof buyingVerdict>;

export const stations = [
  'request',
  'measurements',
  'evidence',
  'check',
  'warrant',
  'review',
  'disposition',
] as const;
export const station = z.enum(stations);
export type Station = z.infer<typeof station>;
