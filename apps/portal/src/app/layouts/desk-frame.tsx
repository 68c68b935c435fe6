import type { SessionResponse } from '@trammel/shared/accounts';
import { useEffect, useRef } from 'react';
import { Outlet, useLocation } from 'react-router-dom';
import { KeyboardHelp } from '../../components/ui/keyboard-help.tsx';
import { ToastRegion } from '../../components/ui/toast.tsx';
import { TopBar } from './top-bar.tsx';

/** Bar, content and foot around every page of a signed-in person. */
export function DeskFrame({ session }: { session: SessionResponse }) {
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
