import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { fakeApi, problem } from '../../../testing/fake-api.ts';
import { renderPage } from '../../../testing/render.tsx';
import { aSession } from '../../../testing/sessions.ts';
import { aWorklistItem } from '../../../testing/submissions.ts';
import { Worklist } from './worklist.tsx';

const session = aSession({ roles: ['supplier-quality'] });
const show = (at = '/worklist') => renderPage(<Worklist />, { at, session });

describe('the worklist', { timeout: 20_000 }, () => {
  it('says of each package what comes next, how many findings stop it, and when it is due', async () => {
    fakeApi({ 'GET /api/worklist': () => ({ items: [aWorklistItem()], nextCursor: null }) });
    show();
    const row = (await screen.findByText('Measure the remaining 10 rows')).closest('tr');
    expect(row).not.toBeNull();
    const cells = within(row as HTMLElement);
    expect(cells.getByText('2 stop submission')).toBeVisible();
    expect(cells.getByText('20 of 30')).toBeVisible();
    expect(cells.getByRole('link', { name: /TD-20417/ })).toHaveAttribute(
      'href',
      expect.stringContaining('/submissions/'),
    );
  });

  it('opens the request of a package that is not acknowledged yet', async () => {
    const item = aWorklistItem({ state: 'requested', nextStep: 'Acknowledge the request or ask a question' });
    fakeApi({ 'GET /api/worklist': () => ({ items: [item], nextCursor: null }) });
    show();
    expect(await screen.findByRole('link', { name: /TD-20417/ })).toHaveAttribute(
      'href',
      `/requests/${item.requestId}`,
    );
  });

  it('keeps search, sort and page in the address', async () => {
    const calls = fakeApi({
      'GET /api/worklist': () => ({ items: [aWorklistItem()], nextCursor: 'next-page' }),
    });
    const page = show('/worklist?sort=partNumber');
    const user = userEvent.setup();
    await screen.findByText('Measure the remaining 10 rows');
    expect(calls[0]?.query.get('sort')).toBe('partNumber');
    await user.type(screen.getByLabelText('Search'), 'shaft');
    await waitFor(() => expect(page.address()).toContain('q=shaft'));
    await user.click(await screen.findByRole('button', { name: 'Next page' }));
    await waitFor(() => expect(page.address()).toContain('cursor=next-page'));
    await waitFor(() => expect(calls.at(-1)?.query.get('q')).toBe('shaft'));
  });

  it('says what comes next when nothing is owed, and how to widen a search without a hit', async () => {
    fakeApi({ 'GET /api/worklist': () => ({ items: [], nextCursor: null }) });
    const empty = show();
    expect(await screen.findByText('Nothing is owed')).toBeVisible();
    empty.unmount();
    const page = show('/worklist?q=nothing');
    await userEvent.click(await screen.findByRole('button', { name: 'Clear search and state' }));
    await waitFor(() => expect(page.address()).toBe('/worklist'));
  });

  it('offers to try again when it could not be loaded', async () => {
    let fails = true;
    fakeApi({
      'GET /api/worklist': () =>
        fails
          ? problem('unavailable', 'The server is busy.')
          : { items: [aWorklistItem()], nextCursor: null },
    });
    show();
    const again = await screen.findByRole('button', { name: 'Try again' });
    fails = false;
    await userEvent.click(again);
    expect(await screen.findByText('Measure the remaining 10 rows')).toBeVisible();
  });
});
