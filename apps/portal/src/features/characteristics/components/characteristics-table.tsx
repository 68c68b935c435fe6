import type { CharacteristicResponse } from '@trammel/shared/characteristics';
import {
  useEffect,
  useMemo,
  useReducer,
  useRef,
  useState,
  type ClipboardEvent,
  type KeyboardEvent,
} from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { ConflictNotice } from '../../../components/ui/conflict-notice.tsx';
import { SaveState } from '../../../components/ui/save-state.tsx';
import { cn } from '../../../lib/cn.ts';
import { draftKey, dropDraft, writeDraft } from '../../../lib/draft-storage.ts';
import { countOf } from '../../../lib/format.ts';
import { useSession } from '../../../lib/session.ts';
import { useKeys } from '../../../lib/use-keys.ts';
import { restoreTable } from '../restore-table.ts';
import { commandOf, tableKeys } from '../table-keys.ts';
import { readBlock, reduceTable, unsavedOf, type Place } from '../table-model.ts';
import { checkRow, isBlank, rowOf, tableColumns, type TableRow } from '../table-row.ts';
import { rowHeight, useRowWindow } from '../use-row-window.ts';
import { useTableSaving } from '../use-table-saving.ts';
import { CharacteristicDialog } from './characteristic-dialog.tsx';
import { columnWords } from './column-words.ts';
import { TableHead, TableLine } from './table-line.tsx';
import { UnsavedRows } from './unsaved-rows.tsx';

export interface CharacteristicsTableProps {
  revisionId: string;
  items: readonly CharacteristicResponse[];
  editable: boolean;
}

