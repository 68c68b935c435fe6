import { cn } from '../../lib/cn.ts';

export type ButtonWeight = 'primary' | 'plain' | 'quiet' | 'danger';
export type ButtonSize = 'normal' | 'small';

const weights: Record<ButtonWeight, string> = {
  primary: 'border-marking bg-marking text-sheet hover:bg-marking/88',
  plain: 'border-pencil bg-sheet text-graphite hover:border-marking hover:text-marking',
  quiet: 'border-transparent bg-transparent text-marking hover:bg-marking/10',
  danger: 'border-vermilion bg-sheet text-vermilion hover:bg-vermilion/10',
};

const sizes: Record<ButtonSize, string> = {
  normal: 'min-h-8 px-3 text-[0.9375rem] pointer-coarse:min-h-10',
  small: 'min-h-6 px-2 text-[0.8125rem] pointer-coarse:min-h-9',
};

/** One look for buttons and for links that act as the next step. */
export function buttonLook(
  weight: ButtonWeight = 'plain',
  size: ButtonSize = 'normal',
  extra?: string,
): string {
  return cn(
    'inline-flex max-w-full shrink-0 items-center justify-center gap-2 rounded border leading-tight font-medium no-underline select-none',
    'disabled:cursor-not-allowed disabled:border-rule disabled:bg-transparent disabled:text-pencil',
    weights[weight],
    sizes[size],
    extra,
  );
}
