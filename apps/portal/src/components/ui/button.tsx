import type { ButtonHTMLAttributes, Ref } from 'react';
import { buttonLook, type ButtonSize, type ButtonWeight } from './button-look.ts';

export interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  weight?: ButtonWeight;
  size?: ButtonSize;
  /** Work is under way: the button stays focusable, says so, and does nothing. */
  busy?: boolean;
  busyLabel?: string;
  ref?: Ref<HTMLButtonElement>;
}

export function Button({
  weight,
  size,
  busy = false,
  busyLabel,
  className,
  children,
  onClick,
  type,
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type ?? 'button'}
      aria-disabled={busy || undefined}
      onClick={busy ? (event) => event.preventDefault() : onClick}
      className={buttonLook(weight, size, className)}
    >
      {busy ? (busyLabel ?? children) : children}
    </button>
  );
}
