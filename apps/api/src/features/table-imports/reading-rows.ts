import { isUndetermined } from '@trammel/metrology/conformance';
import { compareDecimals, parseDecimal } from '@trammel/metrology/decimal';
import type { ImportIssue, ImportSettings, ReadingMapping } from '@trammel/shared/table-import';
import type { CharacteristicFacts } from '../../evidence/characteristic-facts.ts';
import { decodeReadings } from '../../evidence/readings-text.ts';
import { cellText, isBlank, type Cell, type TableRow } from '../../tables/table.ts';
import { readHeader } from './column-words.ts';
import { localeOf, type SplitTable } from './import-settings.ts';
import { PieceFinder, type KnownPiece, type KnownStream } from './piece-finder.ts';
import { readingText } from './reading-text.ts';

export interface ReadingContext {
  readonly facts: readonly CharacteristicFacts[];
  readonly streams: readonly KnownStream[];
  readonly pieces: readonly KnownPiece[];
  readonly stored: readonly {
    readonly characteristicId: string;
    readonly streamId: string;
    readonly readings: string;
  }[];
  readonly unit: string | null;
  readonly newPiecesStreamId: string | null;
}

export interface ReadingChangeOfFile {
  readonly line: number;
  readonly balloon: string;
  readonly characteristicId: string;
  /** Label in the package, or of a piece to be added. */
  readonly piece: string;
  readonly pieceId: string | null;
  readonly text: string;
  readonly unit: string;
  readonly converted: string | null;
  readonly was: string | null;
}

export interface ReadReadings {
  readonly changes: ReadingChangeOfFile[];
  readonly same: number;
  readonly refused: ImportIssue[];
  readonly refusedCount: number;
  readonly newPieces: { readonly label: string; readonly streamId: string }[];
}

const refusedShown = 500;

/** Every reading of the table, placed on a characteristic and a piece, or refused by line and column. */
export function readReadingRows(
  split: SplitTable,
  settings: ImportSettings,
  mapping: ReadingMapping,
  context: ReadingContext,
): ReadReadings {
  const byBalloon = new Map(context.facts.map((facts) => [facts.balloon, facts]));
  const finder = new PieceFinder(context);
  const storedTexts = new Map(
    context.stored.map((row) => [`${row.characteristicId} ${row.streamId}`, decodeReadings(row.readings)]),
  );
  const locale = localeOf(settings);
  const changes: ReadingChangeOfFile[] = [];
  const refused: ImportIssue[] = [];
  const lineOf = new Map<string, number>();
  let same = 0;
  let refusedCount = 0;
  const headerOf = (index: number | null) =>
    index === null ? null : cellText(split.header?.cells[index]).slice(0, 100) || `Column ${index + 1}`;
  const refuse = (line: number, index: number | null, detail: string, remedy: string) => {
    refusedCount += 1;
    if (refused.length < refusedShown) refused.push({ line, column: headerOf(index), detail, remedy });
  };

  const place = (
    line: number,
    index: number,
    cell: Cell | undefined,
    balloon: string,
    label: string,
    stream: string | null,
    unit: string | null,
  ) => {
    if (cell === undefined || cellText(cell) === '') return;
    const facts = byBalloon.get(balloon);
    if (!facts)
      return refuse(
        line,
        index,
        `Balloon ${balloon} is not on this drawing revision.`,
        'Correct the number, or leave the row out.',
      );
    const piece = finder.find(label, stream);
    if ('detail' in piece) return refuse(line, index, piece.detail, piece.remedy);
    const key = `${balloon} ${piece.label}`;
    const before = lineOf.get(key);
    if (before !== undefined)
      return refuse(
        line,
        index,
        `Balloon ${balloon} of piece ${piece.label} stands already on line ${before}.`,
        'Keep one of the two.',
      );
    const read = readingText(cell, facts, locale, unit);
    if ('detail' in read) return refuse(line, index, read.detail, read.remedy);
    lineOf.set(key, line);
    const was =
      piece.id === null ? null : (storedTexts.get(`${facts.id} ${piece.streamId}`)?.[piece.slot] ?? null);
    if (was !== null && sameReading(was, read.text)) {
      same += 1;
      return;
    }
    changes.push({
      line,
      balloon,
      characteristicId: facts.id,
      piece: piece.label,
      pieceId: piece.id,
      text: read.text,
      unit: facts.unit,
      converted: read.converted,
      was,
    });
  };

  const headerUnits = new Map<number, string | null>();
  const unitOfColumn = (index: number): string | null => {
    if (!headerUnits.has(index)) {
      const header = split.header?.cells[index];
      headerUnits.set(index, typeof header === 'string' ? readHeader(header).unit : null);
    }
    return headerUnits.get(index) ?? context.unit;
  };
  const text = (row: TableRow, index: number | null) => (index === null ? null : cellText(row.cells[index]));

  const columns =
    mapping.layout === 'wide'
      ? Object.entries(mapping.columns).map(([index, name]) => ({ index: Number(index), name }))
      : [];
  for (const row of split.body) {
    if (isBlank(row)) continue;
    if (mapping.layout === 'long') {
      const balloon = balloonText(text(row, mapping.balloon) ?? '');
      const label = text(row, mapping.piece) ?? '';
      if (balloon === '')
        refuse(
          row.line,
          mapping.balloon,
          'The row names no characteristic.',
          'Fill in its balloon number, or leave the row out.',
        );
      else if (label === '')
        refuse(row.line, mapping.piece, 'The row names no piece.', 'Fill in the label of the piece.');
      else
        place(
          row.line,
          mapping.value,
          row.cells[mapping.value],
          balloon,
          label,
          text(row, mapping.stream),
          text(row, mapping.unit) || unitOfColumn(mapping.value),
        );
      continue;
    }
    const key = text(row, mapping.key) ?? '';
    if (key === '') {
      if (columns.some(({ index }) => cellText(row.cells[index]) !== '')) {
        const what = mapping.rowsAre === 'characteristics' ? 'characteristic' : 'piece';
        refuse(row.line, mapping.key, `The row names no ${what}.`, 'Fill it in, or leave the row out.');
      }
      continue;
    }
    const ofPieces = mapping.rowsAre === 'pieces';
    const stream = text(row, mapping.stream);
    const unitHere = ofPieces ? null : rowUnit(split, row);
    for (const { index, name } of columns) {
      const balloon = ofPieces ? name : balloonText(key);
      place(
        row.line,
        index,
        row.cells[index],
        balloon,
        ofPieces ? key : name,
        stream,
        unitHere ?? unitOfColumn(index),
      );
    }
  }
  return { changes, same, refused, refusedCount, newPieces: finder.newPieces };
}

const balloonText = (text: string): string => text.replace(/^[#№]\s?|\.0?$/g, '').toLowerCase();

/** A sheet with one row a characteristic often has a column of units; it speaks for every reading of the row. */
function rowUnit(split: SplitTable, row: TableRow): string | null {
  const index =
    split.header?.cells.findIndex((cell) => /^(?:units?|einheit|uom)$/i.test(cellText(cell))) ?? -1;
  return index < 0 ? null : cellText(row.cells[index]) || null;
}

function sameReading(a: string, b: string): boolean {
  if (a === b) return true;
  const [first, second] = [parseDecimal(a), parseDecimal(b)];
  return !isUndetermined(first) && !isUndetermined(second) && compareDecimals(first, second) === 0;
}
