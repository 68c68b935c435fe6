import type { AutosaveState } from '../../lib/autosave.ts';
import { cn } from '../../lib/cn.ts';
import { Button } from './button.tsx';

const words: Record<AutosaveState, string> = {
  untouched: '',
  waiting: 'Not saved yet',
  saving: 'Saving…',
  saved: 'Saved',
  offline: 'No connection: kept in this browser, saved when it is back',
  conflict: 'Changed by somebody else meanwhile: choose below',
  refused: 'Not saved: see what was refused',
};

export interface SaveStateProps {
  state: AutosaveState;
  savedAt?: Date | null;
  onRetry?: () => void;
}

/** Says what became of the last thing typed. */
export function SaveState({ state, savedAt, onRetry }: SaveStateProps) {
  const time =
    state === 'saved' && savedAt
      ? ` at ${savedAt.toLocaleTimeString(undefined, { timeStyle: 'short' })}`
      : '';
  const trouble = state === 'offline' || state === 'conflict' || state === 'refused';
  return (
    <span
      role="status"
      className={cn(
        'no-print inline-flex min-h-6 items-center gap-2 text-[0.875rem]',
        trouble ? 'text-vermilion' : 'text-pencil',
      )}
    >
      {words[state] + time}
      {state === 'offline' && onRetry && (
        <Button size="small" onClick={onRetry}>
          Try now
        </Button>
      )}
    </span>
  );
}
