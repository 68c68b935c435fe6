import { useQueryClient } from '@tanstack/react-query';
import type { SessionResponse } from '@trammel/shared/accounts';
import { useState } from 'react';
import { Link, NavLink, useNavigate } from 'react-router-dom';
import { ConfirmDialog } from '../../components/ui/confirm-dialog.tsx';
import { Menu } from '../../components/ui/menu.tsx';
import { cn } from '../../lib/cn.ts';
import { countDrafts } from '../../lib/draft-storage.ts';
import { countOf } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { endSession } from '../../lib/session-change.ts';
import { deskLinks } from './desk-links.ts';
import { Mark } from './mark.tsx';
import { SearchBox } from './search-box.tsx';
import { ThemeSwitch } from './theme-switch.tsx';

export function TopBar({ session }: { session: SessionResponse }) {
  const links = deskLinks.filter((link) => session.permissions.includes(link.needs));
  return (
    <header className="no-print border-b border-rule bg-sheet">
      <div className="flex flex-wrap items-center gap-x-4 px-4 max-sm:px-3">
        <Link
          to={paths.home}
          aria-label="Trammel, to your desk"
          className="flex items-center gap-2 py-2 text-graphite no-underline"
        >
          <Mark />
          <span className="text-[1.0625rem] font-semibold">Trammel</span>
        </Link>
        <nav
          aria-label="Desks"
          className="order-last -mx-1 flex min-w-0 grow gap-1 overflow-x-auto max-lg:basis-full lg:order-none"
        >
          {links.map((link) => (
            <NavLink
              key={link.path}
              to={link.path}
              className={({ isActive }) =>
                cn(
                  'flex min-h-11 items-center border-b-3 px-2 whitespace-nowrap text-graphite no-underline -outline-offset-2 hover:text-marking max-lg:min-h-10',
                  isActive ? 'border-marking font-semibold' : 'border-transparent',
                )
              }
            >
              {link.label}
            </NavLink>
          ))}
        </nav>
        <div className="ml-auto flex items-center gap-2">
          <SearchBox session={session} />
          <ThemeSwitch />
          <AccountMenu session={session} />
        </div>
      </div>
    </header>
  );
}

function AccountMenu({ session }: { session: SessionResponse }) {
  const client = useQueryClient();
  const navigate = useNavigate();
  const [asking, setAsking] = useState(false);
  const leave = async () => {
    await endSession(client);
    await navigate(paths.signIn, { replace: true });
  };
  const signOut = () => {
    if (countDrafts() > 0) setAsking(true);
    else leave().catch(() => setAsking(true));
  };
  return (
    <>
      <Menu
        weight="quiet"
        accessibleLabel={`Account of ${session.user.name}, ${session.organisation.name}`}
        label={
          <span className="max-w-36 truncate text-start leading-4 text-graphite">
            {session.user.name}
            <span className="caption block truncate max-sm:hidden">{session.organisation.name}</span>
          </span>
        }
        items={[
          { label: 'Your account', to: paths.account },
          { label: 'Sign out', onSelect: signOut },
        ]}
      />
      <SignOutQuestion open={asking} onClose={() => setAsking(false)} leave={leave} />
    </>
  );
}

function SignOutQuestion({
  open,
  onClose,
  leave,
}: {
  open: boolean;
  onClose: () => void;
  leave: () => Promise<void>;
}) {
  const drafts = open ? countDrafts() : 0;
  return (
    <ConfirmDialog
      open={open}
      onClose={onClose}
      title="Sign out of this browser?"
      consequence={
        drafts === 0
          ? 'Everything you typed has been saved.'
          : `${countOf(drafts, 'draft has', 'drafts have')} not reached the server yet and would be lost.`
      }
      danger={drafts > 0}
      confirmLabel="Sign out"
      onConfirm={leave}
    />
  );
}
