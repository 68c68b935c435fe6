import { useVirtualizer } from '@tanstack/react-virtual';
import { useEffect, useRef, useState, type KeyboardEvent, type ReactNode } from 'react';
import { useKeys } from '../../../lib/use-keys.ts';
import { formatBlock, parseBlock } from '../clipboard-block.ts';
import { isWithin, moveTo, rangeOf, stepAlong, type Place, type Selection } from '../grid-selection.ts';
import type { SheetModel } from '../sheet-model.ts';
import type { UndoStack } from '../undo-stack.ts';
import { CellEditor, type EditorExit } from './cell-editor.tsx';
import { GridHeader } from './grid-header.tsx';
import { cellId, GridRow } from './grid-row.tsx';
import { gridKeys } from './grid-keys.ts';
import { layout } from './grid-layout.ts';
import { useStableActs } from './use-stable-acts.ts';

interface MeasurementGridProps {
  model: SheetModel;
  undo: UndoStack;
  editable: boolean;
  /** Rows in view, by their place among all characteristics. */
  shown: readonly number[];
  active: Place;
  onActive: (place: Place) => void;
  onSaveNow: () => void;
  announce: (text: string) => void;
}

const pageRows = 12;

/** Readings as a sheet: arrows, Enter, Tab, a block from the clipboard, fill down, undo. Rows and columns out of view are not drawn. */
export function MeasurementGrid({
  model,
  undo,
  editable,
  shown,
  active,
  onActive,
  onSaveNow,
  announce,
}: MeasurementGridProps) {
  const scroller = useRef<HTMLDivElement>(null);
  const [selection, setSelection] = useState<Selection>({ active, anchor: active });
  const [editing, setEditing] = useState<string | null>(null);
  const [narrow, setNarrow] = useState(() => window.matchMedia('(max-width: 760px)').matches);
  useEffect(() => {
    const media = window.matchMedia('(max-width: 760px)');
    const hear = () => setNarrow(media.matches);
    media.addEventListener('change', hear);
    return () => media.removeEventListener('change', hear);
  }, []);
  const size = { rows: shown.length, columns: model.columns.length };
  const rows = useVirtualizer({
    count: size.rows,
    getScrollElement: () => scroller.current,
    estimateSize: () => layout.row,
    overscan: 8,
    scrollPaddingStart: layout.header,
  });
  const columns = useVirtualizer({
    horizontal: true,
    count: size.columns,
    getScrollElement: () => scroller.current,
    estimateSize: () => layout.cell,
    overscan: 4,
    scrollPaddingStart: narrow ? layout.narrowHead : layout.head,
  });
  useKeys('Measurement grid', gridKeys);

  const go = (to: Place, extend = false) => {
    const next = moveTo(selection, to, size, extend);
    setSelection(next);
    onActive(next.active);
    rows.scrollToIndex(next.active.row);
    columns.scrollToIndex(next.active.column);
  };
  const factsAt = (row: number) => model.characteristics[shown[row] ?? -1];

  const write = (block: readonly (readonly (string | null)[])[], at: Place): number => {
    const changes = block.flatMap((texts, down) =>
      texts.flatMap((text, across) => {
        const facts = factsAt(at.row + down);
        const column = model.columns[at.column + across];
        return facts && column ? [{ facts, column, text: text === '' ? null : text }] : [];
      }),
    );
    undo.edit(changes);
    return changes.length;
  };
  const range = rangeOf(selection);
  const selectedTexts = () =>
    Array.from({ length: range.bottom - range.top + 1 }, (_, down) =>
      Array.from({ length: range.right - range.left + 1 }, (_, across) => {
        const facts = factsAt(range.top + down);
        const column = model.columns[range.left + across];
        return facts && column ? model.text(facts.id, column) : null;
      }),
    );
  const clear = () =>
    announce(
      `${write(
        selectedTexts().map((row) => row.map(() => null)),
        { row: range.top, column: range.left },
      )} readings cleared`,
    );
  const fillDown = () => {
    const [first] = selectedTexts();
    if (!first || range.bottom === range.top) return;
    const copies = Array.from({ length: range.bottom - range.top }, () => first);
    announce(`${write(copies, { row: range.top + 1, column: range.left })} readings filled`);
  };

  const finish = (text: string, exit: EditorExit) => {
    setEditing(null);
    scroller.current?.focus();
    const { row, column } = selection.active;
    if (exit !== 'cancel') write([[text.trim()]], selection.active);
    if (exit === 'down') go({ row: row + 1, column });
    if (exit === 'up') go({ row: row - 1, column });
    if (exit === 'right') go(stepAlong(selection.active, 1, size));
    if (exit === 'left') go(stepAlong(selection.active, -1, size));
  };

  const open = (row: number, column: number) => {
    const facts = factsAt(row);
    const target = model.columns[column];
    if (editable && facts && target) setEditing(model.text(facts.id, target) ?? '');
  };

  const onKeyDown = (event: KeyboardEvent) => {
    const { row, column } = selection.active;
    const command = event.ctrlKey || event.metaKey;
    const steps: Record<string, Place> = {
      ArrowDown: { row: command ? size.rows - 1 : row + 1, column },
      ArrowUp: { row: command ? 0 : row - 1, column },
      ArrowRight: { row, column: command ? size.columns - 1 : column + 1 },
      ArrowLeft: { row, column: command ? 0 : column - 1 },
      PageDown: { row: row + pageRows, column },
      PageUp: { row: row - pageRows, column },
      Home: { row: command ? 0 : row, column: 0 },
      End: { row: command ? size.rows - 1 : row, column: size.columns - 1 },
    };
    const step = steps[event.key];
    const taken = (): boolean => {
      if (step) go(step, event.shiftKey);
      else if (event.key === 'Tab') {
        const next = stepAlong(selection.active, event.shiftKey ? -1 : 1, size);
        // At either end Tab leaves the grid.
        if (next === selection.active) return false;
        go(next);
      } else if (!editable) return false;
      else if (command && event.key.toLowerCase() === 'z')
        announce(
          `${event.shiftKey ? undo.redo() : undo.undo()} readings ${event.shiftKey ? 'done again' : 'taken back'}`,
        );
      else if (command && event.key.toLowerCase() === 'y') announce(`${undo.redo()} readings done again`);
      else if (command && event.key.toLowerCase() === 'd') fillDown();
      else if (command && event.key.toLowerCase() === 's') onSaveNow();
      else if (event.key === 'Delete' || event.key === 'Backspace') clear();
      else if (event.key === 'Enter' || event.key === 'F2') open(row, column);
      else if (event.key.length === 1 && !command && !event.altKey) setEditing(event.key);
      else return false;
      return true;
    };
    if (taken()) event.preventDefault();
  };

  const point = (row: number, column: number, extend: boolean) => {
    scroller.current?.focus();
    setSelection((before) => moveTo(before, { row, column }, size, extend));
    if (!extend) onActive({ row, column });
  };
  const acts = useStableActs({ point, open });
  const visibleColumns = columns.getVirtualItems();
  const head = narrow ? layout.narrowHead : layout.head;
  const editorFor = (row: number): ReactNode => {
    if (editing === null || row !== selection.active.row) return null;
    const column = model.columns[selection.active.column];
    return (
      <CellEditor
        label={`Reading of balloon ${factsAt(row)?.balloon ?? ''}, ${column?.streamName ?? ''}, piece ${column?.piece.label ?? ''}`}
        initial={editing}
        left={head + selection.active.column * layout.cell}
        onDone={finish}
      />
    );
  };

  return (
    <div
      ref={scroller}
      role="grid"
      tabIndex={0}
      aria-label="Readings by characteristic and piece"
      aria-rowcount={size.rows + 1}
      aria-colcount={size.columns + 1}
      aria-multiselectable="true"
      aria-readonly={!editable}
      aria-activedescendant={cellId(selection.active.row, selection.active.column)}
      className="relative max-h-[min(70vh,46rem)] overflow-auto border border-rule bg-sheet text-[13px] focus-visible:outline-2 focus-visible:outline-marking"
      onKeyDown={onKeyDown}
      onCopy={(event) => {
        if (editing !== null) return;
        event.clipboardData.setData('text/plain', formatBlock(selectedTexts()));
        event.preventDefault();
      }}
      onPaste={(event) => {
        if (editing !== null || !editable) return;
        event.preventDefault();
        const block = parseBlock(event.clipboardData.getData('text/plain'));
        announce(`${write(block, { row: range.top, column: range.left })} readings pasted`);
      }}
    >
      <GridHeader model={model} columns={visibleColumns} narrow={narrow} />
      <div
        role="rowgroup"
        className="relative"
        style={{ height: rows.getTotalSize(), width: head + size.columns * layout.cell }}
      >
        {rows.getVirtualItems().map((item) => {
          const facts = factsAt(item.index);
          if (!facts) return null;
          const inRange = isWithin(range, item.index, range.left);
          return (
            <GridRow
              key={facts.id}
              model={model}
              facts={facts}
              rowIndex={item.index}
              top={item.start}
              columns={visibleColumns}
              narrow={narrow}
              activeColumn={item.index === selection.active.row ? selection.active.column : -1}
              selectedFrom={inRange ? range.left : -1}
              selectedTo={inRange ? range.right : -1}
              editor={editorFor(item.index)}
              onPoint={acts.point}
              onOpen={acts.open}
            />
          );
        })}
      </div>
    </div>
  );
}
