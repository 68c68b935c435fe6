import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { expect, it, vi } from 'vitest';
import { CheckboxGroup, RadioGroup } from './choice-fields.tsx';
import { FileDrop } from './file-drop.tsx';
import { NumberTextField } from './number-text-field.tsx';
import { SelectField } from './select-field.tsx';

function Nominal({ onText }: { onText: (text: string) => void }) {
  const [text, setText] = useState('2.50');
  return (
    <>
      <NumberTextField
        id="nominal"
        label="Nominal"
        unit="mm"
        value={text}
        onChange={(value) => {
          setText(value);
          onText(value);
        }}
      />
      <button onClick={() => setText('7.000')}>load</button>
    </>
  );
}

it('keeps a number as the text that was typed, with a point or a comma', async () => {
  const user = userEvent.setup();
  const onText = vi.fn();
  render(<Nominal onText={onText} />);
  const field = screen.getByLabelText('Nominal');
  expect(field).toHaveValue('2.50');
  expect(field).toHaveAccessibleDescription('in mm');
  await user.clear(field);
  await user.type(field, '12,50');
  expect(field).toHaveValue('12,50');
  expect(onText).toHaveBeenLastCalledWith('12.50');
  await user.click(screen.getByRole('button', { name: 'load' }));
  expect(field).toHaveValue('7.000');
});

it('chooses one of several, and several of several, in the order given', async () => {
  const user = userEvent.setup();
  const one = vi.fn();
  const several = vi.fn();
  const options = [
    { value: 'a', label: 'Simple acceptance', hint: 'equal to a limit is in' },
    { value: 'b', label: 'Guard band' },
  ] as const;
  render(
    <>
      <RadioGroup
        id="rule"
        name="rule"
        label="Decision rule"
        value="a"
        onChange={one}
        options={options}
        error="Choose one."
      />
      <CheckboxGroup id="roles" label="Roles" value={['b']} onChange={several} options={options} />
      <SelectField id="level" label="Level" value="a" onChange={one} options={options} />
    </>,
  );
  expect(screen.getByRole('radiogroup', { name: 'Decision rule' })).toHaveAccessibleDescription(
    'Choose one.',
  );
  await user.click(screen.getByRole('radio', { name: 'Guard band' }));
  expect(one).toHaveBeenLastCalledWith('b');
  await user.click(screen.getByRole('checkbox', { name: 'Simple acceptance' }));
  expect(several).toHaveBeenLastCalledWith(['a', 'b']);
});

it('takes the files that fit and says why it refuses the others', async () => {
  const user = userEvent.setup({ applyAccept: false });
  const onFiles = vi.fn();
  render(
    <FileDrop
      id="drawing"
      label="Drawing of revision C"
      accept={{ 'application/pdf': ['.pdf'] }}
      maxBytes={10}
      multiple
      onFiles={onFiles}
    />,
  );
  const files = [
    new File(['%PDF'], 'cover.pdf', { type: 'application/pdf' }),
    new File(['MZ'], 'cover.exe', { type: 'application/x-msdownload' }),
    new File(['%PDF-1.7 and much more'], 'large.pdf', { type: 'application/pdf' }),
  ];
  await user.upload(screen.getByLabelText('Drawing of revision C'), files);
  expect(onFiles).toHaveBeenCalledExactlyOnceWith([files[0]]);
  const refusal = await screen.findByRole('alert');
  expect(refusal).toHaveTextContent('cover.exe: this kind of file is not accepted here; use .pdf.');
  expect(refusal).toHaveTextContent('large.pdf: larger than 10 B; send a smaller export or split it.');
});
