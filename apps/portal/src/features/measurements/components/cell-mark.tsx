import type { Cell } from '../sheet-model.ts';

const words: Record<string, string> = {
  i: 'in tolerance',
  o: 'out of tolerance',
  u: 'undecided',
  n: 'not measured',
  x: 'no verdict',
  r: 'not a reading',
};

export function cellInWords(cell: Cell): string {
  const state =
    cell.state === 'unsaved' ? ', being saved' : cell.state === 'conflict' ? ', changed by someone else' : '';
  return `${cell.text ?? 'empty'}, ${words[cell.mark] ?? ''}${cell.reason ? `: ${cell.reason}` : ''}${state}`;
}

/** Shape of a verdict at the size of a figure; drawn only where it says more than the figure itself. */
export function CellMark({ mark }: { mark: string }) {
  if (mark === 'o') {
    return (
      <svg aria-hidden="true" viewBox="0 0 8 8" className="size-2 shrink-0 fill-vermilion">
        <path d="M4 0 8 4 4 8 0 4z" />
      </svg>
    );
  }
  if (mark === 'u') {
    return (
      <svg aria-hidden="true" viewBox="0 0 8 8" className="size-2 shrink-0 fill-none stroke-plum">
        <circle cx="4" cy="4" r="3.2" />
        <path d="M4 .8a3.2 3.2 0 0 0 0 6.4z" className="fill-plum" stroke="none" />
      </svg>
    );
  }
  if (mark === 'r') {
    return (
      <svg aria-hidden="true" viewBox="0 0 8 8" className="size-2 shrink-0 stroke-vermilion">
        <path d="M1 1l6 6M7 1L1 7" strokeWidth="1.4" />
      </svg>
    );
  }
  return null;
}
