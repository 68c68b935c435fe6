import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { expect, it } from 'vitest';
import { fakeApi, problem, type FakeHandler } from '../../../testing/fake-api.ts';
import { renderPage } from '../../../testing/render.tsx';
import { aSession } from '../../../testing/sessions.ts';
import { PeoplePage } from './people-page.tsx';

const id = (n: number) => `6f1c0b6e-2f0f-4c39-9a53-9d1b6a1f010${n}`;
const base = { title: '', maySign: false, lastSeenAt: null, version: 3 };
const ravi = {
  ...base,
  id: id(1),
  name: 'Ravi Stonelake',
  email: 'ravi@tarnfell.example',
  roles: ['purchasing'],
  state: 'active',
};
const oda = {
  ...base,
  id: id(2),
  name: 'Oda Fenn',
  email: 'oda@tarnfell.example',
  roles: ['purchasing'],
  state: 'invited',
};

function open(handlers: Record<string, FakeHandler> = {}, at = '/people') {
  const calls = fakeApi({ 'GET /api/people': () => ({ items: [ravi, oda] }), ...handlers });
  const page = renderPage(<PeoplePage />, { at, session: aSession({ roles: ['administrator'], id: id(9) }) });
  return { calls, page };
}

it('finds a person and keeps the search in the address', async () => {
  const user = userEvent.setup();
  const { page } = open();
  await user.type(await screen.findByLabelText('Search'), 'oda');
  expect(screen.queryByText('Ravi Stonelake')).not.toBeInTheDocument();
  expect(page.address()).toBe('/people?q=oda');
  await user.type(screen.getByLabelText('Search'), 'x');
  await user.click(screen.getByRole('button', { name: 'Show everybody' }));
  expect(screen.getByText('Ravi Stonelake')).toBeInTheDocument();
});

it('invites a person once, with the key of one act, and shows what the server refuses at its field', async () => {
  const user = userEvent.setup();
  let attempts = 0;
  const { calls } = open({
    'POST /api/people': () => {
      attempts += 1;
      const errors = [{ pointer: '/email', detail: 'There is already an account with this address.' }];
      return attempts === 1 ? problem('invalid', 'One place was refused.', { errors }) : ravi;
    },
  });
  await user.click(await screen.findByRole('button', { name: 'Invite a person' }));
  const dialog = screen.getByRole('dialog', { name: 'Invite a person' });
  const send = within(dialog).getByRole('button', { name: 'Send the invitation' });
  await user.click(send);
  expect(within(dialog).getByRole('alert')).toHaveTextContent('Roles: Choose at least one role.');
  await user.type(within(dialog).getByLabelText('Name'), 'Ravi Stonelake');
  await user.type(within(dialog).getByLabelText('Mail address'), 'ravi@tarnfell.example');
  await user.click(within(dialog).getByRole('checkbox', { name: 'Purchasing' }));
  await user.click(send);
  expect(await within(dialog).findByLabelText('Mail address')).toHaveAccessibleDescription(
    /There is already an account with this address\./,
  );
  await user.click(send);
  await waitFor(() => expect(screen.queryByRole('dialog')).not.toBeInTheDocument());
  const sent = calls.filter((call) => call.method === 'POST');
  expect(sent.at(-1)?.body).toEqual({
    name: 'Ravi Stonelake',
    email: 'ravi@tarnfell.example',
    title: '',
    roles: ['purchasing'],
    maySign: false,
  });
  expect(new Set(sent.map((call) => call.headers.get('Idempotency-Key'))).size).toBe(1);
});

it('changes a person on the version that was seen, and says when somebody else was faster', async () => {
  const user = userEvent.setup();
  const { calls } = open({ 'PUT /api/people/:id': () => problem('stale-version', 'Changed meanwhile.') });
  await user.click(await screen.findByRole('button', { name: 'Act on the account of Ravi Stonelake' }));
  await user.click(screen.getByRole('menuitem', { name: 'Change' }));
  const dialog = screen.getByRole('dialog', { name: 'Change Ravi Stonelake' });
  await user.type(within(dialog).getByLabelText(/^Title/), 'Buyer');
  await user.click(within(dialog).getByRole('button', { name: 'Save' }));
  expect(await within(dialog).findByRole('alert')).toHaveTextContent(
    'Somebody else changed this person meanwhile.',
  );
  expect(within(dialog).getByLabelText(/^Title/)).toHaveValue('Buyer');
  expect(calls.find((call) => call.method === 'PUT')?.headers.get('If-Match')).toBe('"3"');
});

it('closes an account after one question that names the person', async () => {
  const user = userEvent.setup();
  const { calls } = open({ 'PUT /api/people/:id': () => ({ ...ravi, state: 'disabled', version: 4 }) });
  await user.click(await screen.findByRole('button', { name: 'Act on the account of Ravi Stonelake' }));
  await user.click(screen.getByRole('menuitem', { name: 'Close the account' }));
  const question = screen.getByRole('dialog', { name: 'Close the account of Ravi Stonelake?' });
  await user.click(within(question).getByRole('button', { name: 'Close the account' }));
  await waitFor(() => expect(screen.queryByRole('dialog')).not.toBeInTheDocument());
  expect(calls.find((call) => call.method === 'PUT')?.body).toMatchObject({
    name: 'Ravi Stonelake',
    disabled: true,
  });
});

it('adds a site', async () => {
  const user = userEvent.setup();
  const sites = [{ id: id(5), name: 'Works 1', address: '' }];
  open(
    {
      'GET /api/organisation': () => ({ id: id(8), name: 'Tarnfell Drives', sites }),
      'POST /api/organisation/sites': ({ body }) => {
        const site = { id: id(6), ...(body as { name: string; address: string }) };
        sites.push(site);
        return site;
      },
    },
    '/people?tab=sites',
  );
  await user.type(await screen.findByLabelText('Name'), 'Works 2');
  await user.click(screen.getByRole('button', { name: 'Add the site' }));
  expect(await screen.findByRole('cell', { name: 'Works 2' })).toBeVisible();
  expect(screen.getByLabelText('Name')).toHaveValue('');
});
