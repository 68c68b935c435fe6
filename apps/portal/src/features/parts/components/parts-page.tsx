import { useQuery } from '@tanstack/react-query';
import type { PartListItem } from '@trammel/shared/parts';
import { useState } from 'react';
import { useLocation, useNavigate } from 'react-router-dom';
import { Button } from '../../../components/ui/button.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { ListFooter } from '../../../components/ui/list-footer.tsx';
import { Loading, LoadFailure } from '../../../components/ui/loading.tsx';
import { PageHead } from '../../../components/ui/page-head.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { Moment } from '../../../components/ui/time.tsx';
import { paths } from '../../../lib/paths.ts';
import { useMay } from '../../../lib/session.ts';
import { useUrlState } from '../../../lib/use-url-state.ts';
import { partsQuery } from '../api.ts';
import { PartDialog } from './part-dialog.tsx';

const columns: DataColumn<PartListItem>[] = [
  {
    id: 'number',
    header: 'Part number',
    sort: true,
    cell: (row) => <span className="figures">{row.number}</span>,
  },
  { id: 'name', header: 'Name', sort: true, wrap: true, cell: (row) => row.name },
  {
    id: 'current',
    header: 'Released',
    cell: (row) => (row.currentRevision ? <span className="figures">{row.currentRevision}</span> : <None />),
  },
  {
    id: 'draft',
    header: 'Draft',
    cell: (row) => (row.draftRevision ? <span className="figures">{row.draftRevision}</span> : <None />),
  },
  {
    id: 'open',
    header: 'Open packages',
    align: 'end',
    cell: (row) => <span className="figures">{row.openPackages}</span>,
  },
  {
    id: 'safety',
    header: 'Class',
    from: 'md',
    cell: (row) =>
      row.safetyOrRegulatory ? <span className="text-brass">safety or regulatory</span> : <None />,
  },
  {
    id: 'createdAt',
    header: 'Created',
    sort: true,
    from: 'lg',
    cell: (row) => <Moment at={row.createdAt} />,
  },
];

function None() {
  return (
    <span className="text-pencil">
      <span aria-hidden="true">–</span>
      <span className="sr-only">none</span>
    </span>
  );
}

export function PartsPage() {
  const [view, change] = useUrlState({ q: '', sort: 'number', cursor: '' });
  const { data, error, isPending, isPlaceholderData, refetch } = useQuery(partsQuery(view));
  const [creating, setCreating] = useState(false);
  const mayWrite = useMay('part:write');
  const navigate = useNavigate();
  const { pathname } = useLocation();
  const create = mayWrite && (
    <Button weight="primary" onClick={() => setCreating(true)}>
      New part
    </Button>
  );
  return (
    <>
      <PageHead
        title="Parts"
        lead="Parts of your organisation with their drawing revisions."
        actions={create}
      />
      <div className="flex flex-col gap-3">
        <TextField
          id="parts-search"
          label="Search"
          hint="Part number or name"
          type="search"
          className="w-72 max-w-full"
          value={view.q}
          onChange={(q) => change({ q })}
        />
        {isPending && <Loading />}
        {error && <LoadFailure what="The list of parts" error={error} onRetry={() => void refetch()} />}
        {data && (
          <>
            <DataTable
              caption="Parts"
              columns={columns}
              rows={data.items}
              rowId={(row) => row.id}
              rowHref={(row) => paths.part(row.id)}
              sort={view.sort}
              onSort={(sort) => change({ sort })}
              refreshing={isPlaceholderData}
              empty={
                <EmptyState
                  title={view.q ? `No part has "${view.q}" in its number or name` : 'No part yet'}
                  actions={
                    view.q ? <Button onClick={() => change({ q: '' })}>Show every part</Button> : create
                  }
                >
                  {view.q
                    ? 'The search looks at the part number and the name.'
                    : 'Create a part, give its first revision a drawing and characteristics, and release it. Then its approval can be requested.'}
                </EmptyState>
              }
            />
            <ListFooter
              shown={data.items.length}
              one="part"
              many="parts"
              nextCursor={data.nextCursor}
              cursor={view.cursor}
              onCursor={(cursor) => change({ cursor }, { push: true })}
              firstPage={pathname}
            />
          </>
        )}
      </div>
      {creating && (
        <PartDialog
          part={null}
          onClose={() => setCreating(false)}
          onSaved={(part) => void navigate(paths.part(part.id))}
        />
      )}
    </>
  );
}
