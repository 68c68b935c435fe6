import type { SortingState } from '@tanstack/react-table';

export type SortValue = string | number | null;

interface Sortable {
  id: string;
  sortName?: string;
}

/** `-dueOn` is the address's word for the latest first. */
export function readSort(sort: string, columns: readonly Sortable[]): SortingState {
  const desc = sort.startsWith('-');
  const name = desc ? sort.slice(1) : sort;
  const column = columns.find((one) => (one.sortName ?? one.id) === name);
  return column === undefined ? [] : [{ id: column.id, desc }];
}

export function writeSort(sorting: SortingState, columns: readonly Sortable[]): string {
  const first = sorting[0];
  if (first === undefined) return '';
  const column = columns.find((one) => one.id === first.id);
  return (first.desc ? '-' : '') + (column?.sortName ?? first.id);
}

const collator = new Intl.Collator(undefined, { numeric: true, sensitivity: 'base' });

/** Numbers by size, texts as people sort them (2 before 10), nothing last. */
export function compareValues(a: SortValue, b: SortValue): number {
  if (a === null || b === null) return a === b ? 0 : a === null ? 1 : -1;
  if (typeof a === 'number' && typeof b === 'number') return a - b;
  return collator.compare(String(a), String(b));
}
