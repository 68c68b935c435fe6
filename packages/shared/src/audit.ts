import { z } from 'zod';
import { id, instant } from './primitives.ts';
import { page, pageQuery } from './pagination.ts';

export const auditQuery = z.strictObject({
  ...pageQuery,
  q: z.string().trim().max(100).optional(),
  objectType: z.string().max(60).optional(),
  objectId: id.optional(),
});
export const auditEvent = z
  .object({
    /** Gapless within the organisation's own view. */
    number: z.int(),
    at: instant,
    actor: z.string(),
    organisation: z.string(),
    action: z.string(),
    objectType: z.string(),
    objectId: z.string(),
    summary: z.string(),
    before: z.unknown().nullable(),
    after: z.unknown().nullable(),
    hash: z.string(),
  })
  .meta({ id: 'AuditEvent' });
export type AuditEvent = z.infer<typeof auditEvent>;
export const auditResponse = page(auditEvent).meta({ id: 'AuditTrail' });
export const auditVerification = z
  .object({
    rows: z.int(),
    sound: z.boolean(),
    firstBroken: z.int().nullable(),
    reason: z.string().nullable(),
  })
  .meta({ id: 'AuditVerification' });
