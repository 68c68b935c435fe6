import type { TableColumn } from '../table-row.ts';

export const columnWords: Record<TableColumn, string> = {
  balloon: 'Balloon',
  sheet: 'Sheet',
  zone: 'Zone',
  description: 'Description',
  kind: 'Kind',
  nominal: 'Nominal',
  tolerance: 'Tolerance',
  unit: 'Unit',
  decimals: 'Decimals',
  class: 'Class',
  method: 'Method',
};

/** Columns of the grid: the limits stand beside the tolerance they come from, the button of the form at the end. */
export const tableTemplate =
  '4.25rem 3.25rem 3.25rem 13rem 8rem 5.5rem 7.5rem 10rem 4rem 4.5rem 8rem 7rem 4rem';

/** The limits follow the tolerance. */
export const limitsColumn = 8;

/** Place of a typed column in the grid, 1 upwards. */
export const gridColumn = (at: number): number => (at + 1 < limitsColumn ? at + 1 : at + 2);
