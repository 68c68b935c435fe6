import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it } from 'vitest';
import { fakeApi, problem } from '../../../testing/fake-api.ts';
import { renderPage } from '../../../testing/render.tsx';
import { aSession } from '../../../testing/sessions.ts';
import { aRequest } from '../../../testing/submissions.ts';
import { NewRequest } from './new-request.tsx';

const session = aSession();
const request = aRequest({ state: 'draft', side: 'customer' });
const options = {
  'GET /api/suppliers': () => ({
    items: [
      {
        ...request.supplier,
        supplierNumber: '',
        sites: [{ ...request.site, address: '' }],
        linkedAt: '2026-01-01T08:00:00.000Z',
        state: 'active',
      },
    ],
  }),
  'GET /api/organisation/reviewers': () => ({
    items: [{ id: session.user.id, name: 'Ines Carrow', title: 'Quality reviewer', maySign: true }],
  }),
  'GET /api/request-elements': () => ({
    source: 'Published table',
    levels: [1, 2, 3, 4, 5].map((level) => ({ level, elements: request.elements })),
  }),
  'GET /api/parts': () => ({
    items: [
      {
        ...request.part,
        currentRevision: 'C',
        draftRevision: null,
        openPackages: 0,
        createdAt: '2026-01-01T08:00:00.000Z',
      },
    ],
    nextCursor: null,
  }),
  'GET /api/parts/:id': () => ({
    ...request.part,
    material: '',
    commodity: '',
    unitSystem: 'metric',
    version: 1,
    revisions: [
      {
        id: request.revision.id,
        code: 'C',
        state: 'released',
        releasedAt: '2026-01-01T08:00:00.000Z',
        characteristicCount: 16,
        hasDrawing: true,
      },
    ],
  }),
};

const show = () => renderPage(<NewRequest />, { at: '/requests/new', session });

async function fillIn(user: ReturnType<typeof userEvent.setup>) {
  await screen.findByRole('option', { name: /TD-20417/ });
  await user.selectOptions(screen.getByLabelText('Part'), request.part.id);
  await screen.findByRole('option', { name: 'C, released' });
  await user.selectOptions(screen.getByLabelText('Supplier'), request.supplier.id);
  await user.type(screen.getByLabelText('Due'), '2099-12-31');
}

beforeEach(() => localStorage.clear());

describe('a new request', { timeout: 20_000 }, () => {
  it('names what is missing with links to the fields, and sends nothing', async () => {
    const calls = fakeApi(options);
    show();
    const user = userEvent.setup();
    await user.click(await screen.findByRole('button', { name: 'Save the draft' }));
    expect(await screen.findByRole('alert')).toHaveTextContent('Choose a supplier.');
    expect(screen.getByLabelText('Supplier')).toHaveAccessibleDescription(/Choose a supplier/);
    expect(calls.filter((call) => call.method === 'POST')).toHaveLength(0);
  });

  it('chooses the released revision and the only site by itself, and opens the saved draft', async () => {
    const calls = fakeApi({ ...options, 'POST /api/requests': () => request });
    const page = show();
    const user = userEvent.setup();
    await fillIn(user);
    await waitFor(() => expect(screen.getByLabelText('Revision')).toHaveValue(request.revision.id));
    expect(screen.getByLabelText('Site that makes the part')).toHaveValue(request.site.id);
    await user.click(screen.getByRole('button', { name: 'Save the draft' }));
    await waitFor(() => expect(page.address()).toBe(`/requests/${request.id}`));
    expect(calls.find((call) => call.method === 'POST')?.body).toMatchObject({
      revisionId: request.revision.id,
      level: 3,
      reviewerIds: [session.user.id],
      elements: request.elements,
    });
  });

  it('keeps what was typed over a refusal and a closed tab', async () => {
    fakeApi({ ...options, 'POST /api/requests': () => problem('unavailable', 'The server is busy.') });
    const page = show();
    const user = userEvent.setup();
    await fillIn(user);
    await user.type(screen.getByLabelText(/Message/), 'First parts');
    await user.click(screen.getByRole('button', { name: 'Save the draft' }));
    expect(await screen.findByRole('alert')).toHaveTextContent('The server is busy.');
    expect(screen.getByLabelText(/Message/)).toHaveValue('First parts');
    page.unmount();
    show();
    expect(await screen.findByText('What you typed last time is here again')).toBeVisible();
    expect(screen.getByLabelText(/Message/)).toHaveValue('First parts');
    await user.click(screen.getByRole('button', { name: 'Start with an empty request' }));
    expect(screen.getByLabelText(/Message/)).toHaveValue('');
  });
});
