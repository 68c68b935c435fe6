import { z } from 'zod';

/** Identifier made by the server. */
export const id = z.uuid();
/** A moment: UTC, milliseconds, Z. */
export const instant = z.iso.datetime({ precision: 3 });
/** A calendar date in the customer's plant: YYYY-MM-DD. */
export const calendarDate = z.iso.date();
/** Raised by one at each change; sent back as `If-Match: "<version>"`. */
export const version = z.int().positive();

/** Control characters and bidirectional overrides never belong in a name. */
const printable = /^[^\p{Cc}‪-‮⁦-⁩]*$/u;

export const shortText = z
  .string()
  .trim()
  .min(1, 'Fill this in.')
  .max(200)
  .regex(printable, 'Remove control characters.');
export const optionalShortText = z.string().trim().max(200).regex(printable, 'Remove control characters.');
/** Several lines: line breaks and tabs are kept, other control characters refused. */
export const longText = z
  .string()
  .trim()
  .max(4000)
  .regex(/^(?:[^\p{Cc}‪-‮⁦-⁩]|[\n\r\t])*$/u, 'Remove control characters.');
export const requiredLongText = longText.min(1, 'Fill this in.');

/**
 * A decimal number as typed: sign, digits, point. The text itself is the value; it is never turned into a binary number.
 * The server's arithmetic reads it exactly.
 */
export const decimalText = z
  .string()
  .trim()
  .max(60)
  .regex(/^[+\-−]?(?:\d+(?:\.\d*)?|\.\d+)$/u, 'Write a decimal number with a point, such as 12.50.');

/** Number of a balloon on the drawing: digits, with a letter or a sub-number where the drawing has one (12, 12a, 12.1). */
export const balloonNumber = z
  .string()
  .trim()
  .regex(
    /^\d{1,4}(?:[a-z]|\.\d{1,3})?$/,
    'A balloon number is digits, with a letter or sub-number: 12, 12a, 12.1.',
  );

export const emailAddress = z
  .email()
  .max(254)
  .transform((address) => address.toLowerCase());

export type Id = z.infer<typeof id>;
