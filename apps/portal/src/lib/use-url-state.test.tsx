import { screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { expect, it } from 'vitest';
import { renderPage } from '../testing/render.tsx';
import { useUrlState } from './use-url-state.ts';

function Example() {
  const [view, change] = useUrlState({ q: '', sort: 'dueOn', cursor: '' });
  return (
    <>
      <output>{JSON.stringify(view)}</output>
      <button onClick={() => change({ q: 'shaft' })}>search</button>
      <button onClick={() => change({ cursor: 'c2' }, { push: true })}>next</button>
      <button onClick={() => change({ q: '', sort: 'dueOn' })}>reset</button>
    </>
  );
}

it('holds the view in the address and leaves defaults out of it', async () => {
  const user = userEvent.setup();
  const page = renderPage(<Example />, { at: '/worklist?sort=-dueOn&tab=a' });
  expect(screen.getByRole('status')).toHaveTextContent('{"q":"","sort":"-dueOn","cursor":""}');
  await user.click(screen.getByRole('button', { name: 'next' }));
  expect(page.address()).toBe('/worklist?sort=-dueOn&tab=a&cursor=c2');
  await user.click(screen.getByRole('button', { name: 'search' }));
  expect(page.address()).toBe('/worklist?sort=-dueOn&tab=a&q=shaft');
  await user.click(screen.getByRole('button', { name: 'reset' }));
  expect(page.address()).toBe('/worklist?tab=a');
});
