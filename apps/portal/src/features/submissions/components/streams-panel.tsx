import { useQueryClient } from '@tanstack/react-query';
import type { StreamResponse } from '@trammel/shared/measurements';
import type { SubmissionResponse } from '@trammel/shared/submissions';
import { useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { ConfirmDialog } from '../../../components/ui/confirm-dialog.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { blockStream, submissionKey } from '../api.ts';

interface StreamsPanelProps {
  submission: SubmissionResponse;
  streams: readonly StreamResponse[];
  editable: boolean;
}

/** Streams are judged one by one; a blocked one stays on record and out of the approval. */
export function StreamsPanel({ submission, streams, editable }: StreamsPanelProps) {
  const [asked, setAsked] = useState<StreamResponse | null>(null);
  const kind = submission.streamKind === 'other' ? 'stream' : submission.streamKind;
  const left = streams.filter((stream) => !stream.blocked).length;
  return (
    <section aria-labelledby="streams">
      <h2 id="streams">Streams</h2>
      <p className="mb-3 max-w-prose text-pencil">
        Each {kind} is judged on its own, never pooled. Warrant and approval list the ones they cover.
      </p>
      <ul className="border border-rule bg-sheet">
        {streams.map((stream) => (
          <li
            key={stream.id}
            className="flex min-h-row flex-wrap items-center gap-x-4 gap-y-1 border-rule px-3 py-1 not-first:border-t"
          >
            <span className="basis-40 font-medium">{stream.name}</span>
            <span className="min-w-0 flex-1 basis-48 break-words">
              {stream.blocked ? (
                <span className="text-vermilion">blocked: {stream.blockedReason}</span>
              ) : (
                <span className="text-pencil">in the package</span>
              )}
            </span>
            {editable && (stream.blocked || left > 1) && (
              <Button
                size="small"
                aria-label={stream.blocked ? `Take ${stream.name} back in` : `Block ${stream.name}`}
                onClick={() => setAsked(stream)}
              >
                {stream.blocked ? 'Take back in' : 'Block'}
              </Button>
            )}
          </li>
        ))}
      </ul>
      {asked && <StreamDialog submission={submission} stream={asked} onClose={() => setAsked(null)} />}
    </section>
  );
}

function StreamDialog({
  submission,
  stream,
  onClose,
}: {
  submission: SubmissionResponse;
  stream: StreamResponse;
  onClose: () => void;
}) {
  const client = useQueryClient();
  const [reason, setReason] = useState('');
  const [missing, setMissing] = useState<string>();
  const blocks = !stream.blocked;
  return (
    <ConfirmDialog
      open
      onClose={onClose}
      title={blocks ? `Block ${stream.name}?` : `Take ${stream.name} back into the package?`}
      consequence={
        blocks
          ? 'Its readings stay on record and are no longer owed or counted. Parts from it are not covered by the approval.'
          : 'Its rows are owed and counted again.'
      }
      confirmLabel={blocks ? `Block ${stream.name}` : `Take ${stream.name} back in`}
      danger={blocks}
      onConfirm={async () => {
        if (blocks && reason.trim() === '') {
          const refusal = `Say why ${stream.name} is blocked.`;
          setMissing(refusal);
          throw new Error(refusal);
        }
        await blockStream(submission.id, stream, { blocked: blocks, reason: blocks ? reason : '' });
        await client.invalidateQueries({ queryKey: submissionKey(submission.id) });
      }}
    >
      {blocks && (
        <TextArea
          id="block-reason"
          label="Reason"
          hint="The customer reads it on the warrant."
          error={missing}
          value={reason}
          onChange={(text) => {
            setReason(text);
            setMissing(undefined);
          }}
        />
      )}
    </ConfirmDialog>
  );
}
