import type { ReactNode } from 'react';
import { cn } from '../../lib/cn.ts';

export interface FieldLook {
  id: string;
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
  optional?: boolean;
  /** Keeps the label for screen readers only, in a dense table. */
  labelHidden?: boolean;
  className?: string;
}

export interface ControlAttributes {
  id: string;
  'aria-describedby': string | undefined;
  'aria-invalid': true | undefined;
}

export const controlLook =
  'w-full min-h-8 rounded border border-pencil bg-sheet px-2 py-1 text-graphite placeholder:text-pencil pointer-coarse:min-h-10 ' +
  'aria-invalid:border-vermilion aria-invalid:border-2 disabled:border-rule disabled:text-pencil [&[readonly]]:border-rule';

/** Label, hint and error around one control; the error stands directly under its cause. */
export function Field({
  id,
  label,
  hint,
  error,
  optional,
  labelHidden,
  className,
  children,
}: FieldLook & { children: (attributes: ControlAttributes) => ReactNode }) {
  const hintId = hint ? `${id}-hint` : null;
  const errorId = error ? `${id}-error` : null;
  const describedBy = [hintId, errorId].filter(Boolean).join(' ') || undefined;
  return (
    <div className={cn('flex min-w-0 flex-col gap-1', className)}>
      <label htmlFor={id} className={cn('font-medium', labelHidden && 'sr-only')}>
        {label}
        {optional && <span className="font-normal text-pencil"> (optional)</span>}
      </label>
      {hintId && (
        <p id={hintId} className="caption">
          {hint}
        </p>
      )}
      {children({ id, 'aria-describedby': describedBy, 'aria-invalid': error ? true : undefined })}
      {errorId && <FieldErrorText id={errorId}>{error}</FieldErrorText>}
    </div>
  );
}

export function FieldErrorText({ id, children }: { id: string; children: ReactNode }) {
  return (
    <p id={id} className="flex gap-1.5 text-[0.875rem] text-vermilion">
      <svg aria-hidden="true" viewBox="0 0 10 10" className="mt-1 size-2.5 shrink-0 fill-vermilion">
        <path d="M5 0l5 5-5 5-5-5z" />
      </svg>
      <span>{children}</span>
    </p>
  );
}
