import { z } from 'zod';
import { checkedRow, finding } from './checks.ts';
import { deviationResponse } from './deviations.ts';
import { sheetCharacteristic, rowResult, pieceResponse, streamResponse } from './measurements.ts';
import { id, instant, longText } from './primitives.ts';
import { verdict } from './status.ts';
import { elementMarks } from './submissions.ts';

export const rowMarks = ['accepted', 'refused', 'questioned'] as const;
export const rowMark = z.enum(rowMarks);
export type RowMark = z.infer<typeof rowMark>;

export const characteristicDecision = z.object({
  mark: rowMark.nullable(),
  /** Goes to the supplier. */
  remark: z.string(),
  /** Stays with the customer; absent in every answer to a supplier. */
  internalRemark: z.string().optional(),
  deviationId: id.nullable(),
  by: z.string().nullable(),
  at: instant.nullable(),
  /** Zero before the first mark. */
  version: z.int().min(0),
});
export type CharacteristicDecision = z.infer<typeof characteristicDecision>;

/** One characteristic over all its streams, as the reviewer reads it. */
export const reviewRow = z.object({
  characteristic: sheetCharacteristic,
  verdict,
  checked: z.array(checkedRow),
  results: z.array(rowResult),
  findings: z.array(finding),
  deviations: z.array(deviationResponse),
  decision: characteristicDecision,
  /** Clean: in tolerance everywhere, not special, no finding for the reviewer; may be accepted in bulk. */
  clean: z.boolean(),
  /** Since the round before: new, changed readings, changed limits, or unchanged. Null in round 1. */
  change: z.enum(['new', 'readings', 'limits', 'same']).nullable(),
});
export type ReviewRow = z.infer<typeof reviewRow>;

export const reviewQuery = z.strictObject({
  /** attention: failing, undecided, special first; balloon: drawing order. */
  order: z.enum(['attention', 'balloon']).default('attention'),
  show: z
    .enum(['all', 'open', 'out', 'undecided', 'special', 'refused', 'questioned', 'changed'])
    .default('all'),
  offset: z.coerce.number().int().min(0).max(100_000).default(0),
  limit: z.coerce.number().int().min(1).max(200).default(100),
});
export const reviewResponse = z
  .object({
    streams: z.array(streamResponse),
    pieces: z.array(pieceResponse),
    rows: z.array(reviewRow),
    total: z.int(),
    counts: z.object({
      all: z.int(),
      open: z.int(),
      out: z.int(),
      undecided: z.int(),
      special: z.int(),
      refused: z.int(),
      questioned: z.int(),
      changed: z.int(),
      clean: z.int(),
    }),
    packageFindings: z.array(finding),
  })
  .meta({ id: 'Review' });
export type ReviewResponse = z.infer<typeof reviewResponse>;

export const decideCharacteristicRequest = z
  .strictObject({
    mark: rowMark.nullable(),
    remark: longText,
    internalRemark: longText,
    deviationId: id.nullable(),
  })
  .refine(
    (asked) => (asked.mark !== 'refused' && asked.mark !== 'questioned' ? true : asked.remark.length > 0),
    {
      path: ['remark'],
      message: 'Say to the supplier what is wrong or what is asked.',
    },
  )
  .meta({ id: 'DecideCharacteristicRequest' });
export type DecideCharacteristicRequest = z.input<typeof decideCharacteristicRequest>;

/** Accepts clean rows only; every id that is not clean is refused by name, and nothing is written. */
export const acceptCleanRowsRequest = z
  .strictObject({ characteristicIds: z.array(id).min(1).max(5000) })
  .meta({ id: 'AcceptCleanRowsRequest' });
export const decisionsResponse = z
  .object({
    decisions: z.array(z.object({ characteristicId: id, decision: characteristicDecision })),
    remaining: z.int(),
  })
  .meta({ id: 'Decisions' });
export type DecisionsResponse = z.infer<typeof decisionsResponse>;

export const decideElementRequest = z
  .strictObject({ mark: z.enum(elementMarks).nullable(), remark: longText, internalRemark: longText })
  .meta({ id: 'DecideElementRequest' });
export type DecideElementRequest = z.input<typeof decideElementRequest>;

export const elementDecisionResponse = z
  .object({
    elementId: id,
    mark: z.enum(elementMarks).nullable(),
    remark: z.string(),
    internalRemark: z.string(),
    by: z.string(),
    at: instant,
    markVersion: z.int(),
  })
  .meta({ id: 'ElementDecision' });
export type ElementDecisionResponse = z.infer<typeof elementDecisionResponse>;
