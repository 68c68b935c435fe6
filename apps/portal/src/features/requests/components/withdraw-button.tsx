import { useQueryClient } from '@tanstack/react-query';
import type { RequestResponse } from '@trammel/shared/requests';
import { useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { ConfirmDialog } from '../../../components/ui/confirm-dialog.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { requestQuery, withdrawRequest } from '../api.ts';

export function WithdrawButton({ request }: { request: RequestResponse }) {
  const client = useQueryClient();
  const [open, setOpen] = useState(false);
  const [reason, setReason] = useState('');
  const [missing, setMissing] = useState<string>();
  if (!request.abilities.withdraw) return null;
  const draft = request.state === 'draft';
  return (
    <>
      <Button onClick={() => setOpen(true)}>{draft ? 'Drop the draft' : 'Withdraw the request'}</Button>
      <ConfirmDialog
        open={open}
        onClose={() => setOpen(false)}
        title={`${draft ? 'Drop the draft' : 'Withdraw the request'} for ${request.part.number} rev ${request.revision.code}?`}
        consequence={
          draft
            ? `${request.supplier.name} never saw it. It stays in the list as withdrawn.`
            : `${request.supplier.name} is told by mail and can change nothing more. What was entered stays readable. This cannot be taken back.`
        }
        confirmLabel={draft ? 'Drop the draft' : 'Withdraw the request'}
        danger
        onConfirm={async () => {
          if (reason.trim() === '') {
            const refusal = 'Say why; the reason stays with the request.';
            setMissing(refusal);
            throw new Error(refusal);
          }
          const latest = client.getQueryData(requestQuery(request.id).queryKey) ?? request;
          const withdrawn = await withdrawRequest(latest, reason);
          client.setQueryData(requestQuery(request.id).queryKey, withdrawn);
          await client.invalidateQueries({ queryKey: ['requests'] });
          await client.invalidateQueries({ queryKey: ['submission'] });
        }}
      >
        <TextArea
          id="withdraw-reason"
          label="Reason"
          error={missing}
          value={reason}
          onChange={(text) => {
            setReason(text);
            setMissing(undefined);
          }}
        />
      </ConfirmDialog>
    </>
  );
}
