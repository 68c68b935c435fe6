import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { expect, it, vi } from 'vitest';
import { fakeApi, problem } from '../../../testing/fake-api.ts';
import { renderPage } from '../../../testing/render.tsx';
import { aSession } from '../../../testing/sessions.ts';
import { browserInWords } from '../browser-in-words.ts';
import { ChangePasswordForm } from './change-password-form.tsx';
import { DemoPeople } from './demo-people.tsx';
import { ForgottenPassword } from './forgotten-password.tsx';
import { SessionList } from './session-list.tsx';
import { TokenPage } from './token-page.tsx';

it('offers the demo people by name and desk, and signs in as the one chosen', async () => {
  const user = userEvent.setup();
  const onSignedIn = vi.fn();
  const calls = fakeApi({
    'GET /api/demo/people': () => ({
      password: 'invented parts only',
      people: [
        {
          name: 'Ines Carrow',
          email: 'ines@x.example',
          title: 'Reviewer',
          organisation: 'Tarnfell Drives',
          desk: 'Review desk',
        },
        {
          name: 'Joana Pell',
          email: 'joana@x.example',
          title: '',
          organisation: 'Quillmark Turning',
          desk: 'Worklist',
        },
      ],
    }),
    'POST /api/session': () => aSession(),
  });
  renderPage(<DemoPeople onSignedIn={onSignedIn} />);
  expect(await screen.findByRole('heading', { name: 'Quillmark Turning' })).toBeVisible();
  await user.click(screen.getByRole('button', { name: /Ines Carrow.*Review desk/ }));
  expect(calls.at(-1)?.body).toEqual({ email: 'ines@x.example', password: 'invented parts only' });
  expect(onSignedIn.mock.calls[0]?.[0]).toMatchObject({ user: { name: 'Ines Carrow' } });
});

it('offers nobody outside a demonstration', async () => {
  const calls = fakeApi({ 'GET /api/demo/people': () => problem('not-found', 'There is nothing here.') });
  const { container } = renderPage(<DemoPeople onSignedIn={() => undefined} />);
  await vi.waitFor(() => expect(calls).toHaveLength(1));
  expect(container).toHaveTextContent('');
});

it('answers alike for known and unknown addresses when a password was forgotten', async () => {
  const user = userEvent.setup();
  fakeApi({ 'POST /api/password-resets': () => undefined });
  renderPage(<ForgottenPassword />);
  await user.type(screen.getByLabelText('Mail address'), 'nobody@x.example');
  await user.click(screen.getByRole('button', { name: 'Send the link' }));
  expect(await screen.findByRole('status')).toHaveTextContent('If there is an account for nobody@x.example');
});

const page = (token: string) => (
  <TokenPage
    token={token}
    title="Accept the invitation"
    lead={(name) => name}
    submitLabel="Accept"
    spent="Ask again."
  />
);

it('sets a password once through the link of a mail', async () => {
  const user = userEvent.setup();
  const calls = fakeApi({
    'GET /api/account-tokens/:token': () => ({
      kind: 'invitation',
      name: 'Oda Fenn',
      email: 'oda@x.example',
      organisationName: 'Tarnfell Drives',
    }),
    'POST /api/account-tokens/:token/password': () => undefined,
  });
  renderPage(page('token-of-a-mail'));
  await user.type(await screen.findByLabelText('New password'), 'too short');
  await user.click(screen.getByRole('button', { name: 'Accept' }));
  expect(screen.getByRole('alert')).toHaveTextContent('New password: Use at least 15 characters');
  await user.type(screen.getByLabelText('New password'), ' but longer now');
  await user.click(screen.getByRole('button', { name: 'Accept' }));
  expect(await screen.findByRole('link', { name: 'Sign in' })).toHaveAttribute('href', '/sign-in');
  expect(calls.at(-1)).toMatchObject({
    path: '/api/account-tokens/token-of-a-mail/password',
    body: { newPassword: 'too short but longer now' },
  });
});

it('says what to do with a link that is spent', async () => {
  fakeApi({ 'GET /api/account-tokens/:token': () => problem('not-found', 'There is nothing here.') });
  renderPage(page('spent'));
  expect(await screen.findByText('This link does not work any more')).toBeVisible();
  expect(screen.getByText('Ask again.')).toBeVisible();
});

it('empties the form after the password was changed, and keeps it when it was refused', async () => {
  const user = userEvent.setup();
  const errors = [{ pointer: '/currentPassword', detail: 'This is not the current password.' }];
  let answer: Response | undefined = problem('invalid', 'Refused.', { errors });
  fakeApi({ 'PUT /api/account/password': () => answer });
  renderPage(<ChangePasswordForm onChanged={() => undefined} />);
  await user.type(screen.getByLabelText('Current password'), 'wrong');
  await user.type(screen.getByLabelText('New password'), 'four words in a row');
  await user.click(screen.getByRole('button', { name: 'Change the password' }));
  expect(await screen.findByLabelText('Current password')).toHaveAccessibleDescription(
    'This is not the current password.',
  );
  expect(screen.getByLabelText('New password')).toHaveValue('four words in a row');
  answer = undefined;
  await user.click(screen.getByRole('button', { name: 'Change the password' }));
  await vi.waitFor(() => expect(screen.getByLabelText('New password')).toHaveValue(''));
});

it('lists sessions, ends another one, and asks before it ends them all', async () => {
  const user = userEvent.setup();
  const at = '2026-12-01T10:00:00.000Z';
  const one = (n: number, userAgent: string, current: boolean) => ({
    id: `6f1c0b6e-2f0f-4c39-9a53-9d1b6a1f020${n}`,
    createdAt: at,
    lastSeenAt: at,
    userAgent,
    current,
  });
  let items = [one(1, 'X11; Linux x86_64 Firefox/140', true), one(2, 'iPhone Safari/600', false)];
  const onEndAll = vi.fn(() => Promise.resolve());
  fakeApi({
    'GET /api/sessions': () => ({ items }),
    'DELETE /api/sessions/:id': ({ params }) => {
      items = items.filter((item) => item.id !== params.id);
    },
  });
  renderPage(<SessionList onEndAll={onEndAll} />);
  await user.click(await screen.findByRole('button', { name: 'End the session in Safari on iOS' }));
  await vi.waitFor(() => expect(screen.queryByText('Safari on iOS')).not.toBeInTheDocument());
  expect(screen.getByText('Firefox on Linux')).toBeVisible();
  await user.click(screen.getByRole('button', { name: 'Sign out everywhere' }));
  expect(onEndAll).not.toHaveBeenCalled();
  const question = screen.getByRole('dialog', { name: 'Sign out everywhere?' });
  await user.click(within(question).getByRole('button', { name: 'Sign out everywhere' }));
  expect(onEndAll).toHaveBeenCalledTimes(1);
});

it.each([
  [
    'Mozilla/5.0 (Windows NT 10.0; Win64; x64) AppleWebKit/537.36 Chrome/140.0 Safari/537.36 Edg/140.0',
    'Edge on Windows',
  ],
  [
    'Mozilla/5.0 (Linux; Android 15) AppleWebKit/537.36 Chrome/140.0 Mobile Safari/537.36',
    'Chrome or Chromium on Android',
  ],
  ['', 'not stated'],
  ['curl/8.0', 'curl/8.0'],
])('tells %j as %j', (userAgent, words) => {
  expect(browserInWords(userAgent)).toBe(words);
});
