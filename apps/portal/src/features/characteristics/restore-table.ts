import { readDraft } from '../../lib/draft-storage.ts';
import { startTable, type TableState } from './table-model.ts';
import type { TableRow } from './table-row.ts';

/** Rows that never reached the server come back with the page, on top of what the server has now. */
export function restoreTable(rows: readonly TableRow[], storage: string): TableState {
  const table = startTable(rows);
  const draft = readDraft<TableRow[]>(storage);
  if (!draft) return table;
  const known = new Map(table.rows.map((row) => [row.id, row]));
  const kept = draft.value.filter((row) => row.id === null || known.has(row.id));
  const present = new Set(kept.map((row) => row.id));
  const current = kept.map((row) =>
    row.id === null ? row : { ...row, version: known.get(row.id)?.version ?? row.version },
  );
  return { ...table, rows: [...current, ...table.rows.filter((row) => !present.has(row.id))] };
}
