import Papa from 'papaparse';
import { tableBudget } from './budget.ts';
import { TableRefused, type Table, type TableRow } from './table.ts';

export type Delimiter = ',' | ';' | '\t' | '|';
export const delimiters: readonly Delimiter[] = [';', '\t', ',', '|'];

/** Some spreadsheet programs write their delimiter into a first line of its own. */
const separatorLine = /^"?sep=(.)"?\s*(?:\r\n|\r|\n|$)/i;

export function statedDelimiter(text: string): Delimiter | null {
  const stated = separatorLine.exec(text)?.[1];
  return delimiters.find((sign) => sign === stated) ?? null;
}

/** Rows of delimited text (RFC 4180), each with the line where it begins; blank lines are counted, not returned. */
export function readDelimited(text: string, delimiter: Delimiter, preview = 0): Table {
  const rows: TableRow[] = [];
  let line = 1;
  let cells = 0;
  let tooLarge = false;
  Papa.parse<string[]>(text, {
    delimiter,
    newline: newlineOf(text),
    preview,
    step: ({ data, errors }, parser) => {
      if (errors.some((error) => error.code === 'MissingQuotes')) {
        throw new TableRefused(
          `A quotation mark opens on line ${line} and never closes.`,
          'Close it, or write a quotation mark inside a cell twice.',
        );
      }
      const start = line;
      line += 1;
      let blank = true;
      for (const cell of data) {
        if (cell !== '') blank = false;
        if (cell.length > 1 && /[\r\n]/.test(cell)) line += (cell.match(/\r\n|\r|\n/g) ?? []).length;
      }
      cells += data.length;
      if (
        data.length > tableBudget.columns ||
        rows.length >= tableBudget.rows ||
        cells > tableBudget.cells * 2
      ) {
        tooLarge = true;
        parser.abort();
        return;
      }
      if (!blank && !(start === 1 && separatorLine.test(text))) rows.push({ line: start, cells: data });
    },
  });
  if (tooLarge)
    throw new TableRefused(
      'The table has more rows or columns than are taken at once.',
      'Split it into several files.',
    );
  return { rows };
}

/** Mixed line ends are read as the first one met; a file of old carriage returns alone is a table too. */
function newlineOf(text: string): '\r\n' | '\n' | '\r' {
  const first = /\r\n|\n|\r/.exec(text.slice(0, 1_000_000))?.[0];
  if (first === '\r' && text.includes('\n')) return '\n';
  return first === '\r\n' || first === '\r' ? first : '\n';
}
