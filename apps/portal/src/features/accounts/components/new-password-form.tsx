import { setPasswordRequest } from '@trammel/shared/accounts';
import { useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { useForm } from '../../../lib/use-form.ts';

export interface NewPasswordFormProps {
  email: string;
  submitLabel: string;
  onSubmit: (newPassword: string) => Promise<void>;
}

/** One field that can be looked at replaces a second one to repeat it in. */
export function NewPasswordForm({ email, submitLabel, onSubmit }: NewPasswordFormProps) {
  const [visible, setVisible] = useState(false);
  const form = useForm({
    initial: { newPassword: '' },
    schema: setPasswordRequest,
    onSubmit: (values) => onSubmit(values.newPassword),
  });
  return (
    <form noValidate onSubmit={(event) => void form.submit(event)} className="flex max-w-sm flex-col gap-4">
      <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
      <input type="hidden" name="username" autoComplete="username" value={email} readOnly />
      <TextField
        {...form.field('newPassword')}
        label="New password"
        hint="At least 15 characters. A few words in a row are easy to remember."
        type={visible ? 'text' : 'password'}
        autoComplete="new-password"
      />
      <div className="flex flex-wrap gap-2">
        <Button type="submit" weight="primary" busy={form.busy} busyLabel="Saving…">
          {submitLabel}
        </Button>
        <Button weight="quiet" aria-pressed={visible} onClick={() => setVisible(!visible)}>
          {visible ? 'Hide the password' : 'Show the password'}
        </Button>
      </div>
    </form>
  );
}
