import { z } from 'zod';
import { fileResponse } from './documents.ts';
import { pieceResponse, streamResponse } from './measurements.ts';
import { calendarDate, id, instant, longText, optionalShortText, shortText, version } from './primitives.ts';
import { page, pageQuery } from './pagination.ts';
import { decisionRule, elementDemand, requestReason, streamKinds } from './requests.ts';
import { packageState, station } from './status.ts';

/** A signature as it is shown and printed. */
export const signatureResponse = z
  .object({
    name: z.string(),
    role: z.string(),
    organisation: z.string(),
    meaning: z.string(),
    signedAt: instant,
    digest: z.string(),
    keyId: z.string(),
  })
  .meta({ id: 'Signature' });
export type SignatureResponse = z.infer<typeof signatureResponse>;

export const findingCounts = z.object({ stops: z.int(), decides: z.int(), informs: z.int() });

export const routeCardRound = z.object({
  submissionId: id,
  round: z.int(),
  state: packageState,
  stations: z.array(
    z.object({
      station,
      state: z.enum(['done', 'in-hand', 'ahead', 'skipped']),
      who: z.string().nullable(),
      at: instant.nullable(),
      note: z.string().nullable(),
    }),
  ),
});
export type RouteCardRound = z.infer<typeof routeCardRound>;

export const submissionResponse = z
  .object({
    id,
    requestId: id,
    requestNumber: z.int(),
    round: z.int(),
    state: packageState,
    side: z.enum(['customer', 'supplier']),
    customer: z.object({ id, name: z.string() }),
    supplier: z.object({ id, name: z.string() }),
    site: z.string(),
    part: z.object({
      number: z.string(),
      name: z.string(),
      material: z.string(),
      safetyOrRegulatory: z.boolean(),
    }),
    revision: z.object({ id, code: z.string(), superseded: z.boolean(), drawing: fileResponse.nullable() }),
    reason: requestReason,
    level: z.int(),
    unitSystem: z.enum(['metric', 'inch']),
    dueOn: calendarDate,
    decisionRule,
    roundingRule: z.enum(['absolute', 'astm-e29']),
    streamKind: z.enum(streamKinds),
    piecesPerStream: z.int(),
    routeCard: z.array(routeCardRound),
    findings: findingCounts,
    counts: z.object({
      characteristics: z.int(),
      rows: z.int(),
      out: z.int(),
      undecided: z.int(),
      unmeasured: z.int(),
      special: z.int(),
      marked: z.int(),
    }),
    submittedAt: instant.nullable(),
    decidedAt: instant.nullable(),
    warrantSignature: signatureResponse.nullable(),
    dispositionSignature: signatureResponse.nullable(),
    abilities: z.object({
      acknowledge: z.boolean(),
      measure: z.boolean(),
      askDeviation: z.boolean(),
      sign: z.boolean(),
      review: z.boolean(),
      dispose: z.boolean(),
      resubmit: z.boolean(),
      decideDeviation: z.boolean(),
    }),
    version,
  })
  .meta({ id: 'Submission' });
export type SubmissionResponse = z.infer<typeof submissionResponse>;

/** The supplier's desk. */
export const worklistQuery = z.strictObject({
  ...pageQuery,
  q: z.string().trim().max(100).optional(),
  state: packageState.optional(),
  show: z.enum(['open', 'all']).default('open'),
  sort: z.enum(['dueOn', '-dueOn', 'partNumber', '-partNumber', '-updatedAt']).default('dueOn'),
});
export const worklistItem = z
  .object({
    id,
    requestId: id,
    requestNumber: z.int(),
    round: z.int(),
    state: packageState,
    customerName: z.string(),
    partNumber: z.string(),
    partName: z.string(),
    revision: z.string(),
    dueOn: calendarDate,
    findings: findingCounts,
    measured: z.object({ done: z.int(), of: z.int() }),
    questionOpen: z.boolean(),
    /** The next thing to do, in words; null when it lies with the customer. */
    nextStep: z.string().nullable(),
    holder: z.string(),
    updatedAt: instant,
  })
  .meta({ id: 'WorklistItem' });
