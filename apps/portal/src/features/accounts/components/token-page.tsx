import { useQuery } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import { LinkButton } from '../../../components/ui/link-button.tsx';
import { Loading, LoadFailure } from '../../../components/ui/loading.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { PageHead } from '../../../components/ui/page-head.tsx';
import { ApiProblem } from '../../../lib/api-problem.ts';
import { paths } from '../../../lib/paths.ts';
import { setPassword, tokenQuery } from '../api.ts';
import { NewPasswordForm } from './new-password-form.tsx';

export interface TokenPageProps {
  token: string;
  title: string;
  lead: (name: string, email: string, organisation: string) => ReactNode;
  submitLabel: string;
  /** What to do when the link no longer works. */
  spent: ReactNode;
}

/** Where a link from a mail leads: it sets a password once and signs nobody in. */
export function TokenPage({ token, title, lead, submitLabel, spent }: TokenPageProps) {
  const { data, error, isPending, refetch } = useQuery(tokenQuery(token));
  const [done, setDone] = useState(false);
  if (done) {
    return (
      <>
        <PageHead title={title} />
        <Notice
          tone="success"
          live
          title="The password is set"
          actions={
            <LinkButton to={paths.signIn} weight="primary">
              Sign in
            </LinkButton>
          }
        >
          Sign in with your mail address and the new password.
        </Notice>
      </>
    );
  }
  if (isPending) return <Loading />;
  if (error) {
    const isSpent = error instanceof ApiProblem && error.is('not-found', 'conflict', 'invalid', 'malformed');
    return (
      <>
        <PageHead title={title} />
        {isSpent ? (
          <Notice tone="attention" title="This link does not work any more">
            {spent}
          </Notice>
        ) : (
          <LoadFailure what="The link" error={error} onRetry={() => void refetch()} />
        )}
      </>
    );
  }
  return (
    <>
      <PageHead title={title} lead={lead(data.name, data.email, data.organisationName)} />
      <NewPasswordForm
        email={data.email}
        submitLabel={submitLabel}
        onSubmit={async (newPassword) => {
          await setPassword(token, newPassword);
          setDone(true);
        }}
      />
    </>
  );
}
