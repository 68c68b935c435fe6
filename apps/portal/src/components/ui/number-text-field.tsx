import { useState } from 'react';
import { readDecimal, showDecimal } from '../../lib/format.ts';
import { TextField, type TextFieldProps } from './text-field.tsx';

export interface NumberTextFieldProps extends Omit<TextFieldProps, 'type' | 'mono' | 'inputMode'> {
  unit?: string;
}

/**
 * A number that stays the text that was typed: 2.50 is never shortened. The reader's decimal sign is accepted and shown;
 * `value` and `onChange` carry the text with a point.
 */
export function NumberTextField({ value, onChange, unit, hint, ...rest }: NumberTextFieldProps) {
  const [typed, setTyped] = useState(() => showDecimal(value));
  const shown = readDecimal(typed) === value.trim() ? typed : showDecimal(value);
  return (
    <TextField
      {...rest}
      hint={
        unit ? (
          <>
            {hint ? <>{hint} </> : null}in {unit}
          </>
        ) : (
          hint
        )
      }
      mono
      inputMode="decimal"
      autoComplete="off"
      value={shown}
      onChange={(text) => {
        setTyped(text);
        onChange(readDecimal(text));
      }}
    />
  );
}
