import { useQuery, useQueryClient } from '@tanstack/react-query';
import type { SessionResponse } from '@trammel/shared/accounts';
import { Navigate, useNavigate, useSearchParams } from 'react-router-dom';
import { Notice } from '../../components/ui/notice.tsx';
import { PageHead } from '../../components/ui/page-head.tsx';
import { DemoPeople } from '../../features/accounts/components/demo-people.tsx';
import { SignInForm } from '../../features/accounts/components/sign-in-form.tsx';
import { paths, safeReturnPath } from '../../lib/paths.ts';
import { beginSession } from '../../lib/session-change.ts';
import { deskFor, sessionQuery } from '../../lib/session.ts';

export function Component() {
  const client = useQueryClient();
  const navigate = useNavigate();
  const [search] = useSearchParams();
  const session = useQuery(sessionQuery);
  const wanted = safeReturnPath(search.get('to'));

  const enter = (begun: SessionResponse) => {
    beginSession(client, begun);
    void navigate(wanted === paths.home ? deskFor(begun.user.roles) : wanted, { replace: true });
  };

  if (session.data) return <Navigate to={wanted} replace />;
  return (
    <>
      <PageHead
        title="Sign in"
        lead="Where a new or changed part is measured, checked against its drawing, and approved for production."
      />
      <div className="grid gap-x-16 gap-y-10 md:grid-cols-[minmax(280px,380px)_minmax(0,1fr)]">
        <div className="flex flex-col gap-4">
          {wanted !== paths.home && (
            <Notice>
              Sign in to go on where you were. What was typed and not yet saved is kept in this browser.
            </Notice>
          )}
          <SignInForm onSignedIn={enter} />
        </div>
        <DemoPeople onSignedIn={enter} />
      </div>
    </>
  );
}
