import { useQuery, useQueryClient } from '@tanstack/react-query';
import type { RequestResponse } from '@trammel/shared/requests';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { Button } from '../../../components/ui/button.tsx';
import { ConfirmDialog } from '../../../components/ui/confirm-dialog.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { newIdempotencyKey } from '../../../lib/api-client.ts';
import { reasonOf } from '../../../lib/api-problem.ts';
import { paths } from '../../../lib/paths.ts';
import { acknowledgeRequest, requestQuery, startNextRound } from '../api.ts';
import { WithdrawButton } from './withdraw-button.tsx';

/**
 * Deeds on a request that belong to this person now: acknowledge, start the next round, and on the request's own page
 * withdraw.
 */
export function RequestActs({ requestId, submissionId }: { requestId: string; submissionId?: string }) {
  const { data: request } = useQuery(requestQuery(requestId));
  if (!request) return null;
  // On an old round nothing is done any more; the newest one offers it.
  if (submissionId !== undefined && request.rounds.at(-1)?.id !== submissionId) return null;
  return (
    <>
      <Acknowledge request={request} />
      <NextRound request={request} />
      {submissionId === undefined && request.state === 'issued' && <WithdrawButton request={request} />}
    </>
  );
}

function Acknowledge({ request }: { request: RequestResponse }) {
  const client = useQueryClient();
  const navigate = useNavigate();
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  if (!request.abilities.acknowledge) return null;
  const acknowledge = async () => {
    setBusy(true);
    setFailure(null);
    try {
      const answer = await acknowledgeRequest(request.id);
      client.setQueryData(requestQuery(request.id).queryKey, answer);
      await client.invalidateQueries({ queryKey: ['submission'] });
      void client.invalidateQueries({ queryKey: ['worklist'] });
      const [round] = answer.rounds;
      if (round) void navigate(paths.submission(round.id));
    } catch (error) {
      setFailure(reasonOf(error));
      setBusy(false);
    }
  };
  return (
    <>
      <Button weight="primary" busy={busy} busyLabel="Acknowledging…" onClick={() => void acknowledge()}>
        Acknowledge the request
      </Button>
      {failure && (
        <Notice tone="failure" live>
          {failure}
        </Notice>
      )}
    </>
  );
}

function NextRound({ request }: { request: RequestResponse }) {
  const client = useQueryClient();
  const navigate = useNavigate();
  const [open, setOpen] = useState(false);
  const [key] = useState(() => newIdempotencyKey());
  if (!request.abilities.resubmit) return null;
  const round = request.rounds.length + 1;
  return (
    <>
      <Button weight="primary" onClick={() => setOpen(true)}>
        Start round {round}
      </Button>
      <ConfirmDialog
        open={open}
        onClose={() => setOpen(false)}
        title={`Start round ${round} for ${request.part.number} rev ${request.revision.code}?`}
        consequence="It begins as a copy of the last round: streams, pieces, readings, elements with their files, and the facts of the warrant. The last round stays readable as it was."
        confirmLabel={`Start round ${round}`}
        onConfirm={async () => {
          const answer = await startNextRound(request.id, key);
          client.setQueryData(requestQuery(request.id).queryKey, answer);
          await client.invalidateQueries({ queryKey: ['submission'] });
          void client.invalidateQueries({ queryKey: ['worklist'] });
          const last = answer.rounds.at(-1);
          if (last) void navigate(paths.submission(last.id));
        }}
      />
    </>
  );
}
