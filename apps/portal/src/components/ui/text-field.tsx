import type { InputHTMLAttributes, Ref } from 'react';
import { cn } from '../../lib/cn.ts';
import { Field, controlLook, type FieldLook } from './field.tsx';

type Native = Omit<InputHTMLAttributes<HTMLInputElement>, 'id' | 'value' | 'onChange' | 'size'>;

export interface TextFieldProps extends FieldLook, Native {
  value: string;
  onChange: (value: string) => void;
  /** Codes, numbers and identifiers stand in the mono face. */
  mono?: boolean;
  ref?: Ref<HTMLInputElement>;
}

export function TextField({
  id,
  label,
  hint,
  error,
  optional,
  labelHidden,
  className,
  value,
  onChange,
  mono,
  ref,
  ...native
}: TextFieldProps) {
  return (
    <Field {...{ id, label, hint, error, optional, labelHidden, className }}>
      {(attributes) => (
        <input
          type="text"
          {...native}
          {...attributes}
          ref={ref}
          value={value}
          onChange={(event) => onChange(event.currentTarget.value)}
          className={cn(controlLook, mono && 'figures')}
        />
      )}
    </Field>
  );
}

/** A calendar date, kept as YYYY-MM-DD; empty text for none. */
export function DateField(props: Omit<TextFieldProps, 'type' | 'mono'>) {
  return <TextField {...props} type="date" mono />;
}
