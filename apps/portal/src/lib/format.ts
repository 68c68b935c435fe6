const minus = '\u2212';

const signs = new Map<string | undefined, '.' | ','>();

/** The decimal sign of the reader's language, found once: a page of beams asks for it some thousand times. */
export function decimalSign(locale?: string): '.' | ',' {
  const known = signs.get(locale);
  if (known !== undefined) return known;
  const part = new Intl.NumberFormat(locale).formatToParts(1.5).find((piece) => piece.type === 'decimal');
  const sign = part?.value === ',' ? ',' : '.';
  signs.set(locale, sign);
  return sign;
}

/** A decimal text as the reader writes it: digits untouched, only the sign of the decimals changes. */
export function showDecimal(text: string, locale?: string): string {
  const shown = decimalSign(locale) === ',' ? text.replace('.', ',') : text;
  return shown.replace(/^-/, minus);
}

/**
 * What was typed, as the decimal text that is kept. A single comma is a decimal sign; a text with both comma and point
 * could mean two numbers and is left as it is, so that the refusal names it.
 */
export function readDecimal(typed: string): string {
  const text = typed.trim().replace(new RegExp(`^${minus}`), '-');
  const commas = text.split(',').length - 1;
  return commas === 1 && !text.includes('.') ? text.replace(',', '.') : text;
}

/** A computed number with a fixed number of decimals; never for measured values, which are shown as typed. */
export function showComputed(value: number, decimals: number, locale?: string): string {
  return showDecimal(value.toFixed(decimals), locale);
}

export function showCount(value: number, locale?: string): string {
  return value.toLocaleString(locale);
}

/** `one` for 1, otherwise `many`, with the number before it. */
export function countOf(value: number, one: string, many: string): string {
  return `${showCount(value)} ${value === 1 ? one : many}`;
}

export function showBytes(bytes: number): string {
  if (bytes < 1000) return `${bytes} B`;
  const units = ['kB', 'MB', 'GB'] as const;
  let value = bytes / 1000;
  let index = 0;
  while (value >= 1000 && index < units.length - 1) {
    value /= 1000;
    index += 1;
  }
  return `${showComputed(value, value < 10 ? 1 : 0)} ${units[index]}`;
}

/** A calendar date belongs to no zone: it is shown as it stands. */
export function showDay(day: string, locale?: string): string {
  return new Intl.DateTimeFormat(locale, { dateStyle: 'medium', timeZone: 'UTC' }).format(
    new Date(`${day}T00:00:00Z`),
  );
}

export function showMoment(instant: string, locale?: string, zone?: string): string {
  const options: Intl.DateTimeFormatOptions = { dateStyle: 'medium', timeStyle: 'short' };
  return new Intl.DateTimeFormat(
    locale,
    zone === undefined ? options : { ...options, timeZone: zone },
  ).format(new Date(instant));
}

export function showMomentWithZone(instant: string, locale?: string, zone?: string): string {
  const chosen = zone ?? Intl.DateTimeFormat().resolvedOptions().timeZone;
  return `${showMoment(instant, locale, chosen)}, ${chosen} (${instant.replace('T', ' ').replace(/\.\d+Z$/, ' UTC')})`;
}

/** Whole days from today to a calendar date, in the reader's calendar; negative when it has passed. */
export function daysUntil(day: string, today = new Date()): number {
  const start = Date.UTC(today.getFullYear(), today.getMonth(), today.getDate());
  return Math.round((Date.parse(`${day}T00:00:00Z`) - start) / 86_400_000);
}

export function showDue(day: string, today = new Date()): string {
  const days = daysUntil(day, today);
  if (days === 0) return 'due today';
  if (days < 0) return `${countOf(-days, 'day', 'days')} overdue`;
  return `in ${countOf(days, 'day', 'days')}`;
}
