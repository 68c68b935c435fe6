import type { DecimalLocale } from '@trammel/metrology/decimal';
import type { ImportSettings } from '@trammel/shared/table-import';
import { cellText, type Cell, type Table, type TableRow } from '../../tables/table.ts';

export const localeOf = (settings: ImportSettings): DecimalLocale => ({
  decimalSign: settings.decimalSign,
  groupSign:
    settings.groupSign === '' || settings.groupSign === settings.decimalSign ? null : settings.groupSign,
});

/** The cell as text in the notation of the file: a number cell is rewritten, so that one notation reads the row. */
export function localText(cell: Cell | undefined, settings: ImportSettings): string {
  if (cell === undefined || typeof cell === 'string') return cellText(cell);
  return settings.decimalSign === '.' ? cell.number : cell.number.replace('.', ',');
}

export interface SplitTable {
  readonly header: TableRow | null;
  readonly body: readonly TableRow[];
  readonly width: number;
}

/** Header and the rows below it. */
export function splitTable(table: Table, settings: ImportSettings): SplitTable {
  const header =
    settings.headerLine === 0 ? null : (table.rows.find((row) => row.line >= settings.headerLine) ?? null);
  const body = header === null ? table.rows : table.rows.filter((row) => row.line > header.line);
  const width = table.rows.reduce((most, row) => Math.max(most, row.cells.length), 0);
  return { header, body, width };
}

const letters = (index: number): string =>
  index < 26 ? String.fromCharCode(65 + index) : letters(Math.floor(index / 26) - 1) + letters(index % 26);

/** Columns with their header and a few values, as the mapping form shows them. */
export function describeColumns(split: SplitTable): { index: number; header: string; sample: string[] }[] {
  return Array.from({ length: split.width }, (_, index) => ({
    index,
    header: cellText(split.header?.cells[index]).slice(0, 200) || `Column ${letters(index)}`,
    sample: split.body
      .slice(0, 40)
      .map((row) => cellText(row.cells[index]).slice(0, 60))
      .filter((text) => text !== '')
      .slice(0, 3),
  }));
}
