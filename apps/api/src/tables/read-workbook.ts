import readXlsxFile from 'read-excel-file/node';
import { tableBudget } from './budget.ts';
import { TableRefused, type Cell, type Table } from './table.ts';
import { assertZipBudget } from './zip-budget.ts';

export interface Sheet {
  readonly name: string;
  readonly table: Table;
}

/**
 * The digits a spreadsheet program shows: it stores 0.1 + 0.2 as 0.30000000000000004 and shows 15 significant digits.
 * Plain notation; an exponent is written out.
 */
export function workbookNumber(stored: string): string {
  if (!/[eE]/.test(stored) && stored.replace(/^-?0*\.?0*|\./g, '').length <= 15) return stored;
  const value = Number(stored);
  if (!Number.isFinite(value)) return stored;
  const [mantissa = '0', exponent = '0'] = value.toExponential(14).split('e');
  const negative = mantissa.startsWith('-');
  const digits = mantissa.replace(/[-.]/g, '');
  const point = 1 + Number(exponent);
  if (Math.abs(point) > 40) return stored;
  const padded = point <= 0 ? '0'.repeat(1 - point) + digits : digits.padEnd(point, '0');
  const whole = padded.slice(0, Math.max(point, 1));
  const fraction = padded.slice(Math.max(point, 1)).replace(/0+$/, '');
  return `${negative ? '-' : ''}${whole}${fraction ? `.${fraction}` : ''}`;
}

function cellOf(value: unknown): Cell {
  if (value === null || value === undefined) return '';
  if (typeof value === 'string')
    return value.length > tableBudget.cellCharacters ? value.slice(0, tableBudget.cellCharacters) : value;
  if (typeof value === 'boolean') return value ? 'TRUE' : 'FALSE';
  if (value instanceof Date) return Number.isNaN(value.getTime()) ? '' : value.toISOString().slice(0, 10);
  if (typeof value === 'object' && 'number' in value && typeof value.number === 'string')
    return { number: value.number };
  return '';
}

/** Every sheet of a workbook as text and numbers with their digits. Formulas give their last stored result. */
export async function readWorkbook(bytes: Uint8Array): Promise<Sheet[]> {
  await assertZipBudget(bytes);
  const buffer = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  let sheets;
  try {
    sheets = await readXlsxFile(buffer, {
      parseNumber: (stored) => ({ number: workbookNumber(stored) }),
      trim: false,
    });
  } catch {
    throw new TableRefused(
      'The workbook cannot be read: it is damaged or of an unusual kind.',
      'Open it and save it as XLSX again, or save it as CSV.',
    );
  }
  let cells = 0;
  return sheets.map(({ sheet, data }) => {
    const rows = data.map((row, index) => ({
      line: index + 1,
      cells: row.slice(0, tableBudget.columns).map(cellOf),
    }));
    cells += rows.reduce((sum, row) => sum + row.cells.length, 0);
    if (rows.length > tableBudget.rows || cells > tableBudget.cells) {
      throw new TableRefused(
        'The workbook has more than a million cells.',
        'Copy the rows that matter into a new workbook.',
      );
    }
    return { name: sheet, table: { rows } };
  });
}
