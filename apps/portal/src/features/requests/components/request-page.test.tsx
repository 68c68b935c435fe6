import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { fakeApi, problem } from '../../../testing/fake-api.ts';
import { renderPage } from '../../../testing/render.tsx';
import { aSession } from '../../../testing/sessions.ts';
import { aRequest } from '../../../testing/submissions.ts';
import { RequestPage } from './request-page.tsx';

const supplier = aSession({ roles: ['supplier-quality'] });
const question = {
  id: '7b1c0b6e-2f0f-4c39-9a53-9d1b6a1f0099',
  kind: 'question',
  text: 'Before or after coating?',
  author: 'Joana Pell',
  organisation: 'Quillmark Turning',
  writtenAt: '2026-11-20T08:00:00.000Z',
};
const show = (id: string, session = supplier) => renderPage(<RequestPage requestId={id} />, { session });

describe('the page of a request', { timeout: 20_000 }, () => {
  it('lets the supplier acknowledge and goes on to the package', async () => {
    const request = aRequest();
    const acknowledged = aRequest({
      acknowledgedAt: '2026-11-20T08:00:00.000Z',
      acknowledgedBy: 'Joana Pell',
      rounds: [{ id: request.rounds[0]?.id ?? '', round: 1, state: 'in-preparation' }],
      abilities: { ...request.abilities, acknowledge: false },
    });
    fakeApi({
      'GET /api/requests/:id': () => request,
      'GET /api/requests/:id/messages': () => ({ items: [] }),
      'POST /api/requests/:id/acknowledge': () => acknowledged,
    });
    const page = show(request.id);
    await userEvent.click(await screen.findByRole('button', { name: 'Acknowledge the request' }));
    await waitFor(() => expect(page.address()).toBe(`/submissions/${request.rounds[0]?.id}`));
  });

  it('says why an acknowledgement was refused', async () => {
    fakeApi({
      'GET /api/requests/:id': () => aRequest(),
      'GET /api/requests/:id/messages': () => ({ items: [] }),
      'POST /api/requests/:id/acknowledge': () =>
        problem('conflict', 'The customer has withdrawn this request.'),
    });
    show(aRequest().id);
    await userEvent.click(await screen.findByRole('button', { name: 'Acknowledge the request' }));
    expect(await screen.findByRole('alert')).toHaveTextContent('withdrawn');
  });

  it('offers an answer only to the side that was asked', async () => {
    const own = (isOwn: boolean) => ({
      'GET /api/requests/:id': () => aRequest({ questionOpen: true }),
      'GET /api/requests/:id/messages': () => ({ items: [{ ...question, own: isOwn }] }),
    });
    fakeApi(own(true));
    const asker = show(aRequest().id);
    expect(await screen.findByText('Before or after coating?')).toBeVisible();
    expect(screen.queryByRole('radio', { name: 'Answer' })).toBeNull();
    asker.unmount();
    fakeApi(own(false));
    show(aRequest().id);
    expect(await screen.findByRole('radio', { name: 'Answer' })).toBeChecked();
  });

  it('withdraws only with a reason and after the consequence was read', async () => {
    const request = aRequest({
      side: 'customer',
      abilities: { ...aRequest().abilities, acknowledge: false, withdraw: true },
    });
    const calls = fakeApi({
      'GET /api/requests/:id': () => request,
      'GET /api/requests/:id/messages': () => ({ items: [] }),
      'POST /api/requests/:id/withdraw': () =>
        aRequest({ ...request, state: 'withdrawn', withdrawnReason: 'New drawing', version: 3 }),
    });
    show(request.id, aSession());
    const user = userEvent.setup();
    await user.click(await screen.findByRole('button', { name: 'Withdraw the request' }));
    const dialog = await screen.findByRole('dialog');
    expect(dialog).toHaveTextContent('told by mail');
    await user.type(screen.getByLabelText('Reason'), 'New drawing');
    await user.click(screen.getAllByRole('button', { name: 'Withdraw the request' }).at(-1) ?? dialog);
    await waitFor(() => expect(calls.some((call) => call.path.endsWith('/withdraw'))).toBe(true));
    const sent = calls.find((call) => call.path.endsWith('/withdraw'));
    expect(sent?.body).toEqual({ reason: 'New drawing' });
    expect(sent?.headers.get('If-Match')).toBe('"2"');
  });
});
