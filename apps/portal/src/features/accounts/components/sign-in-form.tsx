import { signInRequest, type SessionResponse } from '@trammel/shared/accounts';
import { Link } from 'react-router-dom';
import { Button } from '../../../components/ui/button.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { paths } from '../../../lib/paths.ts';
import { useForm } from '../../../lib/use-form.ts';
import { signIn } from '../api.ts';

export function SignInForm({ onSignedIn }: { onSignedIn: (session: SessionResponse) => void }) {
  const form = useForm({
    initial: { email: '', password: '' },
    schema: signInRequest,
    onSubmit: async (values) => onSignedIn(await signIn(values)),
  });
  return (
    <form noValidate onSubmit={(event) => void form.submit(event)} className="flex max-w-sm flex-col gap-4">
      <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
      <TextField
        {...form.field('email')}
        label="Mail address"
        type="email"
        autoComplete="username"
        spellCheck={false}
      />
      <TextField
        {...form.field('password')}
        label="Password"
        type="password"
        autoComplete="current-password"
      />
      <div className="flex flex-wrap items-center gap-4">
        <Button type="submit" weight="primary" busy={form.busy} busyLabel="Signing in…">
          Sign in
        </Button>
        <Link to={paths.forgotten}>Forgotten password</Link>
      </div>
    </form>
  );
}
