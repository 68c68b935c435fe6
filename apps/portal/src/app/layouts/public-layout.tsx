import { Outlet } from 'react-router-dom';
import { Mark } from './mark.tsx';
import { ThemeSwitch } from './theme-switch.tsx';

/** Pages that need no sign-in. */
export function PublicLayout() {
  return (
    <>
      <header className="flex items-center justify-between border-b border-rule bg-sheet px-4 py-2 max-sm:px-3">
        <span className="flex items-center gap-2 text-[1.0625rem] font-semibold">
          <Mark />
          Trammel
        </span>
        <ThemeSwitch />
      </header>
      <main id="main" className="mx-auto max-w-5xl px-4 py-8 max-sm:px-3 max-sm:py-5">
        <Outlet />
      </main>
    </>
  );
}
