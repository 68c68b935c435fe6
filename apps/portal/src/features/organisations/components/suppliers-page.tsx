import { useQuery } from '@tanstack/react-query';
import type { SupplierResponse } from '@trammel/shared/organisations';
import { useMemo, useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { Loading, LoadFailure } from '../../../components/ui/loading.tsx';
import { PageHead } from '../../../components/ui/page-head.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { Moment } from '../../../components/ui/time.tsx';
import { countOf } from '../../../lib/format.ts';
import { useMay } from '../../../lib/session.ts';
import { useUrlState } from '../../../lib/use-url-state.ts';
import { suppliersQuery } from '../api.ts';
import { InviteSupplierDialog } from './invite-supplier-dialog.tsx';

const columns: DataColumn<SupplierResponse>[] = [
  {
    id: 'name',
    header: 'Supplier',
    sort: (row) => row.name,
    cell: (row) => <span className="font-medium">{row.name}</span>,
  },
  {
    id: 'number',
    header: 'Supplier number',
    sort: (row) => row.supplierNumber,
    cell: (row) => (row.supplierNumber === '' ? '—' : <span className="figures">{row.supplierNumber}</span>),
  },
  { id: 'sites', header: 'Sites', wrap: true, cell: (row) => row.sites.map((site) => site.name).join(', ') },
  {
    id: 'state',
    header: 'State',
    sort: (row) => row.state,
    cell: (row) => (row.state === 'active' ? 'active' : 'invited, not yet accepted'),
  },
  {
    id: 'since',
    header: 'Linked since',
    from: 'md',
    sort: (row) => row.linkedAt,
    cell: (row) => <Moment at={row.linkedAt} />,
  },
];

export function SuppliersPage() {
  const { data, error, isPending, refetch } = useQuery(suppliersQuery);
  const [view, change] = useUrlState({ q: '', sort: 'name' });
  const mayInvite = useMay('links:manage');
  const [inviting, setInviting] = useState(false);
  const wanted = view.q.trim().toLowerCase();
  const rows = useMemo(
    () =>
      (data?.items ?? []).filter((row) => `${row.name} ${row.supplierNumber}`.toLowerCase().includes(wanted)),
    [data, wanted],
  );
  if (isPending) return <Loading />;
  if (error) return <LoadFailure what="The suppliers" error={error} onRetry={() => void refetch()} />;

  const invite = mayInvite && (
    <Button weight="primary" onClick={() => setInviting(true)}>
      Invite a supplier
    </Button>
  );
  return (
    <>
      <PageHead
        title="Suppliers"
        lead="Organisations that can be asked for an approval. None of them learns of another."
        actions={invite}
      />
      <div className="flex flex-col gap-3">
        <div className="flex flex-wrap items-end gap-4">
          <TextField
            id="supplier-search"
            label="Search"
            type="search"
            className="w-64"
            value={view.q}
            onChange={(q) => change({ q })}
          />
          <span className="pb-1.5 text-pencil" role="status">
            {countOf(rows.length, 'supplier', 'suppliers')}
          </span>
        </div>
        <DataTable
          caption="Suppliers"
          columns={columns}
          rows={rows}
          rowId={(row) => row.id}
          sort={view.sort}
          onSort={(sort) => change({ sort })}
          sortHere
          empty={
            wanted === '' ? (
              <EmptyState title="No supplier yet" actions={invite}>
                {mayInvite
                  ? 'Invite the first one: the person you name gets a mail and becomes administrator there. Your quality reviewers can then ask that supplier for an approval.'
                  : 'An administrator of your organisation invites the first one; then it can be asked for an approval.'}
              </EmptyState>
            ) : (
              <EmptyState
                title="No supplier by that name"
                actions={<Button onClick={() => change({ q: '' })}>Show all</Button>}
              >
                The search looks at name and supplier number.
              </EmptyState>
            )
          }
        />
      </div>
      {inviting && <InviteSupplierDialog onClose={() => setInviting(false)} />}
    </>
  );
}
