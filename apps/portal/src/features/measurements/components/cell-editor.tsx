import { useEffect, useRef } from 'react';
import { layout } from './grid-layout.ts';

export type EditorExit = 'down' | 'up' | 'right' | 'left' | 'stay' | 'cancel';

interface CellEditorProps {
  label: string;
  initial: string;
  left: number;
  onDone: (text: string, exit: EditorExit) => void;
}

const exits: Record<string, EditorExit> = { ArrowDown: 'down', ArrowUp: 'up', Escape: 'cancel' };

/** The one editor of the grid; it stands where the active cell is and hands its text over when it is left. */
export function CellEditor({ label, initial, left, onDone }: CellEditorProps) {
  const input = useRef<HTMLInputElement>(null);
  const done = useRef(false);
  useEffect(() => {
    const element = input.current;
    element?.focus();
    element?.setSelectionRange(element.value.length, element.value.length);
  }, []);
  const leave = (exit: EditorExit) => {
    if (done.current) return;
    done.current = true;
    onDone(input.current?.value ?? '', exit);
  };
  return (
    <input
      ref={input}
      aria-label={label}
      defaultValue={initial}
      autoComplete="off"
      inputMode="text"
      maxLength={60}
      className="figures absolute top-0 z-[5] h-full border-2 border-marking bg-sheet px-1.5 text-right text-graphite outline-none"
      style={{ left, width: Math.max(layout.cell, 110) }}
      onBlur={() => leave('stay')}
      onKeyDown={(event) => {
        const exit =
          event.key === 'Enter'
            ? event.shiftKey
              ? 'up'
              : 'down'
            : event.key === 'Tab'
              ? event.shiftKey
                ? 'left'
                : 'right'
              : exits[event.key];
        event.stopPropagation();
        if (exit === undefined) return;
        event.preventDefault();
        leave(exit);
      }}
    />
  );
}
