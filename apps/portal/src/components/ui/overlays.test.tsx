import { act, render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { expect, it, vi } from 'vitest';
import { renderPage } from '../../testing/render.tsx';
import { ConfirmDialog } from './confirm-dialog.tsx';
import { Figure } from './figure.tsx';
import { Menu } from './menu.tsx';
import { Tabs } from './tabs.tsx';
import { dropToasts, showToast, ToastRegion } from './toast.tsx';

function Withdraw({ act: deed }: { act: () => Promise<unknown> }) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <button onClick={() => setOpen(true)}>Withdraw</button>
      <ConfirmDialog
        open={open}
        onClose={() => setOpen(false)}
        title="Withdraw the request for TD-20417?"
        consequence="The supplier is told."
        confirmLabel="Withdraw the request"
        onConfirm={deed}
      />
    </>
  );
}

it('asks once with the consequence, keeps a refusal in sight, and gives the focus back', async () => {
  const user = userEvent.setup();
  const deed = vi.fn<() => Promise<unknown>>().mockRejectedValueOnce(new Error('It is already submitted.'));
  deed.mockResolvedValue(undefined);
  render(<Withdraw act={deed} />);
  await user.click(screen.getByRole('button', { name: 'Withdraw' }));
  expect(screen.getByRole('dialog', { name: 'Withdraw the request for TD-20417?' })).toHaveTextContent(
    'The supplier is told.',
  );
  await user.click(screen.getByRole('button', { name: 'Withdraw the request' }));
  expect(await screen.findByRole('alert')).toHaveTextContent('It is already submitted.');
  await user.click(screen.getByRole('button', { name: 'Withdraw the request' }));
  await waitFor(() => expect(screen.queryByRole('dialog')).not.toBeInTheDocument());
  expect(screen.getByRole('button', { name: 'Withdraw' })).toHaveFocus();
});

it('opens a menu from the keyboard, walks it and leaves it', async () => {
  const user = userEvent.setup();
  const change = vi.fn();
  renderPage(
    <Menu
      label="Act"
      items={[
        { label: 'Change', onSelect: change },
        { label: 'Open', to: '/there' },
      ]}
    />,
  );
  screen.getByRole('button', { name: 'Act' }).focus();
  await user.keyboard('{ArrowDown}{ArrowDown}');
  expect(screen.getByRole('menuitem', { name: 'Open' })).toHaveFocus();
  await user.keyboard('{Escape}');
  expect(screen.queryByRole('menu')).not.toBeInTheDocument();
  expect(screen.getByRole('button', { name: 'Act' })).toHaveFocus();
  await user.keyboard('{Enter}{Enter}');
  expect(change).toHaveBeenCalledTimes(1);
});

it('keeps the open tab in the address and moves with the arrows', async () => {
  const user = userEvent.setup();
  const page = renderPage(
    <Tabs
      label="Package"
      tabs={[
        { id: 'rows', label: 'Rows', content: () => 'the rows' },
        { id: 'evidence', label: 'Evidence', count: 3, content: () => 'the evidence' },
      ]}
    />,
    { at: '/?tab=evidence' },
  );
  expect(screen.getByRole('tabpanel')).toHaveTextContent('the evidence');
  screen.getByRole('tab', { name: 'Evidence3' }).focus();
  await user.keyboard('{ArrowRight}');
  expect(screen.getByRole('tabpanel', { name: 'Rows' })).toHaveTextContent('the rows');
  expect(page.address()).toBe('/');
});

it('explains a figure on focus, and closes with Escape', async () => {
  const user = userEvent.setup();
  render(
    <Figure value="1.82" name="Ppk of balloon 3" formula="min(a, b)" n={100} standard="ISO 22514-2:2017" />,
  );
  await user.tab();
  expect(screen.getByRole('button', { name: '1.82' })).toHaveAccessibleDescription(
    /Ppk of balloon 3.*min\(a, b\).*100.*ISO 22514-2/,
  );
  await user.keyboard('{Escape}');
  expect(screen.queryByText('Ppk of balloon 3')).not.toBeInTheDocument();
});

it('confirms a success and takes it back', async () => {
  const user = userEvent.setup();
  const undo = vi.fn();
  render(<ToastRegion />);
  act(() => showToast({ text: '12 rows accepted', undo }));
  expect(screen.getByRole('status')).toHaveTextContent('12 rows accepted');
  await user.click(screen.getByRole('button', { name: 'Undo' }));
  expect(undo).toHaveBeenCalledTimes(1);
  expect(screen.queryByText('12 rows accepted')).not.toBeInTheDocument();
  act(dropToasts);
});
