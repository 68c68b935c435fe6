import type { ElementResponse } from '@trammel/shared/submissions';
import { elementStateWords } from '../words.ts';

const drawings: Record<ElementResponse['state'], { path: string; tone: string }> = {
  open: { path: 'M1.5 1.5h9v9h-9z', tone: 'text-brass' },
  submitted: { path: 'M2 6.5l3 3 5-7', tone: 'text-verdigris' },
  'kept-at-supplier': { path: 'M1.5 1.5h9v9h-9zM4 6h4', tone: 'text-marking' },
  'not-applicable': { path: 'M2 6h8', tone: 'text-pencil' },
};

export function ElementStateMark({ state }: { state: ElementResponse['state'] }) {
  const { path, tone } = drawings[state];
  return (
    <span className={`inline-flex items-center gap-1.5 whitespace-nowrap ${tone}`}>
      <svg aria-hidden="true" viewBox="0 0 12 12" className="size-3 fill-none stroke-current stroke-[1.5]">
        <path d={path} />
      </svg>
      {elementStateWords[state]}
    </span>
  );
}
