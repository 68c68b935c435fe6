import { useQuery } from '@tanstack/react-query';
import { lazy } from 'react';
import { Navigate, useLocation } from 'react-router-dom';
import { Loading, LoadFailure } from '../../components/ui/loading.tsx';
import { paths } from '../../lib/paths.ts';
import { sessionQuery } from '../../lib/session.ts';

/** The sign-in page does without the bar, its menus and dialogs: they come when somebody is there. */
const DeskFrame = lazy(async () => ({ default: (await import('./desk-frame.tsx')).DeskFrame }));

/** Everything behind sign-in. */
export function DeskLayout() {
  const { data: session, error, isPending, refetch } = useQuery(sessionQuery);
  const location = useLocation();

  if (isPending) {
    return (
      <main className="p-4">
        <Loading label="Loading the portal" />
      </main>
    );
  }
  if (session === undefined) {
    return (
      <main className="p-4">
        <LoadFailure what="The portal" error={error} onRetry={() => void refetch()} />
      </main>
    );
  }
  if (session === null) {
    const here = location.pathname + location.search + location.hash;
    const search = here === paths.home ? '' : `?${new URLSearchParams({ to: here }).toString()}`;
    return <Navigate to={paths.signIn + search} replace />;
  }
  return <DeskFrame session={session} />;
}
