import { z } from 'zod';
import {
  calendarDate,
  decimalText,
  id,
  instant,
  longText,
  optionalShortText,
  requiredLongText,
  shortText,
  version,
} from './primitives.ts';
import { page, pageQuery } from './pagination.ts';
import { packageState, requestState } from './status.ts';

export const requestReasons = [
  'initial',
  'engineering-change',
  'tooling',
  'process-or-site-move',
  'sub-supplier-or-material',
  'correction',
  'requalification-after-inactivity',
  'other',
] as const;
export const requestReason = z.enum(requestReasons);
export type RequestReason = z.infer<typeof requestReason>;

export const elementDemands = ['submit', 'keep-at-supplier', 'not-required'] as const;
export const elementDemand = z.enum(elementDemands);
export type ElementDemand = z.infer<typeof elementDemand>;

export const elementCode = z.string().regex(/^[a-z][a-z-]{1,60}$/);
export const requestElement = z.strictObject({ code: elementCode, label: shortText, demand: elementDemand });
export type RequestElement = z.infer<typeof requestElement>;

export const decisionRule = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('simple') }),
  /** Guard band by the expanded uncertainty (k = 2) agreed, as a share of the tolerance or one value with unit. */
  z.strictObject({
    kind: z.literal('guard-band'),
    uncertaintyPercentOfTolerance: decimalText,
    proves: z.enum(['supplier', 'customer']),
  }),
]);
export type DecisionRule = z.infer<typeof decisionRule>;

export const streamKinds = ['cavity', 'spindle', 'die', 'line', 'pattern', 'other'] as const;

export const requestFields = {
  supplierId: id,
  siteId: id,
  revisionId: id,
  reason: requestReason,
  reasonNote: optionalShortText.default(''),
  level: z.int().min(1).max(5),
  elements: z.array(requestElement).max(60),
  streamKind: z.enum(streamKinds).default('other'),
  streams: z.array(shortText.max(60)).min(1, 'Name at least one stream.').max(64),
  piecesPerStream: z.int().min(1).max(300),
  decisionRule,
  dueOn: calendarDate,
  purchaseOrder: optionalShortText.default(''),
  message: longText.default(''),
  reviewerIds: z.array(id).min(1, 'Name at least one reviewer.').max(20),
};
export const saveRequestRequest = z.strictObject(requestFields).meta({ id: 'SaveRequestRequest' });
export type SaveRequestRequest = z.input<typeof saveRequestRequest>;

export const withdrawRequestRequest = z
  .strictObject({ reason: requiredLongText })
  .meta({ id: 'WithdrawRequestRequest' });

export const requestResponse = z
  .object({
    id,
    number: z.int(),
    state: requestState,
    /** On which side of the request the reader stands. */
    side: z.enum(['customer', 'supplier']),
    customer: z.object({ id, name: z.string() }),
    supplier: z.object({ id, name: z.string() }),
    site: z.object({ id, name: z.string() }),
    part: z.object({ id, number: z.string(), name: z.string(), safetyOrRegulatory: z.boolean() }),
    revision: z.object({ id, code: z.string(), superseded: z.boolean() }),
    reason: requestReason,
    reasonNote: z.string(),
    level: z.int(),
    elements: z.array(z.object({ code: z.string(), label: z.string(), demand: elementDemand })),
    streamKind: z.enum(streamKinds),
    streams: z.array(z.string()),
    piecesPerStream: z.int(),
    decisionRule,
    dueOn: calendarDate,
    purchaseOrder: z.string(),
    message: z.string(),
    reviewers: z.array(z.object({ id, name: z.string() })),
    issuedAt: instant.nullable(),
    acknowledgedAt: instant.nullable(),
    acknowledgedBy: z.string().nullable(),
    questionOpen: z.boolean(),
    withdrawnReason: z.string().nullable(),
    rounds: z.array(z.object({ id, round: z.int(), state: packageState })),
    abilities: z.object({
      edit: z.boolean(),
      issue: z.boolean(),
      withdraw: z.boolean(),
      acknowledge: z.boolean(),
      write: z.boolean(),
      resubmit: z.boolean(),
    }),
    version,
  })
  .meta({ id: 'Request' });
export type RequestResponse = z.infer<typeof requestResponse>;

export const requestListQuery = z.strictObject({
  ...pageQuery,
  q: z.string().trim().max(100).optional(),
  state: requestState.optional(),
  sort: z.enum(['dueOn', '-dueOn', '-createdAt', 'createdAt']).default('-createdAt'),
});
export const requestListItem = z
  .object({
    id,
    number: z.int(),
    state: requestState,
    packageState: packageState.nullable(),
    /** Newest round; null before the request is issued. */
    submissionId: id.nullable(),
    side: z.enum(['customer', 'supplier']),
    partNumber: z.string(),
    partName: z.string(),
    revision: z.string(),
    customerName: z.string(),
    supplierName: z.string(),
    dueOn: calendarDate,
    questionOpen: z.boolean(),
    createdAt: instant,
  })
  .meta({ id: 'RequestListItem' });
export type RequestListItem = z.infer<typeof requestListItem>;
export const requestListResponse = page(requestListItem).meta({ id: 'RequestList' });

export const requestMessage = z
  .object({
    id,
    kind: z.enum(['question', 'answer', 'note']),
    text: z.string(),
    author: z.string(),
    organisation: z.string(),
    own: z.boolean(),
    writtenAt: instant,
  })
  .meta({ id: 'RequestMessage' });
export const requestThreadResponse = z
  .object({ items: z.array(requestMessage) })
  .meta({ id: 'RequestThread' });
export type RequestThreadResponse = z.infer<typeof requestThreadResponse>;
export type RequestMessageItem = z.infer<typeof requestMessage>;
export const writeMessageRequest = z
  .strictObject({ kind: z.enum(['question', 'answer', 'note']), text: requiredLongText })
  .meta({ id: 'WriteMessageRequest' });
export type WriteMessageRequest = z.input<typeof writeMessageRequest>;

/** Element list that a submission level implies; the customer may edit it. */
export const elementTemplateResponse = z
  .object({
    /** Where the list was read. */
    source: z.string(),
    levels: z.array(
      z.object({
        level: z.int(),
        elements: z.array(z.object({ code: z.string(), label: z.string(), demand: elementDemand })),
      }),
    ),
  })
  .meta({ id: 'ElementTemplate' });
export type ElementTemplateResponse = z.infer<typeof elementTemplateResponse>;
