import { useQueryClient } from '@tanstack/react-query';
import { inviteSupplierRequest } from '@trammel/shared/organisations';
import { useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { Dialog } from '../../../components/ui/dialog.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { newIdempotencyKey } from '../../../lib/api-client.ts';
import { useForm } from '../../../lib/use-form.ts';
import { inviteSupplier, suppliersQuery } from '../api.ts';

export function InviteSupplierDialog({ onClose }: { onClose: () => void }) {
  const client = useQueryClient();
  const [idempotencyKey] = useState(newIdempotencyKey);
  const form = useForm({
    initial: { organisationName: '', supplierNumber: '', siteName: '', contactName: '', contactEmail: '' },
    schema: inviteSupplierRequest,
    onSubmit: async (values) => {
      await inviteSupplier(values, idempotencyKey);
      showToast({ text: `An invitation is on its way to ${values.contactEmail}` });
      await client.invalidateQueries({ queryKey: suppliersQuery.queryKey });
      onClose();
    },
  });
  return (
    <Dialog open onClose={onClose} title="Invite a supplier">
      <form noValidate onSubmit={(event) => void form.submit(event)} className="flex flex-col gap-4">
        <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
        <TextField {...form.field('organisationName')} label="Name of the organisation" autoComplete="off" />
        <TextField
          {...form.field('supplierNumber')}
          label="Your supplier number"
          optional
          mono
          autoComplete="off"
        />
        <TextField {...form.field('siteName')} label="Site that makes the parts" autoComplete="off" />
        <TextField {...form.field('contactName')} label="Person to invite" autoComplete="off" />
        <TextField
          {...form.field('contactEmail')}
          label="Mail address of that person"
          hint="Becomes the first administrator and signer there."
          type="email"
          autoComplete="off"
        />
        <div className="flex flex-wrap gap-2">
          <Button type="submit" weight="primary" busy={form.busy} busyLabel="Sending…">
            Send the invitation
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </div>
      </form>
    </Dialog>
  );
}
