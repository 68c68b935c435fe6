/** A number cell of a workbook keeps its digits and is never read with the decimal sign of the text cells. */
export type Cell = string | { readonly number: string };

export interface TableRow {
  /** 1-based line of the file: the row of a sheet, or the line where a row of text begins. */
  readonly line: number;
  readonly cells: readonly Cell[];
}

export interface Table {
  readonly rows: readonly TableRow[];
}

export const cellText = (cell: Cell | undefined): string =>
  cell === undefined ? '' : typeof cell === 'string' ? cell.trim() : cell.number;

export const isBlank = (row: TableRow): boolean => row.cells.every((cell) => cellText(cell) === '');

/** The file as a whole cannot be read; says why and what to do. */
export class TableRefused extends Error {
  constructor(
    detail: string,
    readonly remedy: string,
  ) {
    super(detail);
  }
}
