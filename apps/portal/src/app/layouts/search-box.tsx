import type { SessionResponse } from '@trammel/shared/accounts';
import { useRef, useState } from 'react';
import { useLocation, useNavigate } from 'react-router-dom';
import { useKeys } from '../../lib/use-keys.ts';
import { searchTargets } from './desk-links.ts';

/** Looks through the person's own desk. */
export function SearchBox({ session }: { session: SessionResponse }) {
  const input = useRef<HTMLInputElement>(null);
  const [text, setText] = useState('');
  const navigate = useNavigate();
  const { pathname } = useLocation();
  const targets = searchTargets.filter((link) => session.permissions.includes(link.needs));
  const target = targets.find((link) => link.path === pathname) ?? targets[0];
  useKeys(
    'Everywhere',
    [{ keys: '/', label: 'Search', run: () => input.current?.focus() }],
    target !== undefined,
  );
  if (target === undefined) return null;
  return (
    <form
      role="search"
      className="max-sm:hidden"
      onSubmit={(event) => {
        event.preventDefault();
        const search = new URLSearchParams({ show: 'all', q: text.trim() });
        void navigate(text.trim() === '' ? target.path : `${target.path}?${search.toString()}`);
      }}
    >
      <input
        ref={input}
        type="search"
        value={text}
        onChange={(event) => setText(event.currentTarget.value)}
        aria-label={`Search the ${target.label.toLowerCase()}`}
        placeholder="Part, supplier, request"
        className="min-h-8 w-48 rounded border border-pencil bg-paper px-2 placeholder:text-pencil"
      />
    </form>
  );
}
