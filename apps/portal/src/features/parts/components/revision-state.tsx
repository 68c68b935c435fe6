import type { RevisionSummary } from '@trammel/shared/parts';
import { cn } from '../../../lib/cn.ts';
import { revisionStateWords } from '../revision-words.ts';

const shapes: Record<RevisionSummary['state'], { path: string; tone: string }> = {
  draft: { path: 'M5 1.2a3.8 3.8 0 1 0 .01 0', tone: 'fill-none stroke-pencil [stroke-dasharray:2_1.4]' },
  released: { path: 'M5 1a4 4 0 1 0 .01 0', tone: 'fill-verdigris stroke-verdigris' },
  superseded: { path: 'M1 5h8', tone: 'fill-none stroke-pencil' },
};

/** Word and shape together: colour never stands alone. */
export function RevisionState({ state }: { state: RevisionSummary['state'] }) {
  const { path, tone } = shapes[state];
  return (
    <span className="inline-flex items-center gap-1.5 whitespace-nowrap">
      <svg aria-hidden="true" viewBox="0 0 10 10" className={cn('size-2.5 stroke-[1.4]', tone)}>
        <path d={path} />
      </svg>
      {revisionStateWords[state]}
    </span>
  );
}
