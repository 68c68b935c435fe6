import type { VirtualItem } from '@tanstack/react-virtual';
import { cn } from '../../../lib/cn.ts';
import type { SheetModel } from '../sheet-model.ts';
import { layout } from './grid-layout.ts';

/** Streams over their pieces; stays in view while the rows run beneath. */
export function GridHeader({
  model,
  columns,
  narrow,
}: {
  model: SheetModel;
  columns: readonly VirtualItem[];
  narrow: boolean;
}) {
  const head = narrow ? layout.narrowHead : layout.head;
  return (
    <div
      role="row"
      aria-rowindex={1}
      className="sticky top-0 z-20 border-b border-pencil bg-sheet text-[12px]"
      style={{ height: layout.header, width: head + model.columns.length * layout.cell }}
    >
      <div
        role="columnheader"
        aria-colindex={1}
        className="sticky left-0 z-10 flex h-full items-end gap-2 border-r border-rule bg-sheet px-2 pb-1 text-pencil"
        style={{ width: head }}
      >
        {narrow ? 'No.' : 'Characteristic and limits'}
      </div>
      {columns.map((item) => {
        const column = model.columns[item.index];
        if (!column) return null;
        const stream = model.streams.find((candidate) => candidate.id === column.streamId);
        return (
          <div
            key={column.piece.id}
            role="columnheader"
            aria-colindex={item.index + 2}
            aria-label={`${column.streamName}, piece ${column.piece.label}${stream?.blocked ? ', blocked' : ''}`}
            className={cn(
              'absolute top-0 flex h-full flex-col justify-end border-r border-rule px-1.5 pb-1 text-right',
              column.firstOfStream && 'border-l border-l-pencil',
            )}
            style={{ left: head + item.start, width: layout.cell }}
          >
            {column.firstOfStream && (
              <span className="absolute top-1 left-1.5 w-max font-semibold whitespace-nowrap text-graphite">
                {column.streamName}
                {stream?.blocked && <span className="ml-1 font-normal text-vermilion">blocked</span>}
              </span>
            )}
            <span className="figures truncate">{column.piece.label}</span>
          </div>
        );
      })}
    </div>
  );
}
