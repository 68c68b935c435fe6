import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it } from 'vitest';
import { fakeApi, problem } from '../../../testing/fake-api.ts';
import { renderPage } from '../../../testing/render.tsx';
import { aSession } from '../../../testing/sessions.ts';
import { anElement, aSubmission } from '../../../testing/submissions.ts';
import { ElementCard } from './element-card.tsx';

const session = aSession({ roles: ['supplier-quality'] });
const submission = aSubmission();
const show = (element = anElement(), editable = true) =>
  renderPage(<ElementCard element={element} submission={submission} editable={editable} />, { session });

beforeEach(() => localStorage.clear());

describe('an element', { timeout: 20_000 }, () => {
  it('saves itself with the version that was read', async () => {
    const calls = fakeApi({
      'PUT /api/elements/:id': ({ body }) => ({ ...anElement(), ...(body as object), version: 2 }),
    });
    show();
    const user = userEvent.setup();
    await user.click(screen.getByRole('button', { name: 'Open Control plan' }));
    await user.type(screen.getByLabelText(/Revision stated/), 'B');
    expect(screen.getByText('Differs from the package: C')).toBeVisible();
    await waitFor(() => expect(calls).toHaveLength(1), { timeout: 3000 });
    expect(calls[0]?.headers.get('If-Match')).toBe('"1"');
    expect(calls[0]?.body).toMatchObject({ statedRevision: 'B', state: 'open' });
    expect(await screen.findByText(/^Saved/)).toBeVisible();
  });

  it('shows a refusal beside its field and keeps what was typed', async () => {
    fakeApi({
      'PUT /api/elements/:id': () =>
        problem('invalid', 'One entry needs to be changed.', {
          errors: [{ pointer: '/reason', detail: 'Say why this element does not apply.' }],
        }),
    });
    show();
    const user = userEvent.setup();
    await user.click(screen.getByRole('button', { name: 'Open Control plan' }));
    await user.click(screen.getByRole('radio', { name: 'not applicable' }));
    const reason = await screen.findByLabelText('Reason');
    await waitFor(() => expect(reason).toHaveAccessibleDescription(/Say why this element/), {
      timeout: 3000,
    });
    expect(screen.getByRole('radio', { name: 'not applicable' })).toBeChecked();
  });

  it('lets a conflict be decided by the person', async () => {
    const theirs = anElement({ note: 'Signed copy follows', version: 5 });
    const calls = fakeApi({
      'PUT /api/elements/:id': ({ headers, body }) =>
        headers.get('If-Match') === '"5"'
          ? { ...theirs, ...(body as object), version: 6 }
          : problem('stale-version', 'This was changed.', { current: theirs }),
    });
    show();
    const user = userEvent.setup();
    await user.click(screen.getByRole('button', { name: 'Open Control plan' }));
    await user.type(screen.getByLabelText(/^Note/), 'Sheet 2');
    await user.click(await screen.findByRole('button', { name: 'Write mine over it' }, { timeout: 3000 }));
    await waitFor(() => expect(calls.at(-1)?.headers.get('If-Match')).toBe('"5"'), { timeout: 3000 });
    expect(calls.at(-1)?.body).toMatchObject({ note: 'Sheet 2' });
  });

  it('is read only where the person may not change it, with the reviewer’s remark', async () => {
    fakeApi({});
    show(
      anElement({
        state: 'not-applicable',
        reason: 'No design responsibility',
        mark: { mark: 'refused', remark: 'Still needed', by: 'Ines Carrow', at: '2026-11-20T08:00:00.000Z' },
      }),
      false,
    );
    await userEvent.click(screen.getByRole('button', { name: 'Open Control plan' }));
    expect(screen.getByText('No design responsibility')).toBeVisible();
    expect(screen.getByText(/Still needed/)).toBeVisible();
    expect(screen.queryByRole('radio')).toBeNull();
    expect(screen.queryByRole('button', { name: /Choose files/ })).toBeNull();
  });
});
