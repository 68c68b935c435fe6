import { useSuspenseInfiniteQuery, useQueryClient } from '@tanstack/react-query';
import { useCallback, useRef, useState, type ReactNode } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { ConfirmDialog } from '../../../components/ui/confirm-dialog.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { draftKey } from '../../../lib/draft-storage.ts';
import { countOf } from '../../../lib/format.ts';
import { useSession } from '../../../lib/session.ts';
import { useKeys } from '../../../lib/use-keys.ts';
import { useUrlState } from '../../../lib/use-url-state.ts';
import { acceptCleanRows, reviewQuery } from '../api.ts';
import { DecisionForm, type DecisionHandle } from './decision-form.tsx';
import { MarkBadge } from './mark-badge.tsx';
import { ReviewList } from './review-list.tsx';
import { RowDetail } from './row-detail.tsx';

interface ReviewWorkspaceProps {
  submissionId: string;
  mayReview: boolean;
  deviationsHref: string;
  /** The drawing, drawn when it is asked for. */
  drawing: ((onClose: () => void) => ReactNode) | null;
}

const shows = [
  ['all', 'All'],
  ['open', 'Not marked'],
  ['out', 'Out of tolerance'],
  ['undecided', 'Undecided'],
  ['special', 'Special'],
  ['refused', 'Refused'],
  ['questioned', 'Questioned'],
  ['changed', 'Changed since the last round'],
] as const;

/** Rows on the left, the one in hand beside them, the drawing within reach; marked with the keyboard, clean rows in bulk. */
export function ReviewWorkspace({ submissionId, mayReview, deviationsHref, drawing }: ReviewWorkspaceProps) {
  const { user } = useSession();
  const client = useQueryClient();
  const [view, change] = useUrlState({ show: 'all', order: 'attention', row: '', drawing: '' });
  const query = useSuspenseInfiniteQuery(reviewQuery(submissionId, { show: view.show, order: view.order }));
  const decision = useRef<DecisionHandle>(null);
  const [bulk, setBulk] = useState(false);
  const rows = query.data.pages.flatMap((page) => page.rows);
  const first = query.data.pages[0];
  const index = Math.max(
    0,
    rows.findIndex((row) => row.characteristic.balloon === view.row),
  );
  const row = rows[index];
  const select = useCallback(
    (balloon: string | undefined) => balloon !== undefined && change({ row: balloon }),
    [change],
  );
  const go = (by: number) =>
    select(rows[Math.min(Math.max(index + by, 0), rows.length - 1)]?.characteristic.balloon);
  const refresh = () => client.invalidateQueries({ queryKey: ['submission', submissionId] });
  const onEnd = useCallback(() => {
    if (query.hasNextPage && !query.isFetchingNextPage) void query.fetchNextPage();
  }, [query]);
  const nextOpen = () => {
    const following = [...rows.slice(index + 1), ...rows.slice(0, index)];
    select(following.find((candidate) => candidate.decision.mark === null)?.characteristic.balloon);
  };
  useKeys('Review', [
    { keys: 'j', label: 'Next row', run: () => go(1) },
    { keys: 'k', label: 'Row before', run: () => go(-1) },
    { keys: 'n', label: 'Next row that is not marked', run: nextOpen },
    ...(mayReview
      ? [
          { keys: 'a', label: 'Accept', run: () => decision.current?.mark('accepted') },
          { keys: 'r', label: 'Refuse', run: () => decision.current?.mark('refused') },
          { keys: 'q', label: 'Ask the supplier', run: () => decision.current?.mark('questioned') },
          { keys: 'u', label: 'Take the mark back', run: () => decision.current?.mark(null) },
          { keys: 'm', label: 'Write a remark', run: () => decision.current?.focusRemark() },
        ]
      : []),
    ...(drawing
      ? [
          {
            keys: 'd',
            label: 'Show or hide the drawing',
            run: () => change({ drawing: view.drawing === '' ? 'yes' : '' }),
          },
        ]
      : []),
  ]);
  if (!first) return null;
  const clean = rows.filter((candidate) => candidate.clean && candidate.decision.mark === null);
  return (
    <div className="flex flex-col gap-3">
      <div className="flex flex-wrap items-end gap-3">
        <SelectField
          id="review-show"
          label="Show"
          value={view.show}
          onChange={(show) => change({ show, row: '' })}
          options={shows.map(([value, label]) => ({ value, label: `${label} (${first.counts[value]})` }))}
        />
        <SelectField
          id="review-order"
          label="Order"
          value={view.order}
          onChange={(order) => change({ order })}
          options={[
            { value: 'attention', label: 'What needs a person first' },
            { value: 'balloon', label: 'As on the drawing' },
          ]}
        />
        {mayReview && (
          <Button weight="plain" disabled={clean.length === 0} onClick={() => setBulk(true)}>
            Accept {countOf(clean.length, 'clean row', 'clean rows')}
          </Button>
        )}
        {drawing && (
          <Button
            weight="plain"
            aria-pressed={view.drawing !== ''}
            onClick={() => change({ drawing: view.drawing === '' ? 'yes' : '' })}
          >
            Drawing
          </Button>
        )}
        <p className="ml-auto self-center text-pencil" role="status">
          {first.counts.all - first.counts.open} of {first.counts.all} marked
        </p>
      </div>
      {row === undefined ? (
        <EmptyState title="No row fits this view">
          Choose another view above; nothing has been lost.
        </EmptyState>
      ) : (
        <div className="grid items-start gap-3 lg:grid-cols-[minmax(0,5fr)_minmax(0,6fr)]">
          <ReviewList
            rows={rows}
            selectedId={row.characteristic.id}
            onSelect={(id) =>
              select(rows.find((candidate) => candidate.characteristic.id === id)?.characteristic.balloon)
            }
            onEnd={onEnd}
          />
          <div className="flex min-w-0 flex-col gap-3">
            <RowDetail
              row={row}
              streams={first.streams}
              pieces={first.pieces}
              deviationsHref={deviationsHref}
              decision={
                mayReview ? (
                  <DecisionForm
                    key={`${row.characteristic.id} ${row.decision.version}`}
                    submissionId={submissionId}
                    row={row}
                    draft={draftKey(user.id, `mark.${submissionId}.${row.characteristic.id}`)}
                    handle={decision}
                    onDecided={(next) => {
                      if (next) go(1);
                      void refresh();
                    }}
                    onStale={() => void refresh()}
                  />
                ) : (
                  <p className="flex flex-wrap gap-x-3 border-t border-rule pt-3">
                    <MarkBadge mark={row.decision.mark} /> {row.decision.remark}
                  </p>
                )
              }
            />
            {view.drawing !== '' && drawing?.(() => change({ drawing: '' }))}
          </div>
        </div>
      )}
      <ConfirmDialog
        open={bulk}
        onClose={() => setBulk(false)}
        title={`Accept ${countOf(clean.length, 'clean row', 'clean rows')}`}
        consequence="Clean rows are in tolerance in every stream, not special, and carry no finding for the reviewer. Special, failing and undecided rows are left for you, one by one."
        confirmLabel="Accept them"
        onConfirm={async () => {
          const answer = await acceptCleanRows(
            submissionId,
            clean.map((candidate) => candidate.characteristic.id),
          );
          showToast({
            text: `${countOf(answer.decisions.length, 'row', 'rows')} accepted, ${answer.remaining} left`,
          });
          await refresh();
        }}
      />
    </div>
  );
}
