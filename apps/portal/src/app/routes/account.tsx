import { useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { PageHead } from '../../components/ui/page-head.tsx';
import { ChangePasswordForm } from '../../features/accounts/components/change-password-form.tsx';
import { SessionList } from '../../features/accounts/components/session-list.tsx';
import { sessionsQuery } from '../../features/accounts/api.ts';
import { paths } from '../../lib/paths.ts';
import { endSession } from '../../lib/session-change.ts';
import { roleWords, useSession } from '../../lib/session.ts';

export function Component() {
  const { user, organisation } = useSession();
  const client = useQueryClient();
  const navigate = useNavigate();
  const endAll = async () => {
    await endSession(client, 'everywhere');
    await navigate(paths.signIn, { replace: true });
  };
  const facts: [string, string][] = [
    ['Name', user.name],
    ['Mail address', user.email],
    ['Title', user.title || '—'],
    ['Organisation', organisation.name],
    ['Roles', user.roles.map((role) => roleWords[role]).join(', ')],
    ['Authority to sign', user.maySign ? 'yes' : 'no'],
  ];
  return (
    <>
      <PageHead
        title="Your account"
        lead="An administrator of your organisation changes name, title, roles and the authority to sign."
      />
      <div className="flex flex-col gap-8">
        <dl className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-6 gap-y-1">
          {facts.map(([name, value]) => (
            <div key={name} className="contents">
              <dt className="text-pencil">{name}</dt>
              <dd className="break-words">{value}</dd>
            </div>
          ))}
        </dl>
        <section aria-labelledby="sessions">
          <h2 id="sessions" className="mb-2">
            Where you are signed in
          </h2>
          <SessionList onEndAll={endAll} />
        </section>
        <section aria-labelledby="password">
          <h2 id="password" className="mb-2">
            Password
          </h2>
          <ChangePasswordForm
            onChanged={() => void client.invalidateQueries({ queryKey: sessionsQuery.queryKey })}
          />
        </section>
      </div>
    </>
  );
}
