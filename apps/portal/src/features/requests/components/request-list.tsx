import { useQuery } from '@tanstack/react-query';
import { requestStates } from '@trammel/shared/status';
import type { RequestListItem } from '@trammel/shared/requests';
import { useEffect, useState, type ReactNode } from 'react';
import { useLocation } from 'react-router-dom';
import { Button } from '../../../components/ui/button.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { ListFooter } from '../../../components/ui/list-footer.tsx';
import { Loading, LoadFailure } from '../../../components/ui/loading.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { PackageStateBadge } from '../../../components/ui/state-badge.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { DueDay, Moment } from '../../../components/ui/time.tsx';
import { paths } from '../../../lib/paths.ts';
import { useUrlState } from '../../../lib/use-url-state.ts';
import { requestListQuery } from '../api.ts';
import { requestStateWords } from '../words.ts';

const columns: DataColumn<RequestListItem>[] = [
  {
    id: 'part',
    header: 'Part',
    cell: (row) => (
      <>
        <span className="figures font-semibold">{row.partNumber}</span>{' '}
        <span className="figures">rev {row.revision}</span>
      </>
    ),
  },
  { id: 'name', header: 'Description', wrap: true, from: 'lg', cell: (row) => row.partName },
  {
    id: 'number',
    header: 'Request',
    align: 'end',
    cell: (row) => <span className="figures">{row.number}</span>,
  },
  {
    id: 'other',
    header: 'With',
    wrap: true,
    cell: (row) => (row.side === 'customer' ? `to ${row.supplierName}` : `from ${row.customerName}`),
  },
  {
    id: 'state',
    header: 'State',
    cell: (row) => (
      <span className="inline-flex flex-wrap items-center gap-x-2">
        {row.packageState ? <PackageStateBadge state={row.packageState} /> : requestStateWords[row.state]}
        {row.questionOpen && <span className="text-plum">question open</span>}
      </span>
    ),
  },
  {
    id: 'dueOn',
    header: 'Due',
    sort: true,
    cell: (row) => (
      <DueDay
        on={row.dueOn}
        settled={row.state !== 'issued' || !['requested', 'in-preparation'].includes(row.packageState ?? '')}
      />
    ),
  },
  {
    id: 'createdAt',
    header: 'Drafted',
    sort: true,
    from: 'md',
    cell: (row) => <Moment at={row.createdAt} />,
  },
];

const quiet = 350;

/** Requests sent and received; `start` is the way to a new one for who may ask. */
export function RequestList({ start }: { start: ReactNode }) {
  const [view, change] = useUrlState({ q: '', state: '', sort: '-createdAt', cursor: '' });
  const [typed, setTyped] = useState(view.q);
  const { data, error, isPending, isPlaceholderData, refetch } = useQuery(requestListQuery(view));
  const { pathname } = useLocation();
  useEffect(() => {
    if (typed === view.q) return;
    const timer = setTimeout(() => change({ q: typed }), quiet);
    return () => clearTimeout(timer);
  }, [typed, view.q, change]);
  const clear = () => {
    setTyped('');
    change({ q: '', state: '' });
  };
  return (
    <>
      <search className="no-print mb-3 flex flex-wrap items-end gap-3">
        <TextField
          id="request-search"
          label="Search"
          type="search"
          placeholder="Part, description, organisation"
          maxLength={100}
          value={typed}
          onChange={setTyped}
          className="min-w-48 flex-1 basis-60 sm:max-w-80"
        />
        <SelectField
          id="request-state"
          label="State"
          value={view.state}
          onChange={(state) => change({ state })}
          options={[
            { value: '', label: 'Every state' },
            ...requestStates.map((value) => ({ value, label: requestStateWords[value] })),
          ]}
        />
      </search>
      {isPending && <Loading label="Loading requests" />}
      {error && <LoadFailure what="The list of requests" error={error} onRetry={() => void refetch()} />}
      {data && (
        <DataTable
          caption="Requests"
          columns={columns}
          rows={data.items}
          rowId={(row) => row.id}
          rowHref={(row) => paths.request(row.id)}
          sort={view.sort}
          onSort={(sort) => change({ sort })}
          refreshing={isPlaceholderData}
          empty={
            view.q !== '' || view.state !== '' ? (
              <EmptyState
                title="No request matches"
                actions={<Button onClick={clear}>Clear search and state</Button>}
              >
                Search looks at part number, description and the other organisation.
              </EmptyState>
            ) : (
              <EmptyState title="No requests yet" actions={start}>
                {start
                  ? 'A request asks one supplier for the approval of one part revision.'
                  : 'A customer issues a request; it appears here, and you get a mail.'}
              </EmptyState>
            )
          }
        />
      )}
      {data && (data.items.length > 0 || view.cursor !== '') && (
        <ListFooter
          shown={data.items.length}
          one="request"
          many="requests"
          nextCursor={data.nextCursor}
          cursor={view.cursor}
          onCursor={(cursor) => change({ cursor }, { push: true })}
          firstPage={pathname}
        />
      )}
    </>
  );
}
