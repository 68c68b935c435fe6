import { z } from 'zod';
import { password } from './accounts.ts';
import { calendarDate, id, instant, longText, requiredLongText, shortText, version } from './primitives.ts';
import { signatureResponse } from './submissions.ts';

export const outcomes = ['approved', 'interim-approval', 'rejected', 'sent-back'] as const;
export const outcome = z.enum(outcomes);
export type Outcome = z.infer<typeof outcome>;

export const reasonCodes = [
  'out-of-tolerance',
  'not-reported',
  'wrong-revision',
  'gauge',
  'stability-or-capability',
  'missing-element',
  'element-content',
  'material',
  'sample-run',
  'other',
] as const;

export const dispositionReason = z.strictObject({
  code: z.enum(reasonCodes),
  characteristicId: id.nullable().default(null),
  elementId: id.nullable().default(null),
  text: requiredLongText,
});
export const interimCondition = z.strictObject({
  text: requiredLongText,
  owner: shortText,
  dueOn: calendarDate,
});

export const dispositionFacts = {
  outcome,
  reasons: z.array(dispositionReason).max(200).default([]),
  conditions: z.array(interimCondition).max(50).default([]),
  /** Interim: last day on which may be bought. */
  endOn: calendarDate.nullable().default(null),
  pieceLimit: z.int().positive().nullable().default(null),
  containment: longText.default(''),
  resubmitBy: calendarDate.nullable().default(null),
  comment: longText.default(''),
};

/** Read before signing: what stands in the way of each outcome, and the digest to send back. */
export const dispositionDraftResponse = z
  .object({
    submissionId: id,
    digest: z.string(),
    blockers: z.object({
      approved: z.array(z.string()),
      'interim-approval': z.array(z.string()),
      rejected: z.array(z.string()),
      'sent-back': z.array(z.string()),
    }),
    counts: z.object({
      rows: z.int(),
      accepted: z.int(),
      refused: z.int(),
      questioned: z.int(),
      unmarked: z.int(),
      safety: z.int(),
    }),
    streamsCovered: z.array(z.string()),
    statement: z.object({
      approved: z.string(),
      'interim-approval': z.string(),
      rejected: z.string(),
      'sent-back': z.string(),
    }),
    caution: z.string().nullable(),
    version,
  })
  .meta({ id: 'DispositionDraft' });
export type DispositionDraftResponse = z.infer<typeof dispositionDraftResponse>;

export const signDispositionRequest = z
  .strictObject({ ...dispositionFacts, password, digest: z.string().regex(/^[0-9a-f]{64}$/) })
  .meta({ id: 'SignDispositionRequest' });
export type SignDispositionRequest = z.input<typeof signDispositionRequest>;

export const conditionResponse = z
  .object({
    id,
    text: z.string(),
    owner: z.string(),
    dueOn: calendarDate,
    state: z.enum(['open', 'evidence-given', 'verified']),
    overdue: z.boolean(),
    evidence: z.string(),
    closedBy: z.string().nullable(),
    closedAt: instant.nullable(),
    version,
  })
  .meta({ id: 'Condition' });
export const changeConditionRequest = z
  .strictObject({ state: z.enum(['open', 'evidence-given', 'verified']), evidence: longText })
  .meta({ id: 'ChangeConditionRequest' });

export const dispositionResponse = z
  .object({
    id,
    submissionId: id,
    outcome,
    reasons: z.array(
      z.object({
        code: z.enum(reasonCodes),
        characteristicId: id.nullable(),
        balloon: z.string().nullable(),
        elementId: id.nullable(),
        element: z.string().nullable(),
        text: z.string(),
      }),
    ),
    conditions: z.array(conditionResponse),
    endOn: calendarDate.nullable(),
    pieceLimit: z.int().nullable(),
    containment: z.string(),
    resubmitBy: calendarDate.nullable(),
    comment: z.string(),
    streamsCovered: z.array(z.string()),
    signature: signatureResponse,
  })
  .meta({ id: 'Disposition' });
export type DispositionResponse = z.infer<typeof dispositionResponse>;
