import { changePasswordRequest } from '@trammel/shared/accounts';
import { Button } from '../../../components/ui/button.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { useForm } from '../../../lib/use-form.ts';
import { changePassword } from '../api.ts';

const empty = { currentPassword: '', newPassword: '' };

export function ChangePasswordForm({ onChanged }: { onChanged: () => void }) {
  const form = useForm({
    initial: empty,
    schema: changePasswordRequest,
    onSubmit: async (values) => {
      await changePassword(values);
      form.setAll(empty);
      showToast({ text: 'The password is changed' });
      onChanged();
    },
  });
  return (
    <form noValidate onSubmit={(event) => void form.submit(event)} className="flex max-w-sm flex-col gap-4">
      <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
      <TextField
        {...form.field('currentPassword')}
        label="Current password"
        type="password"
        autoComplete="current-password"
      />
      <TextField
        {...form.field('newPassword')}
        label="New password"
        hint="At least 15 characters. A few words in a row are easy to remember."
        type="password"
        autoComplete="new-password"
      />
      <div>
        <Button type="submit" weight="primary" busy={form.busy} busyLabel="Changing…">
          Change the password
        </Button>
      </div>
    </form>
  );
}
