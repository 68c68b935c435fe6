import { formatDecimal } from '../decimal/decimal.ts';
import { parseLocaleDecimal } from '../decimal/parse-decimal.ts';
import type { DecimalLocale } from '../decimal/parse-decimal.ts';

/** An unsigned number as it stands in a cell, whatever its signs; read by `unsigned`. */
export const NUMBER = String.raw`(?:\d[\d.,'’]{0,40}|[.,]\d{1,40})`;
/** A number with an optional sign directly before it or parted by spaces. */
export const SIGNED = String.raw`[+-]?\s{0,3}${NUMBER}`;

/** The number in plain notation with its decimals and its plus sign dropped, or null when it is none. */
export function plainNumber(text: string, locale: DecimalLocale): string | null {
  const compact = text.replace(/\s/g, '').replace(/’/g, "'").replace(/[.,]$/, '');
  const parsed = parseLocaleDecimal(compact, locale);
  return 'undetermined' in parsed ? null : formatDecimal(parsed);
}

/** Spaces and minus signs in one form each; symbols that only say what the feature is, taken off the front. */
export function tidy(text: string): string {
  return text
    .replace(/[\u00a0\u202f\u2009\t\r\n]/g, ' ')
    .replace(/\u2212/g, '-')
    .replace(/^ +| +$/g, '')
    .replace(/^\d{1,3} ?[x×X] ?(?=\S)/, '')
    .replace(/^(?:S?[Ø⌀ø∅]|SR(?=[ \d])|R(?=[ \d]))\s*/, '');
}
