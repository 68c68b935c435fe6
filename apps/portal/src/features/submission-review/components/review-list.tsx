import { useVirtualizer } from '@tanstack/react-virtual';
import { memo, useEffect, useMemo, useRef } from 'react';
import type { ReviewRow } from '@trammel/shared/submission-review';
import { Beam } from '../../../components/charts/beam.tsx';
import { VerdictMark } from '../../../components/ui/verdict-mark.tsx';
import { cn } from '../../../lib/cn.ts';
import { beamOf, limitsInWords } from '../review-beam.ts';
import { MarkBadge } from './mark-badge.tsx';

interface ReviewListProps {
  rows: readonly ReviewRow[];
  selectedId: string | null;
  onSelect: (id: string) => void;
  /** More rows lie behind the last one shown. */
  onEnd: () => void;
}

const rowHeight = 44;

/** One row a characteristic: its beam over all streams, its verdict and the mark it has. Rows out of view are not drawn. */
export function ReviewList({ rows, selectedId, onSelect, onEnd }: ReviewListProps) {
  const scroller = useRef<HTMLDivElement>(null);
  const list = useVirtualizer({
    count: rows.length,
    getScrollElement: () => scroller.current,
    estimateSize: () => rowHeight,
    overscan: 10,
  });
  const selected = rows.findIndex((row) => row.characteristic.id === selectedId);
  const items = list.getVirtualItems();
  const last = items.at(-1)?.index ?? 0;
  useEffect(() => {
    if (selected >= 0) list.scrollToIndex(selected);
  }, [selected, list]);
  useEffect(() => {
    if (last >= rows.length - 15) onEnd();
  }, [last, rows.length, onEnd]);
  return (
    <div
      ref={scroller}
      role="listbox"
      aria-label="Characteristics"
      tabIndex={0}
      aria-activedescendant={selectedId === null ? undefined : `row-${selectedId}`}
      className="max-h-[min(74vh,50rem)] overflow-y-auto border border-rule bg-sheet"
    >
      <div className="relative" style={{ height: list.getTotalSize() }}>
        {items.map((item) => {
          const row = rows[item.index];
          return row ? (
            <ListRow
              key={row.characteristic.id}
              row={row}
              top={item.start}
              index={item.index}
              count={rows.length}
              selected={item.index === selected}
              onSelect={onSelect}
            />
          ) : null;
        })}
      </div>
    </div>
  );
}

interface ListRowProps {
  row: ReviewRow;
  top: number;
  index: number;
  count: number;
  selected: boolean;
  onSelect: (id: string) => void;
}

const ListRow = memo(function ListRow({ row, top, index, count, selected, onSelect }: ListRowProps) {
  const { characteristic: facts } = row;
  const beam = useMemo(() => beamOf(facts, row.results), [facts, row.results]);
  const special = facts.class !== 'none';
  const out = row.checked.reduce((sum, checked) => sum + checked.outCount, 0);
  return (
    <div
      id={`row-${facts.id}`}
      role="option"
      tabIndex={-1}
      aria-selected={selected}
      aria-posinset={index + 1}
      aria-setsize={count}
      className={cn(
        'absolute inset-x-0 grid cursor-pointer grid-cols-[2.5rem_minmax(0,1fr)_auto] items-center gap-x-2 border-b border-rule px-2 sm:grid-cols-[2.5rem_minmax(0,1fr)_8rem_9.25rem_1.25rem]',
        selected ? 'bg-marking/10 outline-2 -outline-offset-2 outline-marking' : 'hover:bg-marking/5',
      )}
      style={{ height: rowHeight, transform: `translateY(${top}px)` }}
      onClick={() => onSelect(facts.id)}
      onKeyDown={(event) => event.key === 'Enter' && onSelect(facts.id)}
    >
      <span
        className={cn(
          'figures justify-self-start rounded-full border px-1.5',
          special ? 'border-2 border-brass font-semibold text-brass' : 'border-pencil',
        )}
      >
        {facts.balloon}
      </span>
      <span className="min-w-0 leading-4">
        <span className="block truncate">{facts.description}</span>
        <span className="block truncate text-[12px] text-pencil">
          <span className="figures">{limitsInWords(facts)}</span>
          {row.change !== null && row.change !== 'same' && (
            <span className="ml-2 text-plum">{changeWords[row.change]}</span>
          )}
        </span>
      </span>
      <Beam name={`Balloon ${facts.balloon}`} decorative className="hidden w-32 sm:block" {...beam} />
      <span className="hidden sm:block">
        <VerdictMark verdict={row.verdict} detail={out > 0 ? String(out) : undefined} />
      </span>
      <span className="flex items-center gap-2">
        <span className="sm:hidden">
          <VerdictMark verdict={row.verdict} compact />
        </span>
        <MarkBadge mark={row.decision.mark} compact />
      </span>
    </div>
  );
});

const changeWords = { new: 'new', readings: 'measured again', limits: 'limits changed', same: '' } as const;
