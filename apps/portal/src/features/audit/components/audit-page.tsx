import { useMutation, useQuery } from '@tanstack/react-query';
import type { AuditEvent } from '@trammel/shared/audit';
import { useState } from 'react';
import { useLocation } from 'react-router-dom';
import { Button } from '../../../components/ui/button.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { ListFooter } from '../../../components/ui/list-footer.tsx';
import { Loading, LoadFailure } from '../../../components/ui/loading.tsx';
import { PageHead } from '../../../components/ui/page-head.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { Moment } from '../../../components/ui/time.tsx';
import { useUrlState } from '../../../lib/use-url-state.ts';
import { auditTrailQuery, verifyAuditTrail } from '../api.ts';
import { AuditEventDialog } from './audit-event-dialog.tsx';
import { VerificationResult } from './verification-result.tsx';

export function AuditPage() {
  const [view, change] = useUrlState({ q: '', objectType: '', objectId: '', cursor: '' });
  const { data, error, isPending, isPlaceholderData, refetch } = useQuery(auditTrailQuery(view));
  const [shown, setShown] = useState<AuditEvent | null>(null);
  const verify = useMutation({ mutationFn: verifyAuditTrail });
  const { pathname } = useLocation();
  const filtered = view.q !== '' || view.objectId !== '' || view.objectType !== '';

  const columns: DataColumn<AuditEvent>[] = [
    {
      id: 'number',
      header: 'No.',
      align: 'end',
      cell: (row) => <span className="figures">{row.number}</span>,
    },
    { id: 'at', header: 'When', cell: (row) => <Moment at={row.at} /> },
    { id: 'actor', header: 'Who', cell: (row) => row.actor },
    { id: 'summary', header: 'What', wrap: true, cell: (row) => row.summary },
    {
      id: 'object',
      header: 'Object',
      from: 'lg',
      cell: (row) => <span className="figures">{row.objectType}</span>,
    },
    {
      id: 'details',
      header: 'Details',
      headerHidden: true,
      align: 'end',
      cell: (row) => (
        <Button size="small" aria-label={`Details of entry ${row.number}`} onClick={() => setShown(row)}>
          Details
        </Button>
      ),
    },
  ];

  return (
    <>
      <PageHead
        title="Audit trail"
        lead="Every act on your organisation's data, newest first. Entries are chained by digest and can be neither changed nor removed."
        actions={
          <Button busy={verify.isPending} busyLabel="Verifying…" onClick={() => verify.mutate()}>
            Verify the chain
          </Button>
        }
      />
      <div className="flex flex-col gap-3">
        <VerificationResult
          result={verify.data ?? null}
          error={verify.error}
          onRetry={() => verify.mutate()}
        />
        <div className="flex flex-wrap items-end gap-4">
          <TextField
            id="audit-search"
            label="Search"
            hint="Person, act or object"
            type="search"
            className="w-72"
            value={view.q}
            onChange={(q) => change({ q })}
          />
          {view.objectId !== '' && (
            <Button onClick={() => change({ objectType: '', objectId: '' })}>
              Show all objects, not one
            </Button>
          )}
        </div>
        {isPending && <Loading />}
        {error && <LoadFailure what="The audit trail" error={error} onRetry={() => void refetch()} />}
        {data && (
          <>
            <DataTable
              caption="Audit trail"
              columns={columns}
              rows={data.items}
              rowId={(row) => String(row.number)}
              refreshing={isPlaceholderData}
              empty={
                <EmptyState
                  title={filtered ? 'No entry fits' : 'No entry yet'}
                  actions={
                    filtered && (
                      <Button onClick={() => change({ q: '', objectType: '', objectId: '' })}>
                        Show every entry
                      </Button>
                    )
                  }
                >
                  {filtered
                    ? 'The search looks at who acted, what was done and on what.'
                    : 'The first act of anybody in your organisation writes the first entry.'}
                </EmptyState>
              }
            />
            <ListFooter
              shown={data.items.length}
              one="entry"
              many="entries"
              nextCursor={data.nextCursor}
              cursor={view.cursor}
              onCursor={(cursor) => change({ cursor }, { push: true })}
              firstPage={pathname}
            />
          </>
        )}
      </div>
      {shown && <AuditEventDialog event={shown} onClose={() => setShown(null)} />}
    </>
  );
}
