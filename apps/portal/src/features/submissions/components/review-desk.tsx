import { useQuery } from '@tanstack/react-query';
import type { ReviewDeskItem } from '@trammel/shared/submissions';
import { useCallback, type ReactNode } from 'react';
import { useLocation } from 'react-router-dom';
import { Button } from '../../../components/ui/button.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { ListFooter } from '../../../components/ui/list-footer.tsx';
import { Loading, LoadFailure } from '../../../components/ui/loading.tsx';
import { PackageStateBadge } from '../../../components/ui/state-badge.tsx';
import { DueDay } from '../../../components/ui/time.tsx';
import { countOf } from '../../../lib/format.ts';
import { paths } from '../../../lib/paths.ts';
import { useUrlState } from '../../../lib/use-url-state.ts';
import { reviewDeskQuery } from '../api.ts';
import { DeskFilters } from './desk-filters.tsx';
import { RowTally } from './finding-tally.tsx';

const waiting = ['submitted', 'in-review'];

const columns: DataColumn<ReviewDeskItem>[] = [
  {
    id: 'partNumber',
    header: 'Part',
    sort: true,
    cell: (row) => (
      <>
        <span className="figures font-semibold">{row.partNumber}</span>{' '}
        <span className="figures">rev {row.revision}</span>
      </>
    ),
  },
  { id: 'partName', header: 'Description', wrap: true, from: 'lg', cell: (row) => row.partName },
  { id: 'supplierName', header: 'Supplier', wrap: true, cell: (row) => row.supplierName },
  {
    id: 'submittedAt',
    header: 'Waiting',
    sort: true,
    cell: (row) => {
      if (!waiting.includes(row.state)) return <span className="text-pencil">—</span>;
      return row.waitingDays === 0 ? 'since today' : countOf(row.waitingDays, 'day', 'days');
    },
  },
  {
    id: 'rows',
    header: 'Needs a human',
    wrap: true,
    cell: (row) => {
      if (waiting.includes(row.state)) return <RowTally {...row} />;
      return <span className="text-pencil">{row.submittedAt === null ? 'not submitted yet' : '—'}</span>;
    },
  },
  {
    id: 'deviationsOpen',
    header: 'Deviations asked',
    align: 'end',
    from: 'md',
    cell: (row) => <span className="figures">{row.deviationsOpen}</span>,
  },
  {
    id: 'dueOn',
    header: 'Due',
    sort: true,
    from: 'md',
    cell: (row) => <DueDay on={row.dueOn} settled={row.submittedAt !== null || row.state === 'withdrawn'} />,
  },
  {
    id: 'state',
    header: 'State',
    cell: (row) => (
      <span className="inline-flex flex-wrap items-center gap-x-2">
        <PackageStateBadge state={row.state} />
        {row.round > 1 && <span className="text-pencil">round {row.round}</span>}
        {row.questionOpen && <span className="text-plum">question open</span>}
      </span>
    ),
  },
  { id: 'reviewers', header: 'Reviewers', wrap: true, from: 'xl', cell: (row) => row.reviewers.join(', ') },
];

/** `start` is what the person may do when nothing waits: begin a request. */
export function ReviewDesk({ start }: { start: ReactNode }) {
  const [view, change] = useUrlState({ q: '', state: '', show: 'waiting', sort: 'submittedAt', cursor: '' });
  const { data, error, isPending, isPlaceholderData, refetch } = useQuery(reviewDeskQuery(view));
  const { pathname } = useLocation();
  const onFilter = useCallback((patch: Partial<typeof view>) => change(patch), [change]);
  const narrowed = view.q !== '' || view.state !== '';

  return (
    <>
      <DeskFilters
        {...view}
        searchHint="Part, description, supplier"
        shows={[
          { value: 'waiting', label: 'What waits for us' },
          { value: 'all', label: 'Everything' },
        ]}
        onChange={onFilter}
      />
      {isPending && <Loading label="Loading the review desk" />}
      {error && <LoadFailure what="The review desk" error={error} onRetry={() => void refetch()} />}
      {data && (
        <DataTable
          caption="Packages by age"
          columns={columns}
          rows={data.items}
          rowId={(row) => row.id}
          rowHref={(row) => paths.submission(row.id)}
          sort={view.sort}
          onSort={(sort) => change({ sort })}
          refreshing={isPlaceholderData}
          rowTone={(row) => (row.out > 0 && waiting.includes(row.state) ? 'attention' : undefined)}
          empty={
            narrowed ? (
              <EmptyState
                title="No package matches"
                actions={<Button onClick={() => change({ q: '', state: '' })}>Clear search and state</Button>}
              >
                Search looks at part number, description and supplier. Packages with the supplier show under
                Everything.
              </EmptyState>
            ) : (
              <EmptyState title="Nothing waits for a decision" actions={start}>
                A package appears here when its supplier signs the warrant. Packages still in preparation show
                under Everything.
              </EmptyState>
            )
          }
        />
      )}
      {data && (data.items.length > 0 || view.cursor !== '') && (
        <ListFooter
          shown={data.items.length}
          one="package"
          many="packages"
          nextCursor={data.nextCursor}
          cursor={view.cursor}
          onCursor={(cursor) => change({ cursor }, { push: true })}
          firstPage={pathname}
        />
      )}
    </>
  );
}
