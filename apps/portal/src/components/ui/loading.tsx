import { reasonOf } from '../../lib/api-problem.ts';
import { Button } from './button.tsx';
import { Notice } from './notice.tsx';

/** Grey lines in the place of what comes; announced once. */
export function Loading({ label = 'Loading', lines = 4 }: { label?: string; lines?: number }) {
  return (
    <div role="status" aria-label={label} className="flex flex-col gap-3 py-2">
      {Array.from({ length: lines }, (_, index) => (
        <div key={index} className="h-4 max-w-2xl rounded bg-rule/60 last:w-2/3 motion-safe:animate-pulse" />
      ))}
    </div>
  );
}

/** In the place of what did not come, with the way to try again. */
export function LoadFailure({ what, error, onRetry }: { what: string; error: unknown; onRetry: () => void }) {
  return (
    <Notice
      tone="failure"
      live
      title={`${what} could not be loaded`}
      actions={<Button onClick={onRetry}>Try again</Button>}
    >
      {reasonOf(error)}
    </Notice>
  );
}
