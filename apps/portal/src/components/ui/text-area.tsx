import type { Ref, TextareaHTMLAttributes } from 'react';
import { Field, controlLook, type FieldLook } from './field.tsx';

type Native = Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, 'id' | 'value' | 'onChange'>;

export interface TextAreaProps extends FieldLook, Native {
  value: string;
  onChange: (value: string) => void;
  ref?: Ref<HTMLTextAreaElement>;
}

export function TextArea({
  id,
  label,
  hint,
  error,
  optional,
  labelHidden,
  className,
  value,
  onChange,
  rows = 3,
  ref,
  ...native
}: TextAreaProps) {
  return (
    <Field {...{ id, label, hint, error, optional, labelHidden, className }}>
      {(attributes) => (
        <textarea
          {...native}
          {...attributes}
          ref={ref}
          rows={rows}
          value={value}
          onChange={(event) => onChange(event.currentTarget.value)}
          className={controlLook}
        />
      )}
    </Field>
  );
}
