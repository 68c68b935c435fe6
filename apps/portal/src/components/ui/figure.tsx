import { useEffect, useId, useRef, useState, type ReactNode } from 'react';
import { placePopover } from './place-popover.ts';

export interface FigureProps {
  /** The number as it is shown, or why there is none. */
  value: ReactNode;
  /** What it is: `Ppk of balloon 3, spindle 1`. */
  name: string;
  formula: string;
  inputs?: readonly { name: string; value: string }[];
  n?: number;
  /** Standard with its clause. */
  standard: string;
  /** What it does not say. */
  caution?: string;
}

/** A computed number that explains itself on hover, focus and tap; Escape closes. */
export function Figure({ value, name, formula, inputs = [], n, standard, caution }: FigureProps) {
  const [open, setOpen] = useState(false);
  const [pinned, setPinned] = useState(false);
  const id = useId();
  const trigger = useRef<HTMLButtonElement>(null);
  const panel = useRef<HTMLDivElement>(null);
  const shown = open || pinned;

  useEffect(() => {
    const box = panel.current;
    if (!shown || box === null || trigger.current === null) return;
    // The top layer is not cut off by a scrolling table.
    box.showPopover();
    placePopover(box, trigger.current.getBoundingClientRect());
    const leave = (event: KeyboardEvent | Event) => {
      if (event instanceof KeyboardEvent && event.key !== 'Escape') return;
      setOpen(false);
      setPinned(false);
    };
    document.addEventListener('keydown', leave);
    document.addEventListener('scroll', leave, true);
    return () => {
      document.removeEventListener('keydown', leave);
      document.removeEventListener('scroll', leave, true);
      if (box.isConnected) box.hidePopover();
    };
  }, [shown]);

  return (
    <span className="inline-block" onPointerEnter={() => setOpen(true)} onPointerLeave={() => setOpen(false)}>
      <button
        ref={trigger}
        type="button"
        aria-describedby={shown ? id : undefined}
        aria-expanded={shown}
        onFocus={() => setOpen(true)}
        onBlur={() => {
          setOpen(false);
          setPinned(false);
        }}
        onClick={() => setPinned(!pinned)}
        className="figures min-h-6 cursor-help underline decoration-pencil decoration-dotted underline-offset-3"
      >
        {value}
      </button>
      {shown && (
        <div
          ref={panel}
          id={id}
          popover="manual"
          role="tooltip"
          className="fixed inset-auto m-0 w-max max-w-[min(22rem,calc(100vw-16px))] rounded-max border border-pencil bg-sheet px-3 py-2 text-start text-[0.875rem] text-graphite"
        >
          <p className="font-semibold">{name}</p>
          <p className="figures mt-1">{formula}</p>
          {(inputs.length > 0 || n !== undefined) && (
            <dl className="mt-1 grid grid-cols-[auto_1fr] gap-x-3">
              {[...inputs, ...(n === undefined ? [] : [{ name: 'n', value: String(n) }])].map((input) => (
                <div key={input.name} className="contents">
                  <dt className="text-pencil">{input.name}</dt>
                  <dd className="figures">{input.value}</dd>
                </div>
              ))}
            </dl>
          )}
          <p className="mt-1 text-pencil">{standard}</p>
          {caution && <p className="mt-1 border-t border-rule pt-1">{caution}</p>}
        </div>
      )}
    </span>
  );
}
