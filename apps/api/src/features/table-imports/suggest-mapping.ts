import type { CharacteristicFacts } from '../../evidence/characteristic-facts.ts';
import type { ReadingMapping } from '@trammel/shared/table-import';
import { cellText } from '../../tables/table.ts';
import { characteristicColumnOf, readHeader } from './column-words.ts';
import type { CharacteristicMapping } from './characteristic-rows.ts';
import type { SplitTable } from './import-settings.ts';

/** Each column whose header is known, the first of its kind. */
export function suggestCharacteristicMapping(split: SplitTable): CharacteristicMapping {
  const mapping: CharacteristicMapping = {};
  for (const [index, cell] of (split.header?.cells ?? []).entries()) {
    const column = characteristicColumnOf(cellText(cell));
    if (column !== null && mapping[column] === undefined) mapping[column] = index;
  }
  return mapping;
}

const list = (words: string): ReadonlySet<string> => new Set(words.split('|'));
const pieceWords = list(
  'piece|pieces|piece no|piece number|part|part no|part number|sample|sample no|sample piece|serial|serial no|serial number|sn|s/n|specimen|unit no|teil|teil nr|teilenummer|probe|muster|stück|wafer|run|lauf|subgroup|batch',
);
const valueWords = list(
  'value|values|actual|actual value|measured|measured value|measurement|reading|result|observed|istwert|ist|istmaß|messwert|wert|thickness|diameter',
);
const streamWords = list('stream|cavity|nest|kavität|spindle|spindel|die|line|mould cavity|zone');
const unitWords = list('unit|units|einheit|uom');
const balloonWord = (header: string): boolean => characteristicColumnOf(header) === 'balloon';

export const isReadingHeader = (header: string): boolean => {
  const { word } = readHeader(header);
  return (
    pieceWords.has(word) ||
    valueWords.has(word) ||
    streamWords.has(word) ||
    characteristicColumnOf(header) !== null
  );
};

/** How the readings lie in the table, as far as its headers tell; null where a person must say. */
export function suggestReadingMapping(
  split: SplitTable,
  facts: readonly CharacteristicFacts[],
): ReadingMapping | null {
  const headers = Array.from({ length: split.width }, (_, index) => cellText(split.header?.cells[index]));
  const words = headers.map((header) => readHeader(header).word);
  const at = (known: (word: string, header: string) => boolean): number | null => {
    const index = words.findIndex((word, column) => word !== '' && known(word, headers[column] ?? ''));
    return index < 0 ? null : index;
  };
  const balloon = at((_word, header) => balloonWord(header));
  const value = at((word) => valueWords.has(word));
  const piece = at((word) => pieceWords.has(word));
  const stream = at((word) => streamWords.has(word));
  const unit = at((word) => unitWords.has(word));
  if (balloon !== null && piece !== null && value !== null)
    return { layout: 'long', balloon, piece, value, stream, unit };
  if (balloon !== null) {
    const columns = numericColumns(split).filter(
      (index) =>
        index !== balloon &&
        (index === value ||
          (characteristicColumnOf(headers[index] ?? '') === null && !streamWords.has(words[index] ?? ''))),
    );
    if (columns.length > 0)
      return {
        layout: 'wide',
        rowsAre: 'characteristics',
        key: balloon,
        columns: named(columns, headers),
        stream: null,
      };
  }
  const balloons = new Set(facts.map((row) => row.balloon));
  const ofBalloons = headers.flatMap((header, index) => {
    const found = balloonOfHeader(header);
    return found !== null && balloons.has(found) && index !== piece ? [[index, found] as const] : [];
  });
  const key = piece ?? 0;
  if (ofBalloons.length > 0 && !ofBalloons.some(([index]) => index === key)) {
    return {
      layout: 'wide',
      rowsAre: 'pieces',
      key,
      columns: Object.fromEntries(ofBalloons.map(([index, found]) => [String(index), found])),
      stream: stream === key ? null : stream,
    };
  }
  return null;
}

/** "12", "#12", "Char 12 [mm]", "12 Bore": the balloon a column stands for. */
function balloonOfHeader(header: string): string | null {
  const { word } = readHeader(header);
  return (
    /^(?:#|no |nr |char |balloon |merkmal )?\s?(\d{1,4}(?:[a-z]|\.\d{1,3})?)(?:\s|$)/.exec(word)?.[1] ?? null
  );
}

const named = (columns: readonly number[], headers: readonly string[]): Record<string, string> =>
  Object.fromEntries(
    columns.map((index) => {
      const label = (headers[index] ?? '').replace(/\s*[[(][^\])]*[\])]/, '').trim();
      return [String(index), label === '' ? `Column ${index + 1}` : label.slice(0, 200)];
    }),
  );

function numericColumns(split: SplitTable): number[] {
  return Array.from({ length: split.width }, (_, index) => index).filter((index) => {
    const texts = split.body
      .slice(0, 60)
      .map((row) => cellText(row.cells[index]))
      .filter((text) => text !== '');
    const numbers = texts.filter((text) =>
      /^[+\-−]?[\d.,]+(?:\s?\p{L}{1,3})?$|^(?:pass|fail|ok|nok|i\.?o\.?|n\.?i\.?o\.?)$/iu.test(text),
    );
    return texts.length > 0 && numbers.length * 2 > texts.length;
  });
}
