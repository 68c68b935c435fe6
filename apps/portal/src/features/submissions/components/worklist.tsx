import { useQuery } from '@tanstack/react-query';
import type { WorklistItem } from '@trammel/shared/submissions';
import { useCallback } from 'react';
import { useLocation } from 'react-router-dom';
import { Button } from '../../../components/ui/button.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { ListFooter } from '../../../components/ui/list-footer.tsx';
import { Loading, LoadFailure } from '../../../components/ui/loading.tsx';
import { PackageStateBadge } from '../../../components/ui/state-badge.tsx';
import { DueDay } from '../../../components/ui/time.tsx';
import { paths } from '../../../lib/paths.ts';
import { useUrlState } from '../../../lib/use-url-state.ts';
import { worklistQuery } from '../api.ts';
import { DeskFilters } from './desk-filters.tsx';
import { FindingTally } from './finding-tally.tsx';

/** The due date is that of handing in: it presses until the supplier has, and again when the package came back. */
const pressing = ['requested', 'in-preparation', 'sent-back', 'rejected'];

const columns: DataColumn<WorklistItem>[] = [
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
  {
    id: 'nextStep',
    header: 'Next step',
    wrap: true,
    cell: (row) =>
      row.nextStep ?? (
        <span className="text-pencil">
          {row.holder === 'Nobody' ? 'Nothing more to do' : `Lies with ${row.holder}`}
        </span>
      ),
  },
  {
    id: 'findings',
    header: 'Open findings',
    wrap: true,
    cell: (row) => (row.state === 'in-preparation' ? <FindingTally {...row.findings} /> : '—'),
  },
  {
    id: 'measured',
    header: 'Rows measured',
    align: 'end',
    from: 'md',
    cell: (row) => (
      <span className="figures">
        {row.measured.done} of {row.measured.of}
      </span>
    ),
  },
  {
    id: 'dueOn',
    header: 'Due',
    sort: true,
    cell: (row) => <DueDay on={row.dueOn} settled={!pressing.includes(row.state)} />,
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
  { id: 'customerName', header: 'Customer', from: 'md', cell: (row) => row.customerName },
];

export function Worklist() {
  const [view, change] = useUrlState({ q: '', state: '', show: 'open', sort: 'dueOn', cursor: '' });
  const { data, error, isPending, isPlaceholderData, refetch } = useQuery(worklistQuery(view));
  const { pathname } = useLocation();
  const onFilter = useCallback((patch: Partial<typeof view>) => change(patch), [change]);
  const narrowed = view.q !== '' || view.state !== '';

  return (
    <>
      <DeskFilters
        {...view}
        searchHint="Part, description, customer"
        shows={[
          { value: 'open', label: 'What is open' },
          { value: 'all', label: 'Everything' },
        ]}
        onChange={onFilter}
      />
      {isPending && <Loading label="Loading the worklist" />}
      {error && <LoadFailure what="The worklist" error={error} onRetry={() => void refetch()} />}
      {data && (
        <DataTable
          caption="Packages by due date"
          columns={columns}
          rows={data.items}
          rowId={(row) => row.id}
          rowHref={(row) =>
            row.state === 'requested' ? paths.request(row.requestId) : paths.submission(row.id)
          }
          sort={view.sort}
          onSort={(sort) => change({ sort })}
          refreshing={isPlaceholderData}
          rowTone={(row) =>
            row.findings.stops > 0 && row.state === 'in-preparation' ? 'attention' : undefined
          }
          empty={
            narrowed ? (
              <EmptyState
                title="No package matches"
                actions={<Button onClick={() => change({ q: '', state: '' })}>Clear search and state</Button>}
              >
                Search looks at part number, description and customer. Packages already settled show under
                Everything.
              </EmptyState>
            ) : (
              <EmptyState title="Nothing is owed">
                A customer starts a package by issuing a request; it appears here, and you get a mail.
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
