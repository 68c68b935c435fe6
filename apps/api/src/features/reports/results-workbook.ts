import { PassThrough } from 'node:stream';
import type ExcelJs from 'exceljs';
import { safeText } from '../../tables/export-text.ts';
import { readingHeader, readingLines } from './reading-table.ts';
import type { ReportRow } from './report-rows.ts';
import { classWords, verdictWords } from './report-words.ts';

const rowHeader = [
  'Balloon',
  'Description',
  'Stream',
  'Unit',
  'Lower limit',
  'Upper limit',
  'Class',
  'Pieces asked for',
  'n',
  'Minimum',
  'Maximum',
  'Mean',
  'Standard deviation',
  'Out of tolerance',
  'Undecided',
  'Verdict',
] as const;

interface Cell {
  readonly value: string | number | null;
  readonly numFmt?: string;
}

/** A number stays a number and shows the decimals it was typed with; one too long for the cell's precision stays text. */
export function numberCell(text: string): Cell {
  if (text === '') return { value: null };
  const match = /^[+-]?(?=\.?\d)\d*(?:\.(\d*))?$/.exec(text);
  if (!match) return { value: safeText(text), numFmt: '@' };
  const decimals = (match[1] ?? '').length;
  const value = Number(text);
  const significant = text.replace(/\D/g, '').replace(/^0+/, '').length;
  if (significant > 15) return { value: text, numFmt: '@' };
  return { value, numFmt: decimals === 0 ? '0' : `0.${'0'.repeat(decimals)}` };
}

const textCell = (text: string): Cell =>
  text === '' ? { value: null } : { value: safeText(text), numFmt: '@' };
const countCell = (value: number): Cell => ({ value, numFmt: '0' });
const computedCell = (value: number | null, decimals: number): Cell =>
  value === null ? { value: null } : { value, numFmt: `0.${'0'.repeat(decimals)}` };

/** Written to a stream: the readings of a large package never stand in memory as cells. */
export async function resultsWorkbook(rows: readonly ReportRow[]): Promise<Uint8Array> {
  const { default: exceljs } = (await import('exceljs')) as { default: typeof ExcelJs };
  const stream = new PassThrough();
  const chunks: Buffer[] = [];
  stream.on('data', (chunk: Buffer) => chunks.push(chunk));
  const workbook = new exceljs.stream.xlsx.WorkbookWriter({
    stream,
    useStyles: true,
    useSharedStrings: false,
  });
  const readings = addSheet(workbook, 'Readings', readingHeader, [9, 36, 16, 12, 14, 8, 12, 12, 16]);
  for (const row of rows) {
    for (const line of readingLines(row)) {
      add(
        readings,
        line.map((text, at) => (at === 4 || at === 6 || at === 7 ? numberCell(text) : textCell(text))),
      );
    }
  }
  readings.commit();
  const summary = addSheet(
    workbook,
    'Characteristics',
    rowHeader,
    [9, 36, 16, 8, 12, 12, 20, 14, 8, 12, 12, 12, 16, 14, 12, 16],
  );
  for (const row of rows) add(summary, summaryLine(row));
  summary.commit();
  await workbook.commit();
  return new Uint8Array(Buffer.concat(chunks));
}

function summaryLine({ facts, stream, checked }: ReportRow): Cell[] {
  return [
    textCell(facts.balloon),
    textCell(facts.description),
    textCell(stream.name),
    textCell(facts.unit === '1' ? '' : facts.unit),
    numberCell(facts.lowerLimit ?? ''),
    numberCell(facts.upperLimit ?? ''),
    textCell(classWords[facts.class]),
    countCell(checked.required),
    countCell(checked.n),
    numberCell(checked.minimum ?? ''),
    numberCell(checked.maximum ?? ''),
    computedCell(checked.mean, facts.decimals + 1),
    computedCell(checked.standardDeviation, facts.decimals + 2),
    countCell(checked.outCount),
    countCell(checked.undecidedCount),
    textCell(verdictWords[checked.verdict]),
  ];
}

function addSheet(
  workbook: ExcelJs.stream.xlsx.WorkbookWriter,
  name: string,
  header: readonly string[],
  widths: readonly number[],
): ExcelJs.Worksheet {
  const sheet = workbook.addWorksheet(name, { views: [{ state: 'frozen', ySplit: 1 }] });
  sheet.columns = widths.map((width) => ({ width }));
  const first = sheet.addRow([...header]);
  first.font = { bold: true };
  first.commit();
  return sheet;
}

function add(sheet: ExcelJs.Worksheet, cells: readonly Cell[]): void {
  const row = sheet.addRow(cells.map((cell) => cell.value));
  cells.forEach(({ value, numFmt }, at) => {
    if (value !== null && numFmt !== undefined) row.getCell(at + 1).numFmt = numFmt;
  });
  row.commit();
}
