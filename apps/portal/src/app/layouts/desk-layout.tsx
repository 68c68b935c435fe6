import { useQuery } from '@tanstack/react-query';
import { useEffect, useRef } from 'react';
import { Navigate, Outlet, useLocation } from 'react-router-dom';
import { KeyboardHelp } from '../../components/ui/keyboard-help.tsx';
import { Loading, LoadFailure } from '../../components/ui/loading.tsx';
import { ToastRegion } from '../../components/ui/toast.tsx';
import { paths } from '../../lib/paths.ts';
import { sessionQuery } from '../../lib/session.ts';
import { TopBar } from './top-bar.tsx';

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
  return (
    <>
      <a
        href="#main"
        className="sr-only focus:not-sr-only focus:absolute focus:z-50 focus:m-2 focus:bg-sheet focus:px-3 focus:py-2"
      >
        Skip to the content
      </a>
      <TopBar session={session} />
      <Main />
      <footer className="no-print px-4 pb-6 text-[0.8125rem] text-pencil">
        {session.demo && 'Demonstration: every organisation, person and value here is invented. '}
        Press <kbd>?</kbd> for the keys of this page.
      </footer>
      <ToastRegion />
      <KeyboardHelp />
    </>
  );
}

function Main() {
  const main = useRef<HTMLElement>(null);
  const { pathname } = useLocation();
  const shown = useRef(pathname);
  useEffect(() => {
    // A new page is read from its top; a change of filters leaves focus and scroll where they are.
    if (shown.current === pathname) return;
    shown.current = pathname;
    main.current?.focus({ preventScroll: true });
    window.scrollTo(0, 0);
  }, [pathname]);
  return (
    <main ref={main} id="main" tabIndex={-1} className="min-h-[70dvh] px-4 py-4 max-sm:px-3 print:p-0">
      <Outlet />
    </main>
  );
}
