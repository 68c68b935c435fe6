import { compareDecimals, decimalOf, formatDecimal } from '../decimal/decimal.ts';
import { parseDecimal } from '../decimal/parse-decimal.ts';
import type { DecimalLocale } from '../decimal/parse-decimal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { NUMBER, SIGNED, plainNumber, tidy } from './number-pattern.ts';
import type { StatedTolerance } from './stated-tolerance.ts';

/** What stands in the cells of a nominal and a tolerance column; either may be empty. */
export interface ToleranceText {
  readonly nominal: string;
  readonly tolerance: string;
  /** How the numbers are written. */
  readonly locale?: DecimalLocale;
  /** A geometric tolerance is stated by the bare width of its zone; on a size a bare number is ambiguous. */
  readonly geometric?: boolean;
}

export interface ReadTolerance {
  readonly stated: StatedTolerance;
  /** Unit written behind the numbers, as written; null where there is none. */
  readonly unit: string | null;
  /** Brackets and words that make the dimension basic [25] or reference (25). */
  readonly hint: 'basic' | 'reference' | null;
}

const POINT: DecimalLocale = { decimalSign: '.' };
const UNIT =
  /\s*(mm|µm|um|μm|inch|in|mil|deg|°|arcmin|arcsec|kN|Nm|N·m|N|kg|g|MPa|N\/mm²|bar|HRC|HRB|HV|HBW|ml\/min|%|ΔE|dE)$/u;

interface Work {
  readonly nominal: string | null;
  readonly text: string;
  readonly locale: DecimalLocale;
  readonly geometric: boolean;
}
type Reader = (work: Work) => StatedTolerance | Undetermined | null;

const pattern = (source: string): RegExp => new RegExp(`^(?:${source})$`, 'iu');

function needsNominal(): Undetermined {
  return undetermined(
    'no-nominal',
    'The tolerance is given without its nominal: write the nominal beside it',
  );
}

const SYMMETRIC = pattern(String.raw`(${NUMBER})?\s*(?:±|\+\s?/\s?-|\+-)\s*(${NUMBER})`);
const symmetric: Reader = ({ nominal, text, locale }) => {
  const match = SYMMETRIC.exec(text);
  if (!match) return null;
  const own = match[1] === undefined ? nominal : plainNumber(match[1], locale);
  const tolerance = plainNumber(match[2] ?? '', locale);
  if (own === null) return needsNominal();
  return tolerance === null ? null : { form: 'symmetric', nominal: own, tolerance };
};

const DEVIATIONS = pattern(
  String.raw`(?:(${NUMBER})(?=\s*[+-])\s*)?([+-]\s?${NUMBER}|0(?:[.,]0+)?)\s*[/;]?\s*([+-]\s?${NUMBER}|0(?:[.,]0+)?)`,
);
const deviations: Reader = ({ nominal, text, locale }) => {
  const match = DEVIATIONS.exec(text);
  if (!match) return null;
  const own = match[1] === undefined ? nominal : plainNumber(match[1], locale);
  const one = plainNumber(match[2] ?? '', locale);
  const two = plainNumber(match[3] ?? '', locale);
  if (one === null || two === null) return null;
  if (own === null) return needsNominal();
  const first = parseDecimal(one);
  const second = parseDecimal(two);
  if ('undetermined' in first || 'undetermined' in second) return null;
  const ordered = compareDecimals(first, second) >= 0;
  return { form: 'deviations', nominal: own, upper: ordered ? one : two, lower: ordered ? two : one };
};

const FIT = /^(?:([\d.,]+)\s*)?([A-Za-z]{1,2}\d{1,2})$/;
const fit: Reader = ({ nominal, text, locale }) => {
  const match = FIT.exec(text);
  if (!match) return null;
  const own = match[1] === undefined ? nominal : plainNumber(match[1], locale);
  return own === null ? needsNominal() : { form: 'fit', nominal: own, fitClass: match[2] ?? '' };
};

const MAXIMUM = pattern(
  String.raw`(?:max(?:imum|\.)?|≤|<=|höchstens)\s*:?\s*(${SIGNED})(,? zero bound)?|(${SIGNED})\s*max(?:imum|\.)?`,
);
const maximum: Reader = ({ text, locale, geometric }) => {
  const match = MAXIMUM.exec(text);
  const upper = match && plainNumber(match[1] ?? match[3] ?? '', locale);
  return upper ? { form: 'max', upper, zeroBound: geometric || match[2] !== undefined } : null;
};

const MINIMUM = pattern(
  String.raw`(?:min(?:imum|\.)?|≥|>=|mind(?:estens|\.))\s*:?\s*(${SIGNED})|(${SIGNED})\s*min(?:imum|\.)?`,
);
const minimum: Reader = ({ text, locale }) => {
  const match = MINIMUM.exec(text);
  const lower = match && plainNumber(match[1] ?? match[2] ?? '', locale);
  return lower ? { form: 'min', lower } : null;
};

const STRICT = /^[<>]\s*[\d.,]/;
const strict: Reader = ({ text }) =>
  STRICT.test(text)
    ? undetermined(
        'strict-limit',
        `"${text.slice(0, 24)}" leaves the limit itself out: write ≤ or ≥ if a value on the limit conforms`,
      )
    : null;