export type WorklistItem = z.infer<typeof worklistItem>;
export const worklistResponse = page(worklistItem).meta({ id: 'Worklist' });

/** The reviewer's desk. */
export const reviewDeskQuery = z.strictObject({
  ...pageQuery,
  q: z.string().trim().max(100).optional(),
  state: packageState.optional(),
  show: z.enum(['waiting', 'all']).default('waiting'),
  supplierId: id.optional(),
  sort: z
    .enum(['submittedAt', '-submittedAt', 'dueOn', '-dueOn', 'partNumber', '-partNumber'])
    .default('submittedAt'),
});
export const reviewDeskItem = z
  .object({
    id,
    requestId: id,
    requestNumber: z.int(),
    round: z.int(),
    state: packageState,
    supplierName: z.string(),
    partNumber: z.string(),
    partName: z.string(),
    revision: z.string(),
    dueOn: calendarDate,
    submittedAt: instant.nullable(),
    waitingDays: z.int(),
    out: z.int(),
    undecided: z.int(),
    special: z.int(),
    deviationsOpen: z.int(),
    reviewers: z.array(z.string()),
    questionOpen: z.boolean(),
  })
  .meta({ id: 'ReviewDeskItem' });
export type ReviewDeskItem = z.infer<typeof reviewDeskItem>;
export const reviewDeskResponse = page(reviewDeskItem).meta({ id: 'ReviewDesk' });

export const elementStates = ['open', 'submitted', 'kept-at-supplier', 'not-applicable'] as const;
export const elementState = z.enum(elementStates);
export const elementMarks = ['accepted', 'refused', 'questioned'] as const;

export const elementResponse = z
  .object({
    id,
    code: z.string(),
    label: z.string(),
    demand: elementDemand,
    state: elementState,
    /** Filled from other data of the package, such as the dimensional results; needs no file. */
    derived: z.boolean(),
    reason: z.string(),
    statedPart: z.string(),
    statedRevision: z.string(),
    dated: calendarDate.nullable(),
    note: z.string(),
    files: z.array(fileResponse),
    mark: z
      .object({
        mark: z.enum(elementMarks),
        remark: z.string(),
        internalRemark: z.string().optional(),
        by: z.string(),
        at: instant,
      })
      .nullable(),
    markVersion: z.int(),
    version,
  })
  .meta({ id: 'Element' });
export type ElementResponse = z.infer<typeof elementResponse>;
export const elementsResponse = z.object({ items: z.array(elementResponse) }).meta({ id: 'Elements' });

export const changeElementRequest = z
  .strictObject({
    state: elementState,
    reason: longText,
    statedPart: optionalShortText,
    statedRevision: optionalShortText,
    dated: calendarDate.nullable(),
    note: longText,
  })
  .meta({ id: 'ChangeElementRequest' });
export type ChangeElementRequest = z.input<typeof changeElementRequest>;
export const attachFileRequest = z.strictObject({ fileId: id }).meta({ id: 'AttachFileRequest' });

export const blockStreamRequest = z
  .strictObject({ blocked: z.boolean(), reason: longText })
  .meta({ id: 'BlockStreamRequest' });

export const pieceFields = {
  label: shortText.max(60),
  streamId: id,
  madeOn: calendarDate.nullable().default(null),
  lot: optionalShortText.default(''),
};
export const addPiecesRequest = z
  .strictObject({ pieces: z.array(z.strictObject(pieceFields)).min(1).max(1000) })
  .meta({ id: 'AddPiecesRequest' });
export const changePieceRequest = z.strictObject(pieceFields).meta({ id: 'ChangePieceRequest' });
export type ChangePieceRequest = z.input<typeof changePieceRequest>;
/** A piece that bears readings is removed only when the person has said so. */
export const removePieceQuery = z.strictObject({ confirm: z.literal('readings').optional() });
/** Streams and sample pieces of a round, without characteristics and readings. */
export const submissionPiecesResponse = z
  .object({ streams: z.array(streamResponse), pieces: z.array(pieceResponse), editable: z.boolean() })
  .meta({ id: 'SubmissionPieces' });
export type SubmissionPiecesResponse = z.infer<typeof submissionPiecesResponse>;
