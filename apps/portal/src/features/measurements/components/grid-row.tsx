import { memo, useSyncExternalStore, type ReactNode } from 'react';
import type { VirtualItem } from '@tanstack/react-virtual';
import type { SheetCharacteristic } from '@trammel/shared/measurements';
import { cn } from '../../../lib/cn.ts';
import type { Column, SheetModel } from '../sheet-model.ts';
import { CellMark, cellInWords } from './cell-mark.tsx';
import { RowBeam } from './row-beam.tsx';
import { layout } from './grid-layout.ts';

interface GridRowProps {
  model: SheetModel;
  facts: SheetCharacteristic;
  rowIndex: number;
  top: number;
  columns: readonly VirtualItem[];
  narrow: boolean;
  activeColumn: number;
  /** Selected columns of this row; -1 when none is. */
  selectedFrom: number;
  selectedTo: number;
  /** The one editor, when it stands in this row. */
  editor: ReactNode;
  onPoint: (row: number, column: number, extend: boolean) => void;
  onOpen: (row: number, column: number) => void;
}

export const cellId = (row: number, column: number) => `reading-${row}-${column}`;

/** One characteristic: its head stands still at the left, its readings run with the columns that are in view. */
export const GridRow = memo(function GridRow(props: GridRowProps) {
  const {
    model,
    facts,
    rowIndex,
    top,
    columns,
    narrow,
    activeColumn,
    selectedFrom,
    selectedTo,
    editor,
    onPoint,
    onOpen,
  } = props;
  const version = useSyncExternalStore(model.subscribe, () => model.rowVersion(facts.id));
  const head = narrow ? layout.narrowHead : layout.head;
  return (
    <div
      role="row"
      aria-rowindex={rowIndex + 2}
      className="absolute left-0 flex h-row border-b border-rule"
      style={{ transform: `translateY(${top}px)`, width: head + model.columns.length * layout.cell }}
    >
      <div
        role="rowheader"
        aria-colindex={1}
        className="sticky left-0 z-10 flex h-full items-center gap-2 overflow-hidden border-r border-rule bg-sheet px-2"
        style={{ width: head }}
      >
        <Balloon facts={facts} />
        {!narrow && (
          <>
            <span className="min-w-0 flex-1 truncate" title={facts.description}>
              {facts.description}
            </span>
            <span className="figures shrink-0 text-[12px] text-pencil">{limitsInWords(facts)}</span>
            <RowBeam model={model} facts={facts} version={version} />
          </>
        )}
      </div>
      {columns.map((item) => {
        const column = model.columns[item.index];
        if (!column) return null;
        const isSelected = item.index >= selectedFrom && item.index <= selectedTo;
        return (
          <ReadingCell
            key={column.piece.id}
            model={model}
            facts={facts}
            column={column}
            rowIndex={rowIndex}
            columnIndex={item.index}
            left={head + item.start}
            active={item.index === activeColumn}
            selected={isSelected}
            onPoint={onPoint}
            onOpen={onOpen}
          />
        );
      })}
      {editor}
    </div>
  );
});

interface ReadingCellProps {
  model: SheetModel;
  facts: SheetCharacteristic;
  column: Column;
  rowIndex: number;
  columnIndex: number;
  left: number;
  active: boolean;
  selected: boolean;
  onPoint: GridRowProps['onPoint'];
  onOpen: GridRowProps['onOpen'];
}

function ReadingCell({
  model,
  facts,
  column,
  rowIndex,
  columnIndex,
  left,
  active,
  selected,
  onPoint,
  onOpen,
}: ReadingCellProps) {
  const cell = model.cell(facts, column);
  return (
    <div
      id={cellId(rowIndex, columnIndex)}
      role="gridcell"
      tabIndex={-1}
      aria-colindex={columnIndex + 2}
      aria-selected={selected}
      aria-label={
        active
          ? `Balloon ${facts.balloon}, ${column.streamName}, piece ${column.piece.label}: ${cellInWords(cell)}`
          : undefined
      }
      title={cell.reason ?? undefined}
      className={cn(
        'absolute flex h-full items-center justify-end gap-1 border-r px-1.5 select-none',
        column.firstOfStream ? 'border-l border-l-pencil border-r-rule' : 'border-r-rule',
        selected && 'bg-marking/10',
        active && 'outline-2 -outline-offset-2 outline-marking',
        cell.state === 'unsaved' && 'italic',
        cell.state === 'conflict' && 'bg-plum/15',
        'figures',
        cell.mark === 'o' || cell.mark === 'r'
          ? 'text-vermilion'
          : cell.mark === 'u'
            ? 'text-plum'
            : 'text-graphite',
      )}
      style={{ left, width: layout.cell }}
      onPointerDown={(event) => onPoint(rowIndex, columnIndex, event.shiftKey)}
      onPointerEnter={(event) => event.buttons === 1 && onPoint(rowIndex, columnIndex, true)}
      onDoubleClick={() => onOpen(rowIndex, columnIndex)}
    >
      <CellMark mark={cell.mark} />
      <span className="truncate">{cell.text ?? ''}</span>
    </div>
  );
}

function Balloon({ facts }: { facts: SheetCharacteristic }) {
  const special = facts.class !== 'none';
  return (
    <span
      className={cn(
        'figures inline-flex h-6 min-w-6 shrink-0 items-center justify-center rounded-full border px-1 text-[12px]',
        special ? 'border-2 border-brass font-semibold text-brass' : 'border-pencil',
      )}
      title={special ? `${facts.class.replace('-', ' or ')} characteristic` : undefined}
    >
      {facts.balloon}
      {special && <span className="sr-only">, {facts.class.replace('-', ' or ')}</span>}
    </span>
  );
}

export function limitsInWords(
  facts: Pick<SheetCharacteristic, 'lowerLimit' | 'upperLimit' | 'unit' | 'kind' | 'nominal'>,
): string {
  const { lowerLimit, upperLimit, unit } = facts;
  const shown = unit === '1' ? '' : ` ${unit}`;
  if (lowerLimit !== null && upperLimit !== null) return `${lowerLimit}…${upperLimit}${shown}`;
  if (upperLimit !== null) return `≤ ${upperLimit}${shown}`;
  if (lowerLimit !== null) return `≥ ${lowerLimit}${shown}`;
  return facts.nominal === null ? 'pass or fail' : `(${facts.nominal})${shown}`;
}
