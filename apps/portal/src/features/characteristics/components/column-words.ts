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

/** Columns of the grid: the typed ones, then the limits and the button of the form. */
export const tableTemplate =
  '4.5rem 3.5rem 3.5rem 15rem 8rem 6rem 8rem 4.5rem 4.5rem 8.5rem 9rem 11rem 4.5rem';
