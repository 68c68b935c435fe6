import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { SessionListResponse } from '@trammel/shared/accounts';
import { useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { ConfirmDialog } from '../../../components/ui/confirm-dialog.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { Loading, LoadFailure } from '../../../components/ui/loading.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { Moment } from '../../../components/ui/time.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { reasonOf } from '../../../lib/api-problem.ts';
import { endOtherSession, sessionsQuery } from '../api.ts';
import { browserInWords } from '../browser-in-words.ts';

type Row = SessionListResponse['items'][number];

/** Where the person is signed in, with the means to end it. */
export function SessionList({ onEndAll }: { onEndAll: () => Promise<void> }) {
  const client = useQueryClient();
  const [asking, setAsking] = useState(false);
  const { data, error, isPending, refetch } = useQuery(sessionsQuery);
  const end = useMutation({
    mutationFn: (row: Row) => endOtherSession(row.id),
    onSuccess: async () => {
      showToast({ text: 'That session is ended' });
      await client.invalidateQueries({ queryKey: sessionsQuery.queryKey });
    },
  });
  if (isPending) return <Loading />;
  if (error) return <LoadFailure what="Your sessions" error={error} onRetry={() => void refetch()} />;

  const columns: DataColumn<Row>[] = [
    { id: 'browser', header: 'Browser', wrap: true, cell: (row) => browserInWords(row.userAgent) },
    { id: 'since', header: 'Signed in', cell: (row) => <Moment at={row.createdAt} /> },
    { id: 'seen', header: 'Last used', cell: (row) => <Moment at={row.lastSeenAt} /> },
    {
      id: 'end',
      header: 'Act',
      headerHidden: true,
      align: 'end',
      cell: (row) =>
        row.current ? (
          <span className="text-pencil">this one</span>
        ) : (
          <Button
            size="small"
            aria-label={`End the session in ${browserInWords(row.userAgent)}`}
            busy={end.isPending && end.variables.id === row.id}
            onClick={() => end.mutate(row)}
          >
            End
          </Button>
        ),
    },
  ];
  return (
    <div className="flex flex-col gap-3">
      {end.isError && (
        <Notice tone="failure" live>
          {reasonOf(end.error)}
        </Notice>
      )}
      <DataTable
        caption="Where you are signed in"
        columns={columns}
        rows={data.items}
        rowId={(row) => row.id}
        empty={null}
      />
      <div>
        <Button weight="danger" onClick={() => setAsking(true)}>
          Sign out everywhere
        </Button>
      </div>
      <ConfirmDialog
        open={asking}
        onClose={() => setAsking(false)}
        title="Sign out everywhere?"
        consequence="All your sessions end, this one too. What was typed here and has not reached the server is lost."
        confirmLabel="Sign out everywhere"
        danger
        onConfirm={onEndAll}
      />
    </div>
  );
}