/** The characteristics of a revision, filled like a spreadsheet; each row shows its limits as it is typed. */
export function CharacteristicsTable({ revisionId, items, editable }: CharacteristicsTableProps) {
  const { user } = useSession();
  const storage = draftKey(user.id, `characteristics.${revisionId}`);
  const [table, dispatch] = useReducer(reduceTable, items, (rows) => restoreTable(rows.map(rowOf), storage));
  const [editing, setEditing] = useState<string | null>(null);
  const [form, setForm] = useState<string | null>(null);
  const saving = useTableSaving(revisionId, table, dispatch, editable);
  const grid = useRef<HTMLDivElement>(null);
  const shown = useRowWindow(grid, table.rows.length);
  const checked = useMemo(() => new Map(table.rows.map((row) => [row.key, checkRow(row)])), [table.rows]);
  const faultsOf = (row: TableRow) =>
    isBlank(row) ? [] : [...(checked.get(row.key)?.faults ?? []), ...(saving.refused.get(row.key) ?? [])];
  const faulty = table.rows.flatMap((row, index) => {
    const [fault] = faultsOf(row);
    return fault ? [{ row, index, fault }] : [];
  });

  // What is not saved yet outlives the tab; it is dropped as soon as the server has it.
  useEffect(() => {
    if (!editable) return;
    const { rows, removed } = unsavedOf(table);
    if (rows.length === 0 && removed.length === 0) dropDraft(storage);
    else writeDraft(storage, { value: table.rows, version: 1, at: new Date().toISOString() });
  }, [editable, storage, table]);

  const { active } = table;
  const row = table.rows[active.row];
  const column = tableColumns[active.column];
  const focusGrid = () => grid.current?.focus();
  const move = (place: Place) => {
    dispatch({ type: 'move', place });
    shown.scrollTo(place.row);
  };
  const addRow = () => {
    const at = table.rows.length === 0 ? -1 : active.row;
    dispatch({ type: 'add', after: at });
    move({ row: at + 1, column: 0 });
    focusGrid();
  };
  const removeRow = () => row && dispatch({ type: 'remove', row: active.row });
  const commit = (text: string, down: number, across: number) => {
    dispatch({ type: 'edit', place: active, text });
    setEditing(null);
    focusGrid();
    if (down > 0 && text !== '' && active.row === table.rows.length - 1)
      dispatch({ type: 'add', after: active.row });
    if (down !== 0 || across !== 0) move({ row: active.row + down, column: active.column + across });
  };
  useKeys('Characteristics', tableKeys, editable);

  const hear = (event: KeyboardEvent) => {
    const command = editing === null ? commandOf(event, active.column) : null;
    if (!command || (command.do !== 'move' && !editable)) return;
    event.preventDefault();
    switch (command.do) {
      case 'move':
        return move({ row: active.row + command.down, column: active.column + command.across });
      case 'type':
        return row && setEditing(command.text);
      case 'edit':
        return row && column && setEditing(row.cells[column]);
      case 'clear':
        return dispatch({ type: 'edit', place: active, text: '' });
      case 'add':
        return addRow();
      case 'remove':
        return removeRow();
      case 'form':
        return row && setForm(row.key);
      default:
        return dispatch({ type: command.do });
    }
  };
  const paste = (event: ClipboardEvent) => {
    if (!editable || editing !== null) return;
    event.preventDefault();
    dispatch({ type: 'paste', place: active, block: readBlock(event.clipboardData.getData('text/plain')) });
  };
  const copy = (event: ClipboardEvent) => {
    if (editing !== null || !row || !column) return;
    event.preventDefault();
    event.clipboardData.setData('text/plain', row.cells[column]);
  };

  const activeFaults = row ? faultsOf(row) : [];
  const fault = activeFaults.find((one) => one.column === column) ?? activeFaults[0];
  const formRow = table.rows.find((other) => other.key === form);

  return (
    <div className="flex flex-col gap-2">
      {editable && (
        <div
          role="toolbar"
          aria-label="Table of characteristics"
          className="no-print flex flex-wrap items-center gap-2"
        >
          <Button size="small" onClick={addRow}>
            Add a row
          </Button>
          <Button size="small" disabled={!row} onClick={removeRow}>
            Remove the row
          </Button>
          <Button size="small" disabled={!row} onClick={() => row && setForm(row.key)}>
            Open as a form
          </Button>
          <Button size="small" disabled={table.past.length === 0} onClick={() => dispatch({ type: 'undo' })}>
            Undo
          </Button>
          <Button
            size="small"
            disabled={table.future.length === 0}
            onClick={() => dispatch({ type: 'redo' })}
          >
            Redo
          </Button>
          <SaveState state={saving.state} savedAt={saving.savedAt} onRetry={saving.saveNow} />
        </div>
      )}
      {saving.theirs && (
        <ConflictNotice
          what="This table"
          mine={countOf(unsavedOf(table).rows.length, 'row not saved', 'rows not saved')}
          theirs={countOf(saving.theirs.items.length, 'row on the server', 'rows on the server')}
          onKeepMine={saving.keepMine}
          onTakeTheirs={saving.takeTheirs}
        />
      )}
      {editable && (
        <UnsavedRows
          rows={faulty}
          onGo={({ index, fault: { column: at } }) => {
            move({ row: index, column: tableColumns.indexOf(at) });
            focusGrid();
          }}
        />
      )}
      <div
        ref={grid}
        role="grid"
        tabIndex={0}
        aria-label="Characteristics"
        aria-rowcount={table.rows.length + 1}
        aria-colcount={tableColumns.length + 2}
        aria-readonly={!editable}
        aria-activedescendant={row ? `${row.key}-${active.column}` : undefined}
        onKeyDown={hear}
        onPaste={paste}
        onCopy={copy}
        className="max-h-[70vh] overflow-auto border border-rule bg-sheet text-[0.875rem] print:max-h-none print:overflow-visible"
      >
        <TableHead />
        <div role="rowgroup" className="relative min-w-max" style={{ height: table.rows.length * rowHeight }}>
          {table.rows.slice(shown.first, shown.last).map((line, offset) => {
            const index = shown.first + offset;
            const isActive = index === active.row;
            return (
              <TableLine
                key={line.key}
                row={line}
                index={index}
                top={index * rowHeight}
                checked={checked.get(line.key) ?? null}
                faults={faultsOf(line)}
                activeColumn={isActive ? active.column : null}
                editing={isActive ? editing : null}
                onPick={(at, again) => {
                  if (editing !== null) return;
                  move({ row: index, column: at });
                  focusGrid();
                  const name = tableColumns[at];
                  if (again && editable && name) setEditing(line.cells[name]);
                }}
                onCommit={commit}
                onCancel={() => {
                  setEditing(null);
                  focusGrid();
                }}
                onOpen={editable ? () => setForm(line.key) : null}
              />
            );
          })}
        </div>
      </div>
      <p
        aria-live="polite"
        className={cn('min-h-6 text-[0.875rem]', fault ? 'text-vermilion' : 'text-pencil')}
      >
        {fault
          ? `Balloon ${row?.cells.balloon || 'missing'}, ${columnWords[fault.column].toLowerCase()}: ${fault.message}`
          : row && checked.get(row.key)?.limits?.explanation}
      </p>
      {formRow && (
        <CharacteristicDialog
          row={formRow}
          onClose={() => setForm(null)}
          onApply={(cells, details) => {
            dispatch({ type: 'details', key: formRow.key, cells, details });
            setForm(null);
          }}
        />
      )}
    </div>
  );
}
