import { Field, controlLook, type FieldLook } from './field.tsx';

export interface Option<Value extends string> {
  value: Value;
  label: string;
  disabled?: boolean;
}

export interface SelectFieldProps<Value extends string> extends FieldLook {
  name?: string;
  value: Value;
  onChange: (value: Value) => void;
  options: readonly Option<Value>[];
  disabled?: boolean;
}

export function SelectField<Value extends string>({
  name,
  value,
  onChange,
  options,
  disabled,
  ...look
}: SelectFieldProps<Value>) {
  return (
    <Field {...look}>
      {(attributes) => (
        <select
          {...attributes}
          name={name}
          disabled={disabled}
          value={value}
          onChange={(event) => onChange(event.currentTarget.value as Value)}
          className={controlLook}
        >
          {options.map((option) => (
            <option key={option.value} value={option.value} disabled={option.disabled}>
              {option.label}
            </option>
          ))}
        </select>
      )}
    </Field>
  );
}
