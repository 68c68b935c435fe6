import { showBytes, showCount } from '../../lib/format.ts';
import { Button } from './button.tsx';

export interface ProgressProps {
  /** What is under way, naming the object: `Sending cover.pdf`. */
  label: string;
  done: number;
  /** Null while it is not known. */
  total: number | null;
  /** `bytes`, or what is counted: `rows`, `steps`. */
  unit: string;
  onCancel?: () => void;
}

export function Progress({ label, done, total, unit, onCancel }: ProgressProps) {
  const show = (value: number) => (unit === 'bytes' ? showBytes(value) : showCount(value));
  const words = total === null ? show(done) : `${show(done)} of ${show(total)}`;
  return (
    <div className="flex flex-wrap items-center gap-x-3 gap-y-1 border border-rule bg-sheet px-3 py-2">
      <span className="min-w-0 flex-1 basis-48 break-words">{label}</span>
      <progress
        aria-label={label}
        value={total === null ? undefined : done}
        max={total === null ? undefined : Math.max(total, 1)}
        className="h-2 w-40 appearance-none border border-pencil [&::-moz-progress-bar]:bg-marking [&::-webkit-progress-bar]:bg-sheet [&::-webkit-progress-value]:bg-marking"
      />
      <span className="figures text-pencil">
        {words}
        {unit !== 'bytes' && ` ${unit}`}
      </span>
      {onCancel && (
        <Button size="small" onClick={onCancel} aria-label={`Cancel: ${label}`}>
          Cancel
        </Button>
      )}
    </div>
  );
}
