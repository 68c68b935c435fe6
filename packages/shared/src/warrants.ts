import { z } from 'zod';
import { password } from './accounts.ts';
import { calendarDate, decimalText, id, longText, optionalShortText, version } from './primitives.ts';
import { findingCounts, signatureResponse } from './submissions.ts';

/** Facts the supplier states on the warrant; empty is allowed while it is a draft. */
export const warrantFacts = z.strictObject({
  runOn: calendarDate.nullable(),
  runHours: decimalText.nullable(),
  runQuantity: z.int().positive().nullable(),
  partMassKg: decimalText.nullable(),
  productionTool: optionalShortText,
  materialReport: optionalShortText,
  exceptions: longText,
  comment: longText,
});
export type WarrantFacts = z.infer<typeof warrantFacts>;
export const saveWarrantRequest = warrantFacts.meta({ id: 'SaveWarrantRequest' });

export const warrantResponse = z
  .object({
    submissionId: id,
    facts: warrantFacts,
    /** Declaration the signatory makes, as one text. */
    declaration: z.string(),
    streamsCovered: z.array(z.string()),
    streamsBlocked: z.array(z.object({ name: z.string(), reason: z.string() })),
    counts: z.object({
      characteristics: z.int(),
      inTolerance: z.int(),
      out: z.int(),
      undecided: z.int(),
      deviations: z.int(),
      elements: z.int(),
      files: z.int(),
      safety: z.int(),
    }),
    findings: findingCounts,
    /** Digest of the package as it stands: send it back with the signature. */
    digest: z.string(),
    caution: z.string().nullable(),
    signature: signatureResponse.nullable(),
    abilities: z.object({ edit: z.boolean(), sign: z.boolean() }),
    /** Why it cannot be signed now. */
    blockers: z.array(z.string()),
    version,
  })
  .meta({ id: 'Warrant' });
export type WarrantResponse = z.infer<typeof warrantResponse>;

export const signWarrantRequest = z
  .strictObject({ password, digest: z.string().regex(/^[0-9a-f]{64}$/) })
  .meta({ id: 'SignWarrantRequest' });
export type SignWarrantRequest = z.input<typeof signWarrantRequest>;