const LIMITS = pattern(
  String.raw`(${SIGNED})\s*(?:\.\.\.?|…|–|—|\bto\b|\bbis\b|\s-\s|(?<=\d)-(?=\d)|(?<=\d)\s?/\s?(?=\d))\s*(${SIGNED})`,
);
const limits: Reader = ({ nominal, text, locale }) => {
  const match = LIMITS.exec(text);
  if (!match) return null;
  const one = plainNumber((match[1] ?? '').replace(/\.+$/, ''), locale);
  const two = plainNumber(match[2] ?? '', locale);
  if (one === null || two === null) return null;
  const first = parseDecimal(one);
  const second = parseDecimal(two);
  if ('undetermined' in first || 'undetermined' in second) return null;
  const ordered = compareDecimals(first, second) <= 0;
  return { form: 'limits', lower: ordered ? one : two, upper: ordered ? two : one, nominal };
};

const GENERAL =
  /^(?:(?:DIN )?(?:EN )?(?:ISO )?2768\s?-?\s?)?([fmcv])[HKL]?(?: (radius|angular)(?: leg ([\d.,]+))?)?$/i;
const general: Reader = ({ nominal, text, locale }) => {
  const match = GENERAL.exec(text);
  if (!match) return null;
  if (nominal === null) return needsNominal();
  const generalClass = (match[1] ?? 'm').toLowerCase() as 'f' | 'm' | 'c' | 'v';
  const word = match[2]?.toLowerCase();
  const feature = word === 'radius' ? 'radius-chamfer' : word === 'angular' ? 'angular' : 'linear';
  const shorterLeg = match[3] === undefined ? null : plainNumber(match[3], locale);
  return { form: 'general', nominal, generalClass, feature, ...(shorterLeg === null ? {} : { shorterLeg }) };
};

const TOTAL = pattern(String.raw`(${NUMBER})\s*(?:total|gesamt)`);
const total: Reader = ({ nominal, text, locale }) => {
  const match = TOTAL.exec(text);
  const width = match && plainNumber(match[1] ?? '', locale);
  if (!width) return null;
  if (nominal === null) return needsNominal();
  const parsed = parseDecimal(width);
  if ('undetermined' in parsed) return parsed;
  const even = parsed.digits % 2n === 0n;
  const half = even
    ? decimalOf(parsed.digits / 2n, parsed.scale)
    : decimalOf(parsed.digits * 5n, parsed.scale + 1);
  return { form: 'symmetric', nominal, tolerance: formatDecimal(half) };
};

const bare: Reader = ({ text, locale, geometric }) => {
  const number = plainNumber(text, locale);
  if (number === null) return null;
  if (geometric) return { form: 'max', upper: number, zeroBound: true };
  return undetermined(
    'bare-tolerance',
    `"${text.slice(0, 24)}" does not say on which side it lies: write ±${text} or ${text} total, or limits`,
  );
};

const readers: readonly Reader[] = [
  symmetric,
  deviations,
  strict,
  maximum,
  minimum,
  total,
  limits,
  fit,
  general,
  bare,
];

/**
 * Reads a tolerance as people write it in a table: "±0.1", "+0.2/-0.1", "12.5 +0.1 -0.0", "25 H7", "min 3", "≤ 0.8",
 * "9.95…10.05", "2 total", "ISO 2768-m", and for a geometric tolerance the bare width of its zone.
 *
 * `nominal` may hold the whole requirement ("25 ±0.1", "[25]", "(27)"); a tolerance that needs a nominal and has none
 * is undetermined, and so is a bare number on a size, which could mean ± or the total. "2 total" is ± its half,
 * exactly. A leading count ("4x") and the signs Ø, SØ, R, SR are passed over; a unit behind the number is returned.
 * Common practice; the signs are those of ISO 129-1 and ASME Y14.5. Every number keeps its decimals.
 */
export function readTolerance(given: ToleranceText): ReadTolerance | Undetermined {
  const locale = given.locale ?? POINT;
  if (given.nominal.length > 200 || given.tolerance.length > 200)
    return undetermined(
      'too-long',
      'The requirement has more than 200 characters: put the number alone into this column',
    );
  const nominalCell = withoutUnit(tidy(given.nominal));
  const toleranceCell = withoutUnit(tidy(given.tolerance));
  const unit = toleranceCell.unit ?? nominalCell.unit;
  const framed = /^(?:\[(.+)\]|\((.+)\))$/.exec(nominalCell.text);
  const hint = framed ? (framed[1] === undefined ? 'reference' : 'basic') : null;
  const nominalText = framed ? tidy(framed[1] ?? framed[2] ?? '') : nominalCell.text;
  const nominal = nominalText === '' ? null : plainNumber(nominalText, locale);
  const alone = toleranceCell.text === '' || toleranceCell.text === '-' || toleranceCell.text === '–';
  if (alone && (nominal !== null || nominalText === ''))
    return { stated: { form: 'none', nominal }, unit, hint };
  if (!alone && nominal === null && nominalText !== '') {
    return undetermined(
      'nominal-unreadable',
      `The nominal "${nominalText.slice(0, 24)}" is not a number: write digits alone`,
    );
  }
  const work: Work = {
    nominal,
    text: alone ? nominalText : toleranceCell.text,
    locale,
    geometric: given.geometric ?? false,
  };
  for (const read of readers) {
    const stated = read(work);
    if (stated === null) continue;
    return 'undetermined' in stated ? stated : { stated, unit, hint };
  }
  return undetermined(
    'tolerance-unreadable',
    `"${work.text.slice(0, 24)}" is not a tolerance: write it like ±0.1, +0.2/-0.1, 9.9…10.1, H7, max 0.8 or min 3`,
  );
}

function withoutUnit(text: string): { text: string; unit: string | null } {
  const match = /\d/.test(text) ? UNIT.exec(text) : null;
  return match ? { text: text.slice(0, match.index).trim(), unit: match[1] ?? null } : { text, unit: null };
}
