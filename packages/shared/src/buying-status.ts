import { z } from 'zod';
import { calendarDate, id, instant, longText } from './primitives.ts';
import { page, pageQuery } from './pagination.ts';
import { buyingVerdict, packageState } from './status.ts';

export const buyingStatusQuery = z.strictObject({
  ...pageQuery,
  q: z.string().trim().max(100).optional(),
  verdict: buyingVerdict.optional(),
  supplierId: id.optional(),
  sort: z
    .enum([
      'partNumber',
      '-partNumber',
      'supplier',
      '-supplier',
      'until',
      '-until',
      'waitingSince',
      '-waitingSince',
    ])
    .default('partNumber'),
});

/** One part from one supplier. Status only: no measured value, no drawing, no remark. */
export const buyingStatusItem = z
  .object({
    id,
    partNumber: z.string(),
    partName: z.string(),
    supplierName: z.string(),
    supplierId: id,
    verdict: buyingVerdict,
    /** Revision the verdict speaks of; null before any approval. */
    approvedRevision: z.string().nullable(),
    /** Newest released revision of the drawing; differs when a newer one is not approved yet. */
    currentRevision: z.string().nullable(),
    piecesLeft: z.int().nullable(),
    until: calendarDate.nullable(),
    /** What stands in the way or limits, in words. */
    blocker: z.string().nullable(),
    holder: z.string().nullable(),
    dueOn: calendarDate.nullable(),
    waitingDays: z.int().nullable(),
    openPackageState: packageState.nullable(),
    toolingRelease: z.boolean(),
    streamsCovered: z.array(z.string()),
  })
  .meta({ id: 'BuyingStatusItem' });
export type BuyingStatusItem = z.infer<typeof buyingStatusItem>;

export const buyingStatusResponse = z
  .object({
    ...page(buyingStatusItem).shape,
    /** Clock the verdicts were derived at. */
    asOf: instant,
    counts: z.object({ 'may-buy': z.int(), 'may-buy-within-limits': z.int(), hold: z.int() }),
  })
  .meta({ id: 'BuyingStatus' });
export type BuyingStatusResponse = z.infer<typeof buyingStatusResponse>;

export const buyingLineResponse = z
  .object({
    line: buyingStatusItem,
    conditions: z.array(
      z.object({ text: z.string(), owner: z.string(), dueOn: calendarDate, state: z.string() }),
    ),
    deliveries: z.array(
      z.object({ id, quantity: z.int(), note: z.string(), recordedBy: z.string(), recordedAt: instant }),
    ),
    history: z.array(
      z.object({
        at: instant,
        revision: z.string(),
        outcome: z.string(),
        until: calendarDate.nullable(),
        pieceLimit: z.int().nullable(),
        decidedBy: z.string(),
      }),
    ),
    abilities: z.object({ recordDelivery: z.boolean() }),
  })
  .meta({ id: 'BuyingLine' });
export type BuyingLineResponse = z.infer<typeof buyingLineResponse>;

export const recordDeliveryRequest = z
  .strictObject({ quantity: z.int().positive().max(100_000_000), note: longText.default('') })
  .meta({ id: 'RecordDeliveryRequest' });
export const deliveryRecorded = z
  .object({ id, piecesLeft: z.int().nullable() })
  .meta({ id: 'DeliveryRecorded' });
