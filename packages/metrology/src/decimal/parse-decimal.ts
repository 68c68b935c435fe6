import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import type { Decimal } from './decimal.ts';

/** Longest number read, in digits: far beyond any instrument, and short enough to be harmless. */
export const MAXIMUM_DIGITS = 60;

const PLAIN = /^[+\-\u2212]?(?:\d+(?:\.\d*)?|\.\d+)$/;
const WITH_EXPONENT = /^([+\-\u2212]?(?:\d+(?:\.\d*)?|\.\d+))[eE]([+\-\u2212]?\d{1,3})$/;

/** Options of `parseDecimal`. */
export interface ParseOptions {
  /** Read 1.2e-4 as 0.00012. Off by default: in a readings column an exponent is more often a slip. */
  readonly exponent?: boolean;
}

/** How numbers are written in a file to be imported. */
export interface DecimalLocale {
  readonly decimalSign: '.' | ',';
  /** Sign between groups of three digits, or null when the file has none. A space stands for every kind of space. */
  readonly groupSign?: '.' | ',' | ' ' | "'" | null;
}

function quote(text: string): string {
  const short = text.length > 24 ? `${text.slice(0, 24)}…` : text;
  return `"${short}"`;
}

function tooLong(): Undetermined {
  return undetermined('too-long', `The number has more than ${MAXIMUM_DIGITS} digits: shorten it`);
}

function refuse(text: string): Undetermined {
  const shown = quote(text);
  if (text === '')
    return undetermined('empty', 'Nothing is entered: write digits with a point, such as 12.50');
  if (/^[+\-\u2212]?(?:nan|inf(?:inity)?|∞)$/i.test(text))
    return undetermined('not-finite', `${shown} is not a measured value: enter the reading or leave it out`);
  if (/^[+\-\u2212]?0[xob]/i.test(text))
    return undetermined('not-decimal', `${shown} is not a decimal number: write it with the digits 0 to 9`);
  if (WITH_EXPONENT.test(text))
    return undetermined('exponent', `${shown} has an exponent: write all digits, such as 0.00012`);
  if (/^[+\-\u2212]?[\d.]*,[\d.,]*$/.test(text))
    return undetermined(
      'comma',
      `${shown} has a comma: write the decimal sign as a point and leave groups out`,
    );
  if (/^[+\-\u2212]?\d[\d.]*(?:['_\u2019][\d.]+)+$/.test(text))
    return undetermined('grouping', `${shown} has a sign between groups of digits: leave it out`);
  if (/\d/.test(text) && /^[+\-\u2212]?\s*[\d.]+(?:\s+[\d.]+)*$/.test(text))
    return undetermined(
      'space',
      `${shown} has a space or more than one point inside: write one number without spaces`,
    );
  if (/^[+\-\u2212]?[\d.]+\s*[^\d\s.,]/.test(text))
    return undetermined(
      'not-a-number',
      `${shown} has letters or signs after the number: enter the number alone`,
    );
  return undetermined('not-a-number', `${shown} is not a number: write digits with a point, such as 12.50`);
}

function fromPlain(text: string): Decimal | Undetermined {
  const first = text.charCodeAt(0);
  const negative = first === 0x2d || first === 0x2212;
  const unsigned = negative || first === 0x2b ? text.slice(1) : text;
  const point = unsigned.indexOf('.');
  const scale = point < 0 ? 0 : unsigned.length - point - 1;
  const figures = point < 0 ? unsigned : unsigned.slice(0, point) + unsigned.slice(point + 1);
  if (figures.length > MAXIMUM_DIGITS) return tooLong();
  const digits = BigInt(figures);
  return { digits: negative ? -digits : digits, scale };
}

/**
 * Reads a decimal number exactly as typed.
 *
 * Form: an optional sign (+, - or the minus sign U+2212), digits, at most one point; ".5" and "5." are read.
 * Space around the number is ignored. Refused with a reason that says how to mend it: nothing, NaN and infinity,
 * hexadecimal, an exponent (unless `exponent` is set), a comma, group signs, spaces inside, text, more than
 * 60 digits. Nothing refused is ever read as 0. The sign of zero is not kept: "-0.00" is 0.00.
 */
export function parseDecimal(text: string, options: ParseOptions = {}): Decimal | Undetermined {
  if (text.length > 4 * MAXIMUM_DIGITS) return tooLong();
  const trimmed = text.trim();
  if (PLAIN.test(trimmed)) return fromPlain(trimmed);
  const match = options.exponent ? WITH_EXPONENT.exec(trimmed) : null;
  if (match === null) return refuse(trimmed);
  const mantissa = fromPlain(match[1] ?? '');
  if ('undetermined' in mantissa) return mantissa;
  const shift = Number((match[2] ?? '').replace('\u2212', '-'));
  const scale = mantissa.scale - shift;
  if (Math.abs(shift) > MAXIMUM_DIGITS) return tooLong();
  return scale >= 0
    ? { digits: mantissa.digits, scale }
    : { digits: mantissa.digits * 10n ** BigInt(-scale), scale: 0 };
}

/**
 * Reads a number of an imported file whose decimal and group signs are known, e.g. { decimalSign: ',', groupSign: '.' }.
 *
 * Groups must be whole (1.234.567,5); a group sign in any other place is refused, because 1.23 in such a file is
 * more likely a number in another notation. What the person declares decides; nothing is guessed from the text.
 */
export function parseLocaleDecimal(text: string, locale: DecimalLocale): Decimal | Undetermined {
  const group = locale.groupSign ?? null;
  if (group === locale.decimalSign)
    return undetermined(
      'same-signs',
      'The decimal sign and the group sign are the same: choose two different signs',
    );
  if (text.length > 4 * MAXIMUM_DIGITS) return tooLong();
  let plain = group === ' ' ? text.trim().replace(/[\u00a0\u202f\u2009]/g, ' ') : text.trim();
  const cut = plain.indexOf(locale.decimalSign);
  const whole = cut < 0 ? plain : plain.slice(0, cut);
  const rest = cut < 0 ? '' : plain.slice(cut + 1);
  if (group !== null && whole.includes(group)) {
    const parts = whole.replace(/^[+\-\u2212]/, '').split(group);
    const regular = parts.every((part, index) => (index === 0 ? /^\d{1,3}$/ : /^\d{3}$/).test(part));
    if (!regular)
      return undetermined(
        'grouping',
        `${quote(text)} has a group sign that does not part three digits: check the notation`,
      );
    plain = whole.split(group).join('') + (cut < 0 ? '' : locale.decimalSign + rest);
  }
  if (locale.decimalSign === ',') {
    if (plain.includes('.'))
      return undetermined(
        'wrong-sign',
        `${quote(text)} has a point, but the decimal sign of this file is the comma`,
      );
    plain = plain.replace(',', '.');
  }
  return parseDecimal(plain);
}

/**
 * Number of decimals written in a number: "2.50" has 2, "25" has 0.
 * Undetermined where `parseDecimal` refuses the text.
 */
export function decimalPlaces(text: string): number | Undetermined {
  const parsed = parseDecimal(text);
  return 'undetermined' in parsed ? parsed : parsed.scale;
}
