import { z } from 'zod';
import { fileResponse } from './documents.ts';
import { calendarDate, id, instant, longText, optionalShortText, shortText, version } from './primitives.ts';
import { page, pageQuery } from './pagination.ts';

export const revisionStates = ['draft', 'released', 'superseded'] as const;
export const revisionState = z.enum(revisionStates);

/** How a reading is compared with a limit: as it stands, or first rounded to the limit's decimals (ASTM E29 rounding method). */
export const roundingRules = ['absolute', 'astm-e29'] as const;
export const roundingRule = z.enum(roundingRules);

export const createPartRequest = z
  .strictObject({
    number: shortText,
    name: shortText,
    material: optionalShortText.default(''),
    commodity: optionalShortText.default(''),
    unitSystem: z.enum(['metric', 'inch']).default('metric'),
    safetyOrRegulatory: z.boolean().default(false),
    firstRevision: shortText.max(20),
  })
  .meta({ id: 'CreatePartRequest' });
export type CreatePartRequest = z.input<typeof createPartRequest>;

export const changePartRequest = createPartRequest
  .omit({ firstRevision: true })
  .meta({ id: 'ChangePartRequest' });
export type ChangePartRequest = z.input<typeof changePartRequest>;

export const revisionSummary = z
  .object({
    id,
    code: z.string(),
    state: revisionState,
    releasedAt: instant.nullable(),
    characteristicCount: z.int(),
    hasDrawing: z.boolean(),
  })
  .meta({ id: 'RevisionSummary' });
export type RevisionSummary = z.infer<typeof revisionSummary>;

export const partResponse = z
  .object({
    id,
    number: z.string(),
    name: z.string(),
    material: z.string(),
    commodity: z.string(),
    unitSystem: z.enum(['metric', 'inch']),
    safetyOrRegulatory: z.boolean(),
    revisions: z.array(revisionSummary),
    version,
  })
  .meta({ id: 'Part' });
export type PartResponse = z.infer<typeof partResponse>;

export const partListQuery = z.strictObject({
  ...pageQuery,
  q: z.string().trim().max(100).optional(),
  sort: z.enum(['number', '-number', 'name', '-name', '-createdAt', 'createdAt']).default('number'),
});
export const partListItem = z
  .object({
    id,
    number: z.string(),
    name: z.string(),
    safetyOrRegulatory: z.boolean(),
    currentRevision: z.string().nullable(),
    draftRevision: z.string().nullable(),
    openPackages: z.int(),
    createdAt: instant,
  })
  .meta({ id: 'PartListItem' });
export type PartListItem = z.infer<typeof partListItem>;
export const partListResponse = page(partListItem).meta({ id: 'PartList' });

export const createRevisionRequest = z
  .strictObject({ code: shortText.max(20), copyFromRevisionId: id.nullable().default(null) })
  .meta({ id: 'CreateRevisionRequest' });
export type CreateRevisionRequest = z.input<typeof createRevisionRequest>;

export const changeRevisionRequest = z
  .strictObject({
    code: shortText.max(20),
    drawingFileId: id.nullable(),
    drawingDate: calendarDate.nullable(),
    changeOrder: optionalShortText,
    tolerancingStandard: z.enum(['iso', 'asme']),
    roundingRule,
    generalTolerance: optionalShortText,
    note: longText,
  })
  .meta({ id: 'ChangeRevisionRequest' });
export type ChangeRevisionRequest = z.input<typeof changeRevisionRequest>;

export const revisionResponse = z
  .object({
    id,
    partId: id,
    partNumber: z.string(),
    partName: z.string(),
    code: z.string(),
    state: revisionState,
    drawing: fileResponse.nullable(),
    drawingDate: calendarDate.nullable(),
    changeOrder: z.string(),
    tolerancingStandard: z.enum(['iso', 'asme']),
    roundingRule,
    generalTolerance: z.string(),
    note: z.string(),
    copiedFrom: z.object({ id, code: z.string() }).nullable(),
    releasedAt: instant.nullable(),
    releasedBy: z.string().nullable(),
    characteristicCount: z.int(),
    /** Why the revision cannot be released yet; empty when it can. */
    releaseBlockers: z.array(z.string()),
    abilities: z.object({ edit: z.boolean(), release: z.boolean() }),
    version,
  })
  .meta({ id: 'Revision' });
export type RevisionResponse = z.infer<typeof revisionResponse>;
