import { passwordResetRequest } from '@trammel/shared/accounts';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { Button } from '../../../components/ui/button.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { PageHead } from '../../../components/ui/page-head.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { paths } from '../../../lib/paths.ts';
import { useForm } from '../../../lib/use-form.ts';
import { askForPasswordReset } from '../api.ts';

export function ForgottenPassword() {
  const [askedFor, setAskedFor] = useState<string | null>(null);
  const form = useForm({
    initial: { email: '' },
    schema: passwordResetRequest,
    onSubmit: async (values) => {
      await askForPasswordReset(values.email);
      setAskedFor(values.email);
    },
  });
  return (
    <>
      <PageHead
        title="Forgotten password"
        lead="A link to set a new one comes by mail. Until it is used, nothing changes."
      />
      {askedFor === null ? (
        <form
          noValidate
          onSubmit={(event) => void form.submit(event)}
          className="flex max-w-sm flex-col gap-4"
        >
          <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
          <TextField
            {...form.field('email')}
            label="Mail address"
            type="email"
            autoComplete="username"
            spellCheck={false}
          />
          <div className="flex flex-wrap items-center gap-4">
            <Button type="submit" weight="primary" busy={form.busy} busyLabel="Sending…">
              Send the link
            </Button>
            <Link to={paths.signIn}>Back to sign in</Link>
          </div>
        </form>
      ) : (
        <Notice tone="success" live title="Look into your mail">
          If there is an account for {askedFor}, a link is on its way to it. The link works once and for an
          hour. Nothing arrived: look in the folder for unwanted mail, or ask your administrator which address
          is yours.
        </Notice>
      )}
    </>
  );
}
