import { unitSymbols } from '@trammel/shared/characteristics';
import { memo, useEffect, useRef, useState, type KeyboardEvent } from 'react';
import { columnWords, gridColumn, limitsColumn, tableTemplate } from './column-words.ts';
import { cn } from '../../../lib/cn.ts';
import { showDecimal } from '../../../lib/format.ts';
import { classWords, kindWords } from '../characteristic-words.ts';
import {
  tableColumns,
  type CheckedRow,
  type RowFault,
  type TableColumn,
  type TableRow,
} from '../table-row.ts';

const choices: Partial<Record<TableColumn, readonly string[]>> = {
  kind: Object.values(kindWords),
  class: Object.values(classWords),
  unit: unitSymbols,
};
const mono = new Set<TableColumn>(['balloon', 'sheet', 'zone', 'nominal', 'tolerance', 'unit', 'decimals']);

export function TableHead() {
  return (
    <div role="rowgroup" className="sticky top-0 z-10 min-w-max border-b border-pencil bg-sheet">
      <div
        role="row"
        aria-rowindex={1}
        className="grid h-8 items-center"
        style={{ gridTemplateColumns: tableTemplate }}
      >
        {tableColumns.map((column, at) => (
          <span
            key={column}
            role="columnheader"
            style={{ gridColumn: gridColumn(at), gridRow: 1 }}
            className="truncate px-2 text-[0.8125rem] font-semibold"
          >
            {columnWords[column]}
          </span>
        ))}
        <span
          role="columnheader"
          style={{ gridColumn: limitsColumn, gridRow: 1 }}
          className="px-2 text-[0.8125rem] font-semibold"
        >
          Limits
        </span>
        <span role="columnheader" className="sr-only">
          Form
        </span>
      </div>
    </div>
  );
}

export interface TableLineProps {
  row: TableRow;
  index: number;
  top: number;
  checked: CheckedRow | null;
  faults: readonly RowFault[];
  activeColumn: number | null;
  /** Text in the editor of the active cell. */
  editing: string | null;
  onPick: (column: number, again: boolean) => void;
  onCommit: (text: string, down: number, across: number) => void;
  onCancel: () => void;
  onOpen: (() => void) | null;
}

export const TableLine = memo(Line);

function Line({
  row,
  index,
  top,
  checked,
  faults,
  activeColumn,
  editing,
  onPick,
  onCommit,
  onCancel,
  onOpen,
}: TableLineProps) {
  return (
    <div
      role="row"
      aria-rowindex={index + 2}
      className="absolute grid h-8 items-stretch border-b border-rule"
      style={{ top, gridTemplateColumns: tableTemplate }}
    >
      {tableColumns.map((column, at) => {
        const active = at === activeColumn;
        const wrong = faults.some((fault) => fault.column === column);
        return (
          <div
            key={column}
            id={`${row.key}-${at}`}
            role="gridcell"
            tabIndex={-1}
            aria-colindex={gridColumn(at)}
            style={{ gridColumn: gridColumn(at), gridRow: 1 }}
            aria-selected={active}
            aria-invalid={wrong || undefined}
            onMouseDown={(event) => {
              if (active && editing !== null) return;
              event.preventDefault();
              onPick(at, active);
            }}
            className={cn(
              'relative flex min-w-0 items-center px-2',
              mono.has(column) && 'figures',
              row.cells.class !== '' && column === 'class' && row.cells.class !== 'none' && 'text-brass',
              active && 'outline-2 -outline-offset-2 outline-marking',
              wrong && 'bg-vermilion/10',
            )}
          >
            {active && editing !== null ? (
              <CellEditor column={column} initial={editing} onCommit={onCommit} onCancel={onCancel} />
            ) : (
              <span className="truncate">
                {column === 'nominal' || column === 'tolerance'
                  ? showStated(row.cells[column])
                  : row.cells[column]}
              </span>
            )}
            {wrong && (
              <svg
                aria-hidden="true"
                viewBox="0 0 8 8"
                className="absolute top-0 right-0 size-2 fill-vermilion"
              >
                <path d="M0 0h8v8z" />
              </svg>
            )}
          </div>
        );
      })}
      <div
        role="gridcell"
        aria-colindex={limitsColumn}
        style={{ gridColumn: limitsColumn, gridRow: 1 }}
        className="figures flex items-center px-2 text-pencil"
      >
        <span className="truncate">{limitsText(checked)}</span>
      </div>
      <div role="gridcell" aria-colindex={tableColumns.length + 2} className="flex items-center px-1">
        {onOpen && (
          <button
            type="button"
            tabIndex={-1}
            aria-label={`Open balloon ${row.cells.balloon} as a form`}
            onClick={onOpen}
            className="min-h-6 rounded px-2 text-[0.8125rem] text-marking hover:bg-marking/10"
          >
            Form
          </button>
        )}
      </div>
    </div>
  );
}

/** Digits with the reader's decimal sign, the words around them as they are. */
const showStated = (text: string): string => text.replace(/\d+\.\d+/g, (number) => showDecimal(number));

function limitsText(checked: CheckedRow | null): string {
  const limits = checked?.limits;
  if (!limits) return '';
  const lower = limits.lower === null || limits.naturalLower ? null : showDecimal(limits.lower);
  const upper = limits.upper === null ? null : showDecimal(limits.upper);
  if (lower !== null && upper !== null) return `${lower} … ${upper}`;
  if (upper !== null) return `≤ ${upper}`;
  return lower === null ? 'no limits' : `≥ ${lower}`;
}

interface CellEditorProps {
  column: TableColumn;
  initial: string;
  onCommit: TableLineProps['onCommit'];
  onCancel: () => void;
}

function CellEditor({ column, initial, onCommit, onCancel }: CellEditorProps) {
  const [text, setText] = useState(initial);
  const input = useRef<HTMLInputElement>(null);
  const left = useRef(false);
  useEffect(() => {
    const element = input.current;
    element?.focus();
    element?.setSelectionRange(element.value.length, element.value.length);
  }, []);
  const leave = (act: () => void) => {
    if (left.current) return;
    left.current = true;
    act();
  };
  const hear = (event: KeyboardEvent) => {
    event.stopPropagation();
    if (event.nativeEvent.isComposing) return;
    if (event.key === 'Enter') {
      event.preventDefault();
      leave(() => onCommit(text, event.shiftKey ? -1 : 1, 0));
    } else if (event.key === 'Tab') {
      event.preventDefault();
      leave(() => onCommit(text, 0, event.shiftKey ? -1 : 1));
    } else if (event.key === 'Escape') {
      event.preventDefault();
      leave(onCancel);
    }
  };
  const list = choices[column];
  const listId = list ? `choices-${column}` : undefined;
  return (
    <>
      <input
        ref={input}
        aria-label={columnWords[column]}
        list={listId}
        value={text}
        autoComplete="off"
        spellCheck={column === 'description'}
        onChange={(event) => setText(event.currentTarget.value)}
        onKeyDown={hear}
        onPaste={(event) => event.stopPropagation()}
        onCopy={(event) => event.stopPropagation()}
        onBlur={() => leave(() => onCommit(text, 0, 0))}
        className={cn('absolute inset-0 w-full bg-sheet px-2 outline-none', mono.has(column) && 'figures')}
      />
      {list && (
        <datalist id={listId}>
          {list.map((choice) => (
            <option key={choice} value={choice} />
          ))}
        </datalist>
      )}
    </>
  );
}
