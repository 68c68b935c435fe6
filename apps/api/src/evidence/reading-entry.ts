import { parseDecimal } from '@trammel/metrology/decimal';
import { isUndetermined } from '@trammel/metrology';
import { convertDecimal } from '@trammel/metrology/units';
import { takesAttribute, type CharacteristicFacts } from './characteristic-facts.ts';

/** What most readings look like; anything else is read with all its rules. */
const plainNumber = /^-?\d{1,15}(?:\.\d{1,15})?$/;
const withUnit = /^([+\-−]?[\d.]+)\s*([^\d\s.].*)$/u;

export type EntryMeaning =
  | { kind: 'number'; text: string }
  | { kind: 'pass' }
  | { kind: 'fail' }
  | { kind: 'refused'; reason: string };

/** A bare number: nothing behind the digits that could be a unit or a word. */
export function endsInFigure(text: string): boolean {
  const last = text.charCodeAt(text.length - 1);
  return (last >= 48 && last <= 57) || last === 46;
}

/**
 * What a typed reading means for its characteristic: the number in the characteristic's own unit, or pass or fail.
 * The typed text is what is kept; a unit written behind the number converts exactly and is never rounded first (R11).
 */
export function readEntry(text: string, facts: CharacteristicFacts): EntryMeaning {
  const measured = facts.kind !== 'attribute' && facts.kind !== 'note';
  if (measured && plainNumber.test(text)) return { kind: 'number', text };
  const word = text.toLowerCase();
  if (word === 'pass' || word === 'fail') {
    if (takesAttribute(facts)) return { kind: word };
    return {
      kind: 'refused',
      reason: `Balloon ${facts.balloon} needs a measured value; "${text}" is not a reading. Enter the number in ${facts.unit}.`,
    };
  }
  if (!measured) {
    return {
      kind: 'refused',
      reason: `Balloon ${facts.balloon} is checked, not measured: enter pass or fail.`,
    };
  }
  if (!endsInFigure(text)) {
    const match = withUnit.exec(text);
    if (!match)
      return {
        kind: 'refused',
        reason: `"${text}" is not a number. Enter digits with a point, such as 12.50.`,
      };
    const converted = convertDecimal(match[1] ?? '', (match[2] ?? '').trim(), facts.unit);
    return isUndetermined(converted)
      ? { kind: 'refused', reason: converted.reason }
      : { kind: 'number', text: converted.text };
  }
  const value = parseDecimal(text);
  return isUndetermined(value) ? { kind: 'refused', reason: value.reason } : { kind: 'number', text };
}
