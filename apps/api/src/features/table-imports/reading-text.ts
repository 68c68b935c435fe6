import { isUndetermined } from '@trammel/metrology/conformance';
import { formatDecimal, parseLocaleDecimal, type DecimalLocale } from '@trammel/metrology/decimal';
import { convertDecimal, findUnit } from '@trammel/metrology/units';
import { takesAttribute, type CharacteristicFacts } from '../../evidence/characteristic-facts.ts';
import { readEntry } from '../../evidence/reading-entry.ts';
import type { Cell } from '../../tables/table.ts';
import { unitOf } from './cell-words.ts';

export type ReadReading =
  | { readonly text: string; readonly converted: string | null }
  | { readonly detail: string; readonly remedy: string };

const passWords = new Set([
  'pass',
  'passed',
  'ok',
  'o.k.',
  'i.o.',
  'io',
  'i.o',
  'good',
  'go',
  'conforms',
  'in ordnung',
  'ja',
  'yes',
  'true',
]);
const failWords = new Set([
  'fail',
  'failed',
  'nok',
  'n.i.o.',
  'nio',
  'bad',
  'no go',
  'no-go',
  'nogo',
  'nicht in ordnung',
  'nein',
  'no',
  'false',
]);
const emptyWords = new Set(['n/a', 'n.a.', 'na', '-', '–', '—', '#n/a', 'nan', 'null']);
const numberAndUnit = /^([+\-−]?[\d.,'’ \u00a0\u202f]*\d[.,]?)\s*([^\d\s.,][^\d]{0,19})?$/u;

/** The reading that a cell means, in the form in which readings are typed; a unit other than the drawing's stays behind the number. */
export function readingText(
  cell: Cell,
  facts: CharacteristicFacts,
  locale: DecimalLocale,
  fileUnit: string | null,
): ReadReading {
  if (typeof cell !== 'string') return withUnit(cell.number, fileUnit, facts);
  const text = cell.trim();
  const word = text.toLowerCase();
  const passed = passWords.has(word);
  if (passed || failWords.has(word)) {
    if (takesAttribute(facts)) return { text: passed ? 'pass' : 'fail', converted: null };
    return {
      detail: `"${text}" is no reading: balloon ${facts.balloon} needs a measured value.`,
      remedy: `Send the number in ${facts.unit}.`,
    };
  }
  if (emptyWords.has(word)) {
    return {
      detail: `"${text}" is no reading.`,
      remedy: 'Leave the cell empty if the piece was not measured.',
    };
  }
  const match = numberAndUnit.exec(text);
  if (!match)
    return {
      detail: `"${text.slice(0, 40)}" is not a measured value.`,
      remedy: "Send the number alone, with its unit behind it if it is not the drawing's.",
    };
  const parsed = parseLocaleDecimal((match[1] ?? '').replace(/’/g, "'"), locale);
  if (isUndetermined(parsed))
    return {
      detail: `${parsed.reason}.`,
      remedy: 'Correct the cell, or the decimal sign and thousands mark above.',
    };
  return withUnit(formatDecimal(parsed), match[2]?.trim() ?? fileUnit, facts);
}

function withUnit(number: string, unit: string | null, facts: CharacteristicFacts): ReadReading {
  if (unit === null || unit === '' || unitOf(unit) === facts.unit) return checked(number, number, facts);
  const found = findUnit(unit);
  if (isUndetermined(found))
    return { detail: `${found.reason}.`, remedy: `The drawing gives ${facts.unit}; send the values in it.` };
  const converted = convertDecimal(number, found.symbol, facts.unit);
  if (isUndetermined(converted))
    return { detail: `${converted.reason}.`, remedy: `Send the value in ${facts.unit}.` };
  return checked(`${number} ${found.symbol}`, converted.text, facts);
}

function checked(text: string, value: string, facts: CharacteristicFacts): ReadReading {
  const entry = readEntry(text, facts);
  if (entry.kind === 'refused') return { detail: entry.reason, remedy: 'Correct the cell.' };
  return { text, converted: text === value ? null : value };
}
