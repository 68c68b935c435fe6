import { Notice } from '../../../components/ui/notice.tsx';
import { countOf } from '../../../lib/format.ts';
import type { RowFault, TableRow } from '../table-row.ts';
import { columnWords } from './column-words.ts';

export interface FaultyRow {
  readonly row: TableRow;
  readonly index: number;
  readonly fault: RowFault;
}

const shown = 8;

/** Rows that wait for something to be mended, each a way to its cell. */
export function UnsavedRows({
  rows,
  onGo,
}: {
  rows: readonly FaultyRow[];
  onGo: (faulty: FaultyRow) => void;
}) {
  if (rows.length === 0) return null;
  return (
    <Notice tone="attention" title={`${countOf(rows.length, 'row is', 'rows are')} not saved yet`}>
      <ul className="flex flex-col gap-1">
        {rows.slice(0, shown).map((faulty) => (
          <li key={faulty.row.key}>
            <button
              type="button"
              className="min-h-6 text-start text-marking underline"
              onClick={() => onGo(faulty)}
            >
              Row {faulty.index + 1}, balloon {faulty.row.cells.balloon || 'missing'},{' '}
              {columnWords[faulty.fault.column].toLowerCase()}
            </button>
            : {faulty.fault.message}
          </li>
        ))}
        {rows.length > shown && <li>and {rows.length - shown} more</li>}
      </ul>
    </Notice>
  );
}
