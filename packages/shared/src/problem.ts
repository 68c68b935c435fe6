import { z } from 'zod';

/** Problem types of RFC 9457; the portal branches on `type` only. The URIs name, they are not fetched. */
const base = 'https://trammel.invalid/problems/';

export const problemTypes = {
  malformed: `${base}malformed`,
  unauthenticated: `${base}unauthenticated`,
  forbidden: `${base}forbidden`,
  notFound: `${base}not-found`,
  methodNotAllowed: `${base}method-not-allowed`,
  conflict: `${base}conflict`,
  stale: `${base}stale-version`,
  versionRequired: `${base}version-required`,
  idempotencyKeyRequired: `${base}idempotency-key-required`,
  inProgress: `${base}in-progress`,
  tooLarge: `${base}too-large`,
  unsupportedMedia: `${base}unsupported-media-type`,
  invalid: `${base}invalid`,
  tooMany: `${base}too-many-requests`,
  unavailable: `${base}unavailable`,
  internal: `${base}internal`,
} as const;

export type ProblemType = (typeof problemTypes)[keyof typeof problemTypes];

export const problem = z
  .object({
    type: z.string(),
    title: z.string(),
    status: z.int(),
    detail: z.string(),
    instance: z.string(),
    /** 422: every refused place, with a JSON pointer into the body, query or file. */
    errors: z.array(z.object({ detail: z.string(), pointer: z.string() })).optional(),
    /** 412: the object as it stands now, so that the person can compare. */
    current: z.unknown().optional(),
    /** 429: seconds to wait. */
    retryAfter: z.int().optional(),
  })
  .meta({ id: 'Problem' });

export type Problem = z.infer<typeof problem>;
