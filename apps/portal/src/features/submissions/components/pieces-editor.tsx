import { useQueryClient } from '@tanstack/react-query';
import type { PieceResponse } from '@trammel/shared/measurements';
import type { SubmissionPiecesResponse, SubmissionResponse } from '@trammel/shared/submissions';
import { useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { ConfirmDialog } from '../../../components/ui/confirm-dialog.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { Day } from '../../../components/ui/time.tsx';
import { ApiProblem } from '../../../lib/api-problem.ts';
import { removePiece, submissionKey } from '../api.ts';
import { AddPiecesDialog } from './add-pieces-dialog.tsx';
import { PieceDialog } from './piece-dialog.tsx';

type PiecesEditorProps = SubmissionPiecesResponse & { submission: SubmissionResponse };

export function PiecesEditor({ submission, streams, pieces, editable }: PiecesEditorProps) {
  const [adding, setAdding] = useState(false);
  const [changed, setChanged] = useState<PieceResponse | null>(null);
  const [removed, setRemoved] = useState<PieceResponse | null>(null);
  const nameOf = (streamId: string) => streams.find((stream) => stream.id === streamId)?.name ?? '';
  const columns: DataColumn<PieceResponse>[] = [
    {
      id: 'label',
      header: 'Piece',
      cell: (row) => <span className="figures font-semibold">{row.label}</span>,
    },
    { id: 'stream', header: 'Stream', cell: (row) => nameOf(row.streamId) },
    { id: 'madeOn', header: 'Made on', cell: (row) => (row.madeOn === null ? '—' : <Day on={row.madeOn} />) },
    { id: 'lot', header: 'Lot or heat', wrap: true, cell: (row) => row.lot || '—' },
    ...(editable
      ? ([
          {
            id: 'acts',
            header: 'Change or remove',
            headerHidden: true,
            align: 'end',
            cell: (row) => (
              <span className="inline-flex gap-2">
                <Button size="small" aria-label={`Change piece ${row.label}`} onClick={() => setChanged(row)}>
                  Change
                </Button>
                <Button size="small" aria-label={`Remove piece ${row.label}`} onClick={() => setRemoved(row)}>
                  Remove
                </Button>
              </span>
            ),
          },
        ] satisfies DataColumn<PieceResponse>[])
      : []),
  ];
  return (
    <section aria-labelledby="pieces">
      <div className="mb-3 flex flex-wrap items-end justify-between gap-2">
        <h2 id="pieces">Sample pieces</h2>
        {editable && <Button onClick={() => setAdding(true)}>Add pieces</Button>}
      </div>
      <DataTable
        caption="Sample pieces by stream"
        columns={columns}
        rows={pieces}
        rowId={(row) => row.id}
        empty={
          <EmptyState title="No sample pieces">
            Add the pieces that were measured, each in its stream.
          </EmptyState>
        }
      />
      {adding && (
        <AddPiecesDialog
          submission={submission}
          streams={streams}
          taken={pieces}
          onClose={() => setAdding(false)}
        />
      )}
      {changed && <PieceDialog submission={submission} piece={changed} onClose={() => setChanged(null)} />}
      {removed && <RemovePiece submission={submission} piece={removed} onClose={() => setRemoved(null)} />}
    </section>
  );
}

/** The first answer may be that readings hang on the piece; then the person is asked with that consequence. */
function RemovePiece({
  submission,
  piece,
  onClose,
}: {
  submission: SubmissionResponse;
  piece: PieceResponse;
  onClose: () => void;
}) {
  const client = useQueryClient();
  const [bears, setBears] = useState<string | null>(null);
  const remove = async () => {
    try {
      await removePiece(piece.id, bears !== null);
    } catch (error) {
      if (
        bears === null &&
        error instanceof ApiProblem &&
        error.is('conflict') &&
        error.message.includes('confirm=')
      ) {
        setBears(error.message.split('. ')[0] ?? error.message);
      }
      throw error;
    }
    await client.invalidateQueries({ queryKey: submissionKey(submission.id) });
  };
  return (
    <ConfirmDialog
      key={bears === null ? 'first' : 'second'}
      open
      onClose={onClose}
      title={
        bears === null ? `Remove piece ${piece.label}?` : `Remove piece ${piece.label} with its readings?`
      }
      consequence={
        bears === null
          ? 'Readings of it, if there are any, are asked about first.'
          : `${bears}. They cannot be brought back.`
      }
      confirmLabel={bears === null ? `Remove piece ${piece.label}` : 'Remove piece and readings'}
      danger
      onConfirm={remove}
    />
  );
}
