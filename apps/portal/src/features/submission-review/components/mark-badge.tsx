import type { RowMark } from '@trammel/shared/submission-review';

const looks: Record<RowMark, { word: string; look: string; shape: string }> = {
  accepted: { word: 'accepted', look: 'text-verdigris', shape: 'M2 6.5 5 9.5 10.5 3' },
  refused: { word: 'refused', look: 'text-vermilion', shape: 'M2.5 2.5l7 7M9.5 2.5l-7 7' },
  questioned: {
    word: 'questioned',
    look: 'text-plum',
    shape: 'M3.5 4a2.5 2.5 0 1 1 3.4 2.3C6 6.8 6 7.2 6 8M6 10v.6',
  },
};

/** The reviewer's mark: a stroke and a word. */
export function MarkBadge({ mark, compact = false }: { mark: RowMark | null; compact?: boolean }) {
  if (mark === null) return <span className={compact ? 'sr-only' : 'text-pencil'}>not marked</span>;
  const { word, look, shape } = looks[mark];
  return (
    <span
      className={`inline-flex items-center gap-1 whitespace-nowrap ${look}`}
      title={compact ? word : undefined}
    >
      <svg
        aria-hidden="true"
        viewBox="0 0 12 12"
        className="size-3 fill-none stroke-current"
        strokeWidth="1.8"
      >
        <path d={shape} />
      </svg>
      <span className={compact ? 'sr-only' : ''}>{word}</span>
    </span>
  );
}
