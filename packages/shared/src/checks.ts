import { z } from 'zod';
import { id, instant } from './primitives.ts';
import { verdict, weight } from './status.ts';

/** One thing the check found: which rule, where, and what mends it. */
export const finding = z
  .object({
    /** Stable within a check: rule and place. */
    key: z.string(),
    rule: z.string(),
    weight,
    title: z.string(),
    detail: z.string(),
    remedy: z.string(),
    place: z.object({
      kind: z.enum([
        'package',
        'characteristic',
        'reading',
        'element',
        'stream',
        'piece',
        'gauge',
        'warrant',
      ]),
      characteristicId: id.nullable(),
      balloon: z.string().nullable(),
      streamId: id.nullable(),
      stream: z.string().nullable(),
      pieceId: id.nullable(),
      piece: z.string().nullable(),
      elementId: id.nullable(),
    }),
  })
  .meta({ id: 'Finding' });
export type Finding = z.infer<typeof finding>;

/** Judgement on one characteristic in one stream, with what a screen needs to explain it. */
export const checkedRow = z.object({
  characteristicId: id,
  balloon: z.string(),
  streamId: id,
  stream: z.string(),
  verdict,
  n: z.int(),
  required: z.int(),
  minimum: z.string().nullable(),
  maximum: z.string().nullable(),
  mean: z.number().nullable(),
  standardDeviation: z.number().nullable(),
  /** mean ± 3 s; null below two readings or where nothing varies. */
  naturalSpread: z.object({ lower: z.number(), upper: z.number() }).nullable(),
  /** Overall index where n allows; `estimate` only, never a demand met. Null with the reason why. */
  index: z
    .object({ name: z.string(), value: z.number(), lowerBound: z.number().nullable(), n: z.int() })
    .nullable(),
  indexReason: z.string().nullable(),
  outCount: z.int(),
  undecidedCount: z.int(),
  /** Rounding method: raw and rounded text of readings where they differ. */
  rounded: z.array(z.object({ raw: z.string(), rounded: z.string() })),
  reason: z.string().nullable(),
});
export type CheckedRow = z.infer<typeof checkedRow>;

export const checkResponse = z
  .object({
    submissionId: id,
    kind: z.enum(['live', 'official']),
    method: z.string(),
    inputsDigest: z.string(),
    checkedAt: instant,
    verdict,
    counts: z.object({ stops: z.int(), decides: z.int(), informs: z.int() }),
    findings: z.array(finding),
    /** True when findings were cut to keep the answer bounded; the counts are whole. */
    truncated: z.boolean(),
  })
  .meta({ id: 'Check' });
export type CheckResponse = z.infer<typeof checkResponse>;
