import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { expect, it } from 'vitest';
import { fakeApi } from '../../../testing/fake-api.ts';
import { renderPage } from '../../../testing/render.tsx';
import { aSession } from '../../../testing/sessions.ts';
import { AuditPage } from './audit-page.tsx';

const event = (number: number) => ({
  number,
  at: '2026-12-01T10:00:00.000Z',
  actor: 'Mirela Haddow',
  organisation: 'Tarnfell Drives',
  action: 'person.changed',
  objectType: 'person',
  objectId: '6f1c0b6e-2f0f-4c39-9a53-9d1b6a1f0301',
  summary: `Act ${number}`,
  before: { maySign: false },
  after: { maySign: true },
  hash: 'a3f5'.repeat(16),
});

function open(sound: boolean) {
  const calls = fakeApi({
    'GET /api/audit': ({ query }) =>
      query.get('cursor') === null
        ? { items: [event(3), event(2)], nextCursor: 'next' }
        : { items: [event(1)], nextCursor: null },
    'GET /api/audit/verification': () =>
      sound
        ? { rows: 3, sound: true, firstBroken: null, reason: null }
        : { rows: 3, sound: false, firstBroken: 2, reason: 'The digest does not fit the content.' },
  });
  const page = renderPage(<AuditPage />, {
    at: '/audit',
    route: '/audit',
    session: aSession({ roles: ['administrator'] }),
  });
  return { calls, page };
}

it('turns pages through the address and shows an entry whole', async () => {
  const user = userEvent.setup();
  const { page } = open(true);
  await user.click(await screen.findByRole('button', { name: 'Details of entry 3' }));
  expect(screen.getByRole('dialog', { name: 'Entry 3: Act 3' })).toHaveTextContent('"maySign": true');
  await user.click(screen.getByRole('button', { name: 'Close' }));
  await user.click(screen.getByRole('button', { name: 'Next page' }));
  expect(await screen.findByText('Act 1')).toBeVisible();
  expect(page.address()).toBe('/audit?cursor=next');
  expect(screen.getByRole('link', { name: 'First page' })).toHaveAttribute('href', '/audit');
});

it('starts a search at the first page', async () => {
  const user = userEvent.setup();
  const { calls, page } = open(true);
  await user.click(await screen.findByRole('button', { name: 'Next page' }));
  await user.type(screen.getByLabelText('Search'), 'p');
  await waitFor(() => expect(page.address()).toBe('/audit?q=p'));
  expect(calls.at(-1)?.query.has('cursor')).toBe(false);
});

it('tells a sound chain from a broken one', async () => {
  const user = userEvent.setup();
  open(true);
  await user.click(await screen.findByRole('button', { name: 'Verify the chain' }));
  expect(await screen.findByText('The chain is sound')).toBeVisible();
});

it('names the entry where a chain breaks', async () => {
  const user = userEvent.setup();
  open(false);
  await user.click(await screen.findByRole('button', { name: 'Verify the chain' }));
  expect(await screen.findByRole('alert')).toHaveTextContent(
    'The chain is broken at entry 2The digest does not fit the content.',
  );
});
