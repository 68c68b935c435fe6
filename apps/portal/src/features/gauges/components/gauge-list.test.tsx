import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import type { GaugeResponse } from '@trammel/shared/gauges';
import { describe, expect, it } from 'vitest';
import { fakeApi, problem } from '../../../testing/fake-api.ts';
import { renderPage } from '../../../testing/render.tsx';
import { aSession } from '../../../testing/sessions.ts';
import { GaugeList } from './gauge-list.tsx';

const gauge: GaugeResponse = {
  id: '7b1c0b6e-2f0f-4c39-9a53-9d1b6a1f0020',
  code: 'M-12',
  kind: 'Micrometer 0-25',
  resolution: '0.001',
  unit: 'mm',
  calibratedOn: '2020-01-01',
  dueOn: '2021-01-01',
  certificate: '',
  version: 3,
};
const show = () =>
  renderPage(<GaugeList />, { at: '/gauges', session: aSession({ roles: ['supplier-quality'] }) });

describe('gauges', { timeout: 20_000 }, () => {
  it('show an overdue calibration in words', async () => {
    fakeApi({ 'GET /api/gauges': () => ({ items: [gauge], nextCursor: null }) });
    show();
    const row = (await screen.findByText('M-12')).closest('tr');
    expect(within(row as HTMLElement).getByText(/overdue/)).toBeVisible();
  });

  it('are added with empty entries as unknown, and a code in use is refused at its field', async () => {
    let taken = true;
    const calls = fakeApi({
      'GET /api/gauges': () => ({ items: [], nextCursor: null }),
      'POST /api/gauges': () =>
        taken
          ? problem('invalid', 'One entry needs to be changed.', {
              errors: [{ pointer: '/code', detail: 'There is already a gauge M-12.' }],
            })
          : { ...gauge, version: 1 },
    });
    show();
    const user = userEvent.setup();
    await user.click((await screen.findAllByRole('button', { name: 'Add a gauge' }))[0] as HTMLElement);
    await user.click(screen.getByRole('button', { name: 'Add the gauge' }));
    expect(screen.getByLabelText(/Gauge code/)).toBeInvalid();
    await user.type(screen.getByLabelText(/Gauge code/), 'M-12');
    await user.type(screen.getByLabelText(/^Kind/), 'Micrometer');
    await user.click(screen.getByRole('button', { name: 'Add the gauge' }));
    await waitFor(() =>
      expect(screen.getByLabelText(/Gauge code/)).toHaveAccessibleDescription(/already a gauge M-12/),
    );
    taken = false;
    await user.click(screen.getByRole('button', { name: 'Add the gauge' }));
    await waitFor(() => expect(screen.queryByRole('dialog')).toBeNull());
    expect(calls.findLast((call) => call.method === 'POST')?.body).toMatchObject({
      resolution: null,
      dueOn: null,
    });
  });

  it('changed by a colleague meanwhile are shown before anything is overwritten', async () => {
    const newer = { ...gauge, kind: 'Micrometer 0-25 digital', version: 4 };
    const calls = fakeApi({
      'GET /api/gauges': () => ({ items: [gauge], nextCursor: null }),
      'PUT /api/gauges/:id': ({ headers }) =>
        headers.get('If-Match') === '"4"'
          ? { ...newer, version: 5 }
          : problem('stale-version', 'Changed.', { current: newer }),
    });
    show();
    const user = userEvent.setup();
    await user.click(await screen.findByRole('button', { name: 'Change gauge M-12' }));
    await user.type(screen.getByLabelText(/Certificate/), 'K-881');
    await user.click(screen.getByRole('button', { name: 'Save' }));
    expect(await screen.findByText('A colleague changed this gauge')).toBeVisible();
    await user.click(screen.getByRole('button', { name: 'Keep mine, save over it' }));
    await user.click(screen.getByRole('button', { name: 'Save' }));
    await waitFor(() => expect(screen.queryByRole('dialog')).toBeNull());
    expect(calls.at(-2)?.headers.get('If-Match') ?? calls.at(-1)?.headers.get('If-Match')).toBe('"4"');
  });
});
