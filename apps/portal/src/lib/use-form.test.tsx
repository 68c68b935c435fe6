import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { expect, it, vi } from 'vitest';
import { z } from 'zod';
import { ErrorSummary } from '../components/ui/error-summary.tsx';
import { TextField } from '../components/ui/text-field.tsx';
import { ApiProblem, problemBase } from './api-problem.ts';
import { fieldErrorsOf, useForm } from './use-form.ts';

const schema = z.strictObject({
  name: z.string().min(1, 'Fill this in.'),
  email: z.email('Not a mail address.'),
});
const invalid = (errors: { pointer: string; detail: string }[]) =>
  new ApiProblem({
    type: `${problemBase}invalid`,
    title: '',
    status: 422,
    detail: 'Refused.',
    instance: '/',
    errors,
  });

function Example({ onSubmit }: { onSubmit: () => Promise<unknown> }) {
  const form = useForm({ initial: { name: '', email: '' }, schema, onSubmit });
  return (
    <form onSubmit={(event) => void form.submit(event)} noValidate>
      <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
      <TextField {...form.field('name')} label="Name" />
      <TextField {...form.field('email')} label="Mail address" />
      <button type="submit">Send</button>
    </form>
  );
}

it('shows each refusal beside its field and in a summary that leads there', async () => {
  const user = userEvent.setup();
  const onSubmit = vi.fn(() => Promise.resolve());
  render(<Example onSubmit={onSubmit} />);
  await user.type(screen.getByLabelText('Mail address'), 'nobody');
  await user.click(screen.getByRole('button', { name: 'Send' }));
  expect(onSubmit).not.toHaveBeenCalled();
  const summary = screen.getByRole('alert');
  expect(summary).toHaveTextContent('2 things to mend');
  expect(summary).toHaveFocus();
  expect(screen.getByLabelText('Name')).toHaveAccessibleDescription('Fill this in.');
  expect(screen.getByLabelText('Mail address')).toHaveValue('nobody');
  await user.click(screen.getByRole('link', { name: 'Mail address: Not a mail address.' }));
  expect(screen.getByLabelText('Mail address')).toHaveFocus();
});

it('puts what the server refuses beside the field it names', async () => {
  const user = userEvent.setup();
  const refuse = () =>
    Promise.reject(invalid([{ pointer: '/email', detail: 'There is already an account.' }]));
  render(<Example onSubmit={refuse} />);
  await user.type(screen.getByLabelText('Name'), 'A');
  await user.type(screen.getByLabelText('Mail address'), 'a@b.example');
  await user.click(screen.getByRole('button', { name: 'Send' }));
  expect(await screen.findByLabelText('Mail address')).toHaveAccessibleDescription(
    'There is already an account.',
  );
  await user.type(screen.getByLabelText('Mail address'), 'x');
  expect(screen.queryByRole('alert')).not.toBeInTheDocument();
});

it('reads JSON pointers as dotted paths, first refusal of each place', () => {
  const errors = fieldErrorsOf(
    invalid([
      { pointer: '/conditions/0/owner', detail: 'one' },
      { pointer: '/conditions/0/owner', detail: 'two' },
      { pointer: '/a~1b', detail: 'three' },
    ]),
  );
  expect(errors).toEqual([
    { field: 'conditions.0.owner', message: 'one' },
    { field: 'a/b', message: 'three' },
  ]);
});
