import type { Verdict } from '@trammel/shared/status';
import { cn } from '../../lib/cn.ts';

export const verdictWords: Record<Verdict, string> = {
  'in-tolerance': 'in tolerance',
  'out-of-tolerance': 'out of tolerance',
  undecided: 'undecided',
  'not-measured': 'not measured',
  'no-verdict': 'no verdict',
};

const colours: Record<Verdict, string> = {
  'in-tolerance': 'text-verdigris',
  'out-of-tolerance': 'text-vermilion',
  undecided: 'text-plum',
  'not-measured': 'text-pencil',
  'no-verdict': 'text-pencil',
};

export interface VerdictMarkProps {
  verdict: Verdict;
  /** Shape only, with the word for screen readers and on hover: for narrow columns beside a legend. */
  compact?: boolean;
  /** Follows the word: `out of tolerance, 2 of 6`. */
  detail?: string;
}

/** Shape and word: the colour only repeats them. */
export function VerdictMark({ verdict, compact, detail }: VerdictMarkProps) {
  const words = verdictWords[verdict] + (detail ? `, ${detail}` : '');
  return (
    <span
      className={cn('inline-flex items-center gap-1.5 whitespace-nowrap', colours[verdict])}
      title={compact ? words : undefined}
    >
      <VerdictShape verdict={verdict} />
      <span className={cn(compact && 'sr-only')}>{words}</span>
    </span>
  );
}

/** Filled dot, diamond, half dot, dashed ring, dash. */
export function VerdictShape({ verdict }: { verdict: Verdict }) {
  return (
    <svg aria-hidden="true" viewBox="0 0 12 12" className="size-3 shrink-0 fill-current stroke-current">
      {verdict === 'in-tolerance' && <circle cx="6" cy="6" r="4" />}
      {verdict === 'out-of-tolerance' && <path d="M6 .5L11.5 6 6 11.5.5 6z" stroke="none" />}
      {verdict === 'undecided' && (
        <>
          <circle cx="6" cy="6" r="4.4" fill="none" strokeWidth="1.2" />
          <path d="M6 1.6a4.4 4.4 0 0 0 0 8.8z" stroke="none" />
        </>
      )}
      {verdict === 'not-measured' && (
        <circle cx="6" cy="6" r="4.4" fill="none" strokeWidth="1.3" strokeDasharray="2.2 1.4" />
      )}
      {verdict === 'no-verdict' && <path d="M2 6h8" strokeWidth="1.5" />}
    </svg>
  );
}
