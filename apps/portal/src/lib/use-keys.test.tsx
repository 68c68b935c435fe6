import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { expect, it, vi } from 'vitest';
import { KeyboardHelp } from '../components/ui/keyboard-help.tsx';
import { useKeys } from './use-keys.ts';

function Example({ next, undo }: { next: () => void; undo: () => void }) {
  useKeys('Review', [
    { keys: 'j', label: 'Next row', run: next },
    { keys: 'ctrl+z', label: 'Undo', run: undo, whileTyping: true },
  ]);
  return <input aria-label="Remark" />;
}

it('hears the keys of the page, but not while a field is typed in', async () => {
  const user = userEvent.setup();
  const next = vi.fn();
  const undo = vi.fn();
  render(<Example next={next} undo={undo} />);
  await user.keyboard('j');
  expect(next).toHaveBeenCalledTimes(1);
  await user.click(screen.getByLabelText('Remark'));
  await user.keyboard('j{Control>}z{/Control}');
  expect(next).toHaveBeenCalledTimes(1);
  expect(undo).toHaveBeenCalledTimes(1);
  expect(screen.getByLabelText('Remark')).toHaveValue('j');
});

it('lists the keys of the page under ?', async () => {
  const user = userEvent.setup();
  render(
    <>
      <Example next={() => undefined} undo={() => undefined} />
      <KeyboardHelp />
    </>,
  );
  await user.keyboard('?');
  const list = await screen.findByRole('dialog', { name: 'Keys of this page' });
  expect(list).toHaveTextContent('Next row');
  expect(list).toHaveTextContent('CtrlzUndo');
});
