import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import type { SessionResponse } from '@trammel/shared/accounts';
import { MemoryRouter, useLocation } from 'react-router-dom';
import { describe, expect, it } from 'vitest';
import { draftKey, writeDraft } from '../lib/draft-storage.ts';
import { fakeApi, problem, type FakeHandler } from '../testing/fake-api.ts';
import { aSession } from '../testing/sessions.ts';
import { Router } from './router.tsx';
import { SessionWatch } from './session-watch.tsx';

function Address() {
  const { pathname, search } = useLocation();
  return <output data-testid="address">{pathname + search}</output>;
}

function open(at: string, session: SessionResponse | null, handlers: Record<string, FakeHandler> = {}) {
  let living = session;
  const calls = fakeApi({
    'GET /api/session': () => living ?? problem('unauthenticated', 'Sign in.'),
    'POST /api/session': () => {
      living = aSession({ roles: ['administrator'], name: 'Mirela Haddow' });
      return living;
    },
    'DELETE /api/session': () => {
      living = null;
      return undefined;
    },
    ...handlers,
  });
  const client = new QueryClient({ defaultOptions: { queries: { retry: false, staleTime: 60_000 } } });
  render(
    <QueryClientProvider client={client}>
      <MemoryRouter initialEntries={[at]}>
        <SessionWatch />
        <Router />
        <Address />
      </MemoryRouter>
    </QueryClientProvider>,
  );
  return { client, calls };
}

const address = () => screen.getByTestId('address').textContent;
const person = {
  id: '6f1c0b6e-2f0f-4c39-9a53-9d1b6a1f0009',
  name: 'Ravi Stonelake',
  email: 'ravi.stonelake@tarnfell.example',
  title: 'Buyer',
  roles: ['purchasing'],
  maySign: false,
  state: 'active',
  lastSeenAt: null,
  version: 4,
};
const people: Record<string, FakeHandler> = { 'GET /api/people': () => ({ items: [person] }) };

describe('the portal', () => {
  it('leads to sign-in and back to the page that was wanted', async () => {
    const user = userEvent.setup();
    open('/people?q=ravi', null, people);
    expect(await screen.findByRole('heading', { name: 'Sign in' })).toBeVisible();
    expect(address()).toBe('/sign-in?to=%2Fpeople%3Fq%3Dravi');
    await user.type(screen.getByLabelText('Mail address'), 'mirela.haddow@tarnfell.example');
    await user.type(screen.getByLabelText('Password'), 'invented parts only');
    await user.click(screen.getByRole('button', { name: 'Sign in' }));
    expect(await screen.findByText('Ravi Stonelake')).toBeVisible();
    expect(address()).toBe('/people?q=ravi');
  });

  it('leads an administrator to the people', async () => {
    open('/', aSession({ roles: ['administrator'] }), people);
    expect(await screen.findByRole('heading', { name: 'People' })).toBeVisible();
    expect(address()).toBe('/people');
  });

  it('shows no control and no page that a role may not use', async () => {
    open('/people', aSession({ roles: ['purchasing'] }), people);
    expect(await screen.findByRole('heading', { name: 'Not found' })).toBeVisible();
    const desks = screen.getByRole('navigation', { name: 'Desks' });
    expect([...desks.querySelectorAll('a')].map((link) => link.textContent)).toEqual(['Buying status']);
  });

  it('forgets everything at sign-out', async () => {
    const user = userEvent.setup();
    const { client, calls } = open('/people', aSession({ roles: ['administrator'] }), people);
    await screen.findByText('Ravi Stonelake');
    await user.click(screen.getByRole('button', { name: /^Account of/ }));
    await user.click(screen.getByRole('menuitem', { name: 'Sign out' }));
    expect(await screen.findByRole('heading', { name: 'Sign in' })).toBeVisible();
    expect(calls.some((call) => call.method === 'DELETE' && call.path === '/api/session')).toBe(true);
    expect(screen.queryByText('Ravi Stonelake')).not.toBeInTheDocument();
    expect(
      JSON.stringify(
        client
          .getQueryCache()
          .getAll()
          .map((query) => query.state.data),
      ),
    ).not.toContain('Ravi');
  });

  it('asks before it drops a draft that never reached the server', async () => {
    const user = userEvent.setup();
    open('/people', aSession({ roles: ['administrator'] }), people);
    await screen.findByText('Ravi Stonelake');
    writeDraft(draftKey('x', 'remark'), { value: 'typed', version: 1, at: '' });
    await user.click(screen.getByRole('button', { name: /^Account of/ }));
    await user.click(screen.getByRole('menuitem', { name: 'Sign out' }));
    expect(await screen.findByRole('dialog', { name: 'Sign out of this browser?' })).toHaveTextContent(
      '1 draft has not reached the server yet and would be lost.',
    );
    expect(address()).toBe('/people');
  });

  it('leads to sign-in when the session has ended meanwhile, and shows nothing of before', async () => {
    const user = userEvent.setup();
    let ended = false;
    open('/people', aSession({ roles: ['administrator'] }), {
      ...people,
      'GET /api/organisation': () => (ended ? problem('unauthenticated', 'Sign in.') : undefined),
      'GET /api/session': () =>
        ended ? problem('unauthenticated', 'Sign in.') : aSession({ roles: ['administrator'] }),
    });
    await screen.findByText('Ravi Stonelake');
    ended = true;
    await user.click(screen.getByRole('tab', { name: 'Sites' }));
    await waitFor(() => expect(address()).toBe('/sign-in?to=%2Fpeople%3Ftab%3Dsites'));
    expect(screen.queryByText('Ravi Stonelake')).not.toBeInTheDocument();
  });

  it('says that the server was not reached, and tries again', async () => {
    const user = userEvent.setup();
    let reachable = false;
    open('/people', null, {
      ...people,
      'GET /api/session': () => {
        if (!reachable) throw new TypeError('fetch failed');
        return aSession({ roles: ['administrator'] });
      },
    });
    expect(await screen.findByRole('alert')).toHaveTextContent('The server was not reached.');
    reachable = true;
    await user.click(screen.getByRole('button', { name: 'Try again' }));
    expect(await screen.findByText('Ravi Stonelake')).toBeVisible();
  });
});
