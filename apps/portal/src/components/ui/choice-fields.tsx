import type { ReactNode } from 'react';
import { cn } from '../../lib/cn.ts';
import { FieldErrorText } from './field.tsx';

export interface CheckboxProps {
  id: string;
  name?: string;
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
  value: boolean;
  onChange: (value: boolean) => void;
  disabled?: boolean;
  labelHidden?: boolean;
}

export function Checkbox({
  id,
  name,
  label,
  hint,
  error,
  value,
  onChange,
  disabled,
  labelHidden,
}: CheckboxProps) {
  const describedBy = [hint && `${id}-hint`, error && `${id}-error`].filter(Boolean).join(' ') || undefined;
  return (
    <div className="flex flex-col gap-1">
      <label
        htmlFor={id}
        className="flex min-h-6 items-start gap-2 pointer-coarse:min-h-10 pointer-coarse:items-center"
      >
        <input
          id={id}
          name={name}
          type="checkbox"
          checked={value}
          disabled={disabled}
          aria-describedby={describedBy}
          aria-invalid={error ? true : undefined}
          onChange={(event) => onChange(event.currentTarget.checked)}
          className="mt-1 size-4 shrink-0"
        />
        <span className={cn(labelHidden && 'sr-only')}>{label}</span>
      </label>
      {hint && (
        <p id={`${id}-hint`} className="caption ml-6">
          {hint}
        </p>
      )}
      {error && <FieldErrorText id={`${id}-error`}>{error}</FieldErrorText>}
    </div>
  );
}

interface Choice<Value extends string> {
  value: Value;
  label: ReactNode;
  hint?: ReactNode;
  disabled?: boolean;
}

interface GroupLook {
  id: string;
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
  /** Choices side by side where there is room. */
  inline?: boolean;
}

function Group({
  id,
  label,
  hint,
  error,
  inline,
  role,
  children,
}: GroupLook & { role?: string; children: ReactNode }) {
  const describedBy = [hint && `${id}-hint`, error && `${id}-error`].filter(Boolean).join(' ') || undefined;
  return (
    <fieldset
      id={id}
      tabIndex={-1}
      role={role}
      aria-describedby={describedBy}
      className={cn('flex min-w-0 flex-col gap-1', error && 'border-l-2 border-vermilion pl-3')}
    >
      <legend className="mb-1 font-medium">{label}</legend>
      {hint && (
        <p id={`${id}-hint`} className="caption">
          {hint}
        </p>
      )}
      <div className={cn('flex', inline ? 'flex-wrap gap-x-5 gap-y-1' : 'flex-col gap-1')}>{children}</div>
      {error && <FieldErrorText id={`${id}-error`}>{error}</FieldErrorText>}
    </fieldset>
  );
}

export interface RadioGroupProps<Value extends string> extends GroupLook {
  name: string;
  value: Value | '';
  onChange: (value: Value) => void;
  options: readonly Choice<Value>[];
}

export function RadioGroup<Value extends string>({
  name,
  value,
  onChange,
  options,
  ...look
}: RadioGroupProps<Value>) {
  return (
    <Group {...look} role="radiogroup">
      {options.map((option, index) => {
        const id = `${look.id}-${index}`;
        return (
          <label key={option.value} htmlFor={id} className="flex min-h-6 items-start gap-2">
            <input
              id={id}
              type="radio"
              name={`${look.id}-${name}`}
              checked={value === option.value}
              disabled={option.disabled}
              onChange={() => onChange(option.value)}
              className="mt-1 size-4 shrink-0"
            />
            <span>
              {option.label}
              {option.hint && <span className="caption block">{option.hint}</span>}
            </span>
          </label>
        );
      })}
    </Group>
  );
}

export interface CheckboxGroupProps<Value extends string> extends GroupLook {
  name?: string;
  value: readonly Value[];
  onChange: (value: Value[]) => void;
  options: readonly Choice<Value>[];
}

export function CheckboxGroup<Value extends string>({
  value,
  onChange,
  options,
  ...look
}: CheckboxGroupProps<Value>) {
  const chosen = (option: Value, on: boolean) =>
    options.map((other) => other.value).filter((other) => (other === option ? on : value.includes(other)));
  return (
    <Group {...look}>
      {options.map((option, index) => (
        <Checkbox
          key={option.value}
          id={`${look.id}-${index}`}
          label={option.label}
          hint={option.hint}
          disabled={option.disabled ?? false}
          value={value.includes(option.value)}
          onChange={(on) => onChange(chosen(option.value, on))}
        />
      ))}
    </Group>
  );
}
