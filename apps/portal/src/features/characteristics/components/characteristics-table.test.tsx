import { fireEvent, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import type { CharacteristicResponse } from '@trammel/shared/characteristics';
import { beforeEach, describe, expect, it } from 'vitest';
import { fakeApi, problem } from '../../../testing/fake-api.ts';
import { renderPage } from '../../../testing/render.tsx';
import { aSession } from '../../../testing/sessions.ts';
import { CharacteristicsTable } from './characteristics-table.tsx';

const revisionId = '6f1c0b6e-2f0f-4c39-9a53-9d1b6a1f0010';

const item = (balloon: string, overrides: Partial<CharacteristicResponse> = {}): CharacteristicResponse => ({
  id: `6f1c0b6e-2f0f-4c39-9a53-9d1b6a1f01${balloon.padStart(2, '0')}`,
  revisionId,
  sequence: Number(balloon),
  balloon,
  sheet: '1',
  zone: '',
  description: `Feature ${balloon}`,
  kind: 'size',
  tolerance: { form: 'symmetric', nominal: '25.00', tolerance: '0.05' },
  geometric: null,
  unit: 'mm',
  decimals: 2,
  class: 'none',
  method: '',
  attributeAllowed: false,
  pieces: null,
  controlledBy: [],
  note: '',
  nominal: '25.00',
  lowerLimit: '24.95',
  upperLimit: '25.05',
  naturalLower: false,
  explanation: '25.00 ± 0.05',
  version: 1,
  ...overrides,
});

const show = (items: CharacteristicResponse[], editable = true) =>
  renderPage(<CharacteristicsTable revisionId={revisionId} items={items} editable={editable} />, {
    session: aSession(),
  });
const grid = () => screen.getByRole('grid', { name: 'Characteristics' });
const activeText = () => within(grid()).getByRole('gridcell', { selected: true }).textContent;

beforeEach(() => localStorage.clear());

describe('the keyboard in the table of characteristics', () => {
  it('moves with arrows and Tab, edits with Enter, goes down on Enter and gives up on Escape', async () => {
    fakeApi({ 'PUT /api/revisions/:id/characteristics': () => ({ items: [item('1'), item('2')] }) });
    show([item('1'), item('2')]);
    const user = userEvent.setup();
    grid().focus();
    await user.keyboard('{ArrowRight}{ArrowRight}{ArrowRight}');
    expect(activeText()).toBe('Feature 1');
    await user.keyboard('{Enter}');
    const editor = screen.getByRole('textbox', { name: 'Description' });
    await user.clear(editor);
    await user.type(editor, 'Seat A{Enter}');
    expect(screen.getByText('Seat A')).toBeInTheDocument();
    expect(activeText()).toBe('Feature 2');
    await user.keyboard('x{Escape}');
    expect(activeText()).toBe('Feature 2');
    await user.keyboard('{Shift>}{Tab}{/Shift}{Tab}{Tab}');
    expect(activeText()).toBe('size');
  });

  it('pastes a block, shows the limits at once, and undoes it', async () => {
    fakeApi({ 'PUT /api/revisions/:id/characteristics': () => problem('internal', 'not now') });
    show([item('1')]);
    const user = userEvent.setup();
    grid().focus();
    await user.keyboard('{ArrowRight}{ArrowRight}{ArrowRight}{ArrowRight}{ArrowRight}');
    fireEvent.paste(grid(), { clipboardData: { getData: () => '25\tk6\n8.0\t±0.2\n' } });
    expect(screen.getByText('25.002 … 25.015')).toBeInTheDocument();
    expect(screen.getByText('7.8 … 8.2')).toBeInTheDocument();
    await user.keyboard('{Control>}z{/Control}');
    expect(screen.queryByText('7.8 … 8.2')).not.toBeInTheDocument();
    expect(screen.getByText('24.95 … 25.05')).toBeInTheDocument();
    await user.keyboard('{Control>}y{/Control}');
    expect(screen.getByText('7.8 … 8.2')).toBeInTheDocument();
  });

  it('adds a row, says beside it what is missing, and saves it once it is whole', async () => {
    const calls = fakeApi({
      'PUT /api/revisions/:id/characteristics': () => ({
        items: [item('1'), item('2', { description: 'Depth' })],
      }),
    });
    show([item('1')]);
    const user = userEvent.setup();
    await user.click(screen.getByRole('button', { name: 'Add a row' }));
    expect(screen.queryByText('1 row is not saved yet')).not.toBeInTheDocument();
    await user.keyboard('{Tab}{Tab}{Tab}{Tab}{Tab}8{Tab}±0.1{Tab}');
    expect(screen.getByText('1 row is not saved yet')).toBeInTheDocument();
    await user.keyboard('{Home}{Tab}{Tab}{Tab}Depth{Enter}');
    await waitFor(() => expect(calls).toHaveLength(1), { timeout: 4000 });
    expect(calls[0]?.body).toMatchObject({
      rows: [
        {
          id: null,
          balloon: '2',
          description: 'Depth',
          tolerance: { form: 'symmetric', nominal: '8', tolerance: '0.1' },
        },
      ],
      removed: [],
    });
  });

  it('puts a refusal of the server into its row and loses nothing that was typed', async () => {
    fakeApi({
      'PUT /api/revisions/:id/characteristics': () =>
        problem('invalid', 'One entry needs to be changed.', {
          errors: [
            { pointer: '/rows/0/balloon', detail: 'Balloon 9 stood for "Depth" and is not given again.' },
          ],
        }),
    });
    show([item('1')]);
    const user = userEvent.setup();
    grid().focus();
    await user.keyboard('9{Enter}');
    await waitFor(() => expect(screen.getByText(/is not given again/)).toBeInTheDocument(), {
      timeout: 4000,
    });
    expect(within(grid()).getByText('9')).toBeInTheDocument();
    expect(Object.keys(localStorage).some((key) => key.includes('characteristics'))).toBe(true);
  });

  it('shows a conflict and goes on with either side', async () => {
    const theirs = { items: [item('1', { description: 'Theirs', version: 2 })] };
    fakeApi({
      'PUT /api/revisions/:id/characteristics': () =>
        problem('stale-version', 'changed', { current: theirs }),
    });
    show([item('1')]);
    const user = userEvent.setup();
    grid().focus();
    await user.keyboard('{ArrowRight}{ArrowRight}{ArrowRight}Mine{Enter}');
    await user.click(
      await screen.findByRole('button', { name: 'Take the other and drop mine' }, { timeout: 4000 }),
    );
    expect(screen.getByText('Theirs')).toBeInTheDocument();
  });

  it('is read only for those who may not write', async () => {
    show([item('1')], false);
    expect(screen.queryByRole('button', { name: 'Add a row' })).not.toBeInTheDocument();
    grid().focus();
    await userEvent.setup().keyboard('x');
    expect(screen.queryByRole('textbox')).not.toBeInTheDocument();
  });
});
