import type { ImportSettings } from '@trammel/shared/table-import';
import { tableBudget } from '../../tables/budget.ts';
import { decodeText, suggestEncoding } from '../../tables/decode-text.ts';
import { readDelimited } from '../../tables/read-delimited.ts';
import { readWorkbook, type Sheet } from '../../tables/read-workbook.ts';
import { sniffTableFile, type TableFormat } from '../../tables/sniff-file.ts';
import { suggestDelimiter, suggestHeaderLine, suggestNumberSigns } from '../../tables/suggest-settings.ts';
import { isBlank, TableRefused, type Cell, type Table } from '../../tables/table.ts';

/** A file as it is held between preview and confirmation. */
export interface HeldFile {
  readonly format: TableFormat;
  /** CSV: the bytes in base64, so that another encoding can be tried. XLSX: the cells of each sheet as JSON. */
  readonly content: string;
}

export interface OpenedFile extends HeldFile {
  readonly sheets: readonly string[];
}

/** Reads the bytes that were sent once, within the budget, into what is held. */
export async function openTableFile(name: string, bytes: Uint8Array): Promise<OpenedFile> {
  if (bytes.length > tableBudget.fileBytes)
    throw new TableRefused('The table is larger than 10 MB.', 'Split it into several files.');
  const format = sniffTableFile(name, bytes);
  if (format === 'csv') {
    decodeText(bytes, suggestEncoding(bytes));
    return { format, sheets: [], content: Buffer.from(bytes).toString('base64') };
  }
  const sheets = await readWorkbook(bytes);
  const filled = sheets.filter((sheet) => sheet.table.rows.some((row) => !isBlank(row)));
  if (filled.length === 0)
    throw new TableRefused('Every sheet of the workbook is empty.', 'Fill in the table and save it again.');
  const held = filled.map((sheet) => ({ name: sheet.name, rows: sheet.table.rows.map((row) => row.cells) }));
  return { format, sheets: held.map((sheet) => sheet.name), content: JSON.stringify(held) };
}

export interface ReadFile {
  readonly settings: ImportSettings;
  readonly table: Table;
}

/** The table under the declared settings; without any, under those the file itself suggests. */
export function readHeldFile(
  file: HeldFile,
  declared: ImportSettings | null,
  recognise: (header: string) => boolean,
): ReadFile {
  return file.format === 'csv'
    ? readText(file.content, declared, recognise)
    : readSheet(file.content, declared, recognise);
}

function readText(
  content: string,
  declared: ImportSettings | null,
  recognise: (header: string) => boolean,
): ReadFile {
  const bytes = Buffer.from(content, 'base64');
  const encoding = declared?.encoding ?? suggestEncoding(bytes);
  const text = decodeText(bytes, encoding);
  const delimiter = declared?.delimiter ?? suggestDelimiter(text);
  const table = readDelimited(text, delimiter);
  if (table.rows.length === 0)
    throw new TableRefused('The file has no rows.', 'Send the table with its rows.');
  if (declared) return { settings: declared, table };
  const headerLine = suggestHeaderLine(table, recognise);
  return { settings: { encoding, delimiter, ...suggestNumberSigns(table), sheet: null, headerLine }, table };
}

function readSheet(
  content: string,
  declared: ImportSettings | null,
  recognise: (header: string) => boolean,
): ReadFile {
  const held = JSON.parse(content) as { name: string; rows: Cell[][] }[];
  const sheets: Sheet[] = held.map(({ name, rows }) => ({
    name,
    table: { rows: rows.map((cells, index) => ({ line: index + 1, cells })).filter((row) => !isBlank(row)) },
  }));
  const sheet = sheets.find(({ name }) => name === declared?.sheet) ?? likeliest(sheets, recognise);
  if (!sheet)
    throw new TableRefused('The workbook has no sheet.', 'Send a workbook with the table on a sheet.');
  const { table, name } = sheet;
  if (declared) return { settings: { ...declared, sheet: name }, table };
  const signs = suggestNumberSigns(table);
  const headerLine = suggestHeaderLine(table, recognise);
  return { settings: { encoding: 'utf-8', delimiter: ',', ...signs, sheet: name, headerLine }, table };
}

function likeliest(sheets: readonly Sheet[], recognise: (header: string) => boolean): Sheet | undefined {
  const words = (sheet: Sheet) =>
    sheet.table.rows
      .slice(0, 40)
      .reduce(
        (most, row) =>
          Math.max(most, row.cells.filter((cell) => typeof cell === 'string' && recognise(cell)).length),
        0,
      );
  return [...sheets].sort((a, b) => words(b) - words(a))[0];
}
