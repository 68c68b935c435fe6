import type { BuyingVerdict, PackageState, Weight } from '@trammel/shared/status';
import { cn } from '../../lib/cn.ts';

type Shape = 'ring' | 'part' | 'half' | 'arrow' | 'back' | 'full' | 'edge' | 'cross' | 'dash';

/** Drawn in a square of 12: a filling square for work in progress, then the outcome's own sign. */
const drawings: Record<Shape, string> = {
  ring: 'M1.5 1.5h9v9h-9z',
  part: 'M1.5 1.5h9v9h-9zM1.5 8h9v2.5h-9z',
  arrow: 'M1.5 6h8M6.5 2.5L10 6l-3.5 3.5',
  half: 'M1.5 1.5h9v9h-9zM6 1.5v9',
  back: 'M10.5 6h-8M5.5 2.5L2 6l3.5 3.5',
  full: 'M2 6.5l3 3 5-7',
  edge: 'M6 1.5v9M1.5 6.5l2.5 2.5M1.5 1.5v9M10.5 1.5v9M4 6h4',
  cross: 'M2 2l8 8M10 2l-8 8',
  dash: 'M2 6h8',
};

interface Look {
  words: string;
  shape: Shape;
  colour: string;
}

const packageLooks: Record<PackageState, Look> = {
  requested: { words: 'requested', shape: 'ring', colour: 'text-marking' },
  'in-preparation': { words: 'in preparation', shape: 'part', colour: 'text-marking' },
  submitted: { words: 'submitted', shape: 'arrow', colour: 'text-marking' },
  'in-review': { words: 'in review', shape: 'half', colour: 'text-marking' },
  'sent-back': { words: 'sent back', shape: 'back', colour: 'text-brass' },
  approved: { words: 'approved', shape: 'full', colour: 'text-verdigris' },
  'interim-approval': { words: 'interim approval', shape: 'edge', colour: 'text-plum' },
  rejected: { words: 'rejected', shape: 'cross', colour: 'text-vermilion' },
  lapsed: { words: 'lapsed', shape: 'dash', colour: 'text-vermilion' },
  withdrawn: { words: 'withdrawn', shape: 'dash', colour: 'text-pencil' },
  superseded: { words: 'superseded', shape: 'dash', colour: 'text-pencil' },
};

const buyingLooks: Record<BuyingVerdict, Look> = {
  'may-buy': { words: 'may buy', shape: 'full', colour: 'text-verdigris' },
  'may-buy-within-limits': { words: 'may buy within limits', shape: 'edge', colour: 'text-plum' },
  hold: { words: 'hold', shape: 'cross', colour: 'text-vermilion' },
};

const weightLooks: Record<Weight, Look> = {
  'stops-submission': { words: 'stops submission', shape: 'cross', colour: 'text-vermilion' },
  'reviewer-decides': { words: 'reviewer decides', shape: 'half', colour: 'text-plum' },
  'for-information': { words: 'for information', shape: 'dash', colour: 'text-pencil' },
};

export const packageStateWords = wordsOf(packageLooks);
export const buyingVerdictWords = wordsOf(buyingLooks);
export const weightWords = wordsOf(weightLooks);

function wordsOf<Name extends string>(looks: Record<Name, Look>): Record<Name, string> {
  return Object.fromEntries(Object.entries<Look>(looks).map(([name, look]) => [name, look.words])) as Record<
    Name,
    string
  >;
}

export function PackageStateBadge({ state }: { state: PackageState }) {
  return <Badge {...packageLooks[state]} framed />;
}

export function BuyingVerdictBadge({ verdict }: { verdict: BuyingVerdict }) {
  return <Badge {...buyingLooks[verdict]} framed strong />;
}

export function WeightBadge({ weight }: { weight: Weight }) {
  return <Badge {...weightLooks[weight]} />;
}

function Badge({ words, shape, colour, framed, strong }: Look & { framed?: boolean; strong?: boolean }) {
  return (
    <span
      className={cn(
        'inline-flex items-center gap-1.5 text-[0.875rem] leading-5 whitespace-nowrap',
        colour,
        framed && 'rounded border border-current px-1.5',
        strong && 'font-semibold',
      )}
    >
      <svg
        aria-hidden="true"
        viewBox="0 0 12 12"
        className="size-3 shrink-0 fill-none stroke-current stroke-[1.6]"
      >
        <path d={drawings[shape]} />
      </svg>
      {words}
    </span>
  );
}
