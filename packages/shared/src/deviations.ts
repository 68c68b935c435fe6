import { z } from 'zod';
import { calendarDate, decimalText, id, instant, longText, requiredLongText, version } from './primitives.ts';

export const deviationStates = ['draft', 'sent', 'granted', 'refused', 'withdrawn'] as const;
export const deviationState = z.enum(deviationStates);

export const deviationFields = {
  characteristicId: id,
  /** Empty: every stream of the package. */
  streamIds: z.array(id).max(64).default([]),
  /** Widest values asked for; null leaves that side as drawn. */
  rangeLower: decimalText.nullable(),
  rangeUpper: decimalText.nullable(),
  cause: requiredLongText,
  risk: longText.default(''),
  containment: requiredLongText,
  correctiveAction: longText.default(''),
  quantity: z.int().positive().nullable(),
  untilOn: calendarDate.nullable(),
};
export const askDeviationRequest = z
  .strictObject(deviationFields)
  .refine((asked) => asked.quantity !== null || asked.untilOn !== null, {
    path: ['quantity'],
    message: 'Give a quantity, an end date, or both.',
  })
  .refine((asked) => asked.rangeLower !== null || asked.rangeUpper !== null, {
    path: ['rangeLower'],
    message: 'Give the lowest or the highest value asked for.',
  })
  .meta({ id: 'AskDeviationRequest' });
export type AskDeviationRequest = z.input<typeof askDeviationRequest>;

export const decideDeviationRequest = z
  .strictObject({ decision: z.enum(['granted', 'refused']), note: requiredLongText })
  .meta({ id: 'DecideDeviationRequest' });

export const deviationResponse = z
  .object({
    id,
    number: z.int(),
    submissionId: id,
    characteristicId: id,
    balloon: z.string(),
    description: z.string(),
    unit: z.string(),
    lowerLimit: z.string().nullable(),
    upperLimit: z.string().nullable(),
    streamIds: z.array(id),
    rangeLower: z.string().nullable(),
    rangeUpper: z.string().nullable(),
    cause: z.string(),
    risk: z.string(),
    containment: z.string(),
    correctiveAction: z.string(),
    quantity: z.int().nullable(),
    untilOn: calendarDate.nullable(),
    state: deviationState,
    /** The range covers every reading of the row that is out. */
    coversReadings: z.boolean(),
    askedBy: z.string(),
    askedAt: instant,
    decidedBy: z.string().nullable(),
    decidedAt: instant.nullable(),
    decisionNote: z.string().nullable(),
    abilities: z.object({ edit: z.boolean(), withdraw: z.boolean(), decide: z.boolean() }),
    version,
  })
  .meta({ id: 'Deviation' });
export type DeviationResponse = z.infer<typeof deviationResponse>;
export const deviationsResponse = z.object({ items: z.array(deviationResponse) }).meta({ id: 'Deviations' });
