import { useQueryClient } from '@tanstack/react-query';
import { invitePersonRequest, type PersonResponse } from '@trammel/shared/accounts';
import { roles, type Role } from '@trammel/shared/roles';
import { useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { Checkbox, CheckboxGroup } from '../../../components/ui/choice-fields.tsx';
import { Dialog } from '../../../components/ui/dialog.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { newIdempotencyKey } from '../../../lib/api-client.ts';
import { ApiProblem } from '../../../lib/api-problem.ts';
import { roleWords } from '../../../lib/session.ts';
import { useForm } from '../../../lib/use-form.ts';
import { changePerson, invitePerson, peopleQuery } from '../api.ts';

const roleHints: Record<Role, string> = {
  administrator: 'invites people and suppliers, reads the audit trail',
  'quality-reviewer': 'keeps parts, asks for approvals, reviews packages',
  purchasing: 'sees what may be bought, records deliveries',
  'supplier-quality': 'measures, gathers evidence, submits packages',
};

/** Invites a person, or changes one. */
export function PersonDialog({ person, onClose }: { person: PersonResponse | null; onClose: () => void }) {
  const client = useQueryClient();
  const [idempotencyKey] = useState(newIdempotencyKey);
  const form = useForm({
    initial: {
      name: person?.name ?? '',
      email: person?.email ?? '',
      title: person?.title ?? '',
      roles: person?.roles ?? ([] as Role[]),
      maySign: person?.maySign ?? false,
    },
    // A person who is changed keeps the address: the schema of the invitation covers both.
    schema: invitePersonRequest,
    onSubmit: async (values) => {
      const { email, ...rest } = values;
      if (person === null) {
        await invitePerson(values, idempotencyKey);
        showToast({ text: `An invitation is on its way to ${email}` });
      } else {
        await changePerson(
          person.id,
          { ...rest, disabled: person.state === 'disabled' },
          person.version,
        ).catch(explainStale);
        showToast({ text: `${values.name} is changed` });
      }
      await client.invalidateQueries({ queryKey: peopleQuery.queryKey });
      onClose();
    },
  });
  const title = person === null ? 'Invite a person' : `Change ${person.name}`;
  return (
    <Dialog open onClose={onClose} title={title}>
      <form noValidate onSubmit={(event) => void form.submit(event)} className="flex flex-col gap-4">
        <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
        <TextField {...form.field('name')} label="Name" autoComplete="off" />
        {person === null && (
          <TextField
            {...form.field('email')}
            label="Mail address"
            hint="The invitation goes there; it works once and for seven days."
            type="email"
            autoComplete="off"
          />
        )}
        <TextField
          {...form.field('title')}
          label="Title"
          optional
          hint="As it is to stand beside a signature."
        />
        <CheckboxGroup
          {...form.field('roles')}
          label="Roles"
          options={roles.map((role) => ({ value: role, label: roleWords[role], hint: roleHints[role] }))}
        />
        <Checkbox
          {...form.field('maySign')}
          label="May sign"
          hint="A quality reviewer then signs dispositions, a supplier's quality engineer warrants."
        />
        <div className="flex flex-wrap gap-2">
          <Button type="submit" weight="primary" busy={form.busy} busyLabel="Saving…">
            {person === null ? 'Send the invitation' : 'Save'}
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </div>
      </form>
    </Dialog>
  );
}

function explainStale(error: unknown): never {
  if (error instanceof ApiProblem && error.is('stale-version')) {
    throw new Error(
      'Somebody else changed this person meanwhile. Close this window to see the change, then open it again.',
    );
  }
  throw error;
}
