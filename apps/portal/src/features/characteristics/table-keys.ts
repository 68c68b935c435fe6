import { tableColumns } from './table-row.ts';

export type TableCommand =
  | { readonly do: 'move'; readonly down: number; readonly across: number }
  | { readonly do: 'type'; readonly text: string }
  | { readonly do: 'edit' | 'clear' | 'undo' | 'redo' | 'add' | 'remove' | 'form' };

const steps: Record<string, readonly [number, number]> = {
  ArrowUp: [-1, 0],
  ArrowDown: [1, 0],
  ArrowLeft: [0, -1],
  ArrowRight: [0, 1],
  PageUp: [-15, 0],
  PageDown: [15, 0],
  Home: [0, -tableColumns.length],
  End: [0, tableColumns.length],
};

const withAlt: Record<string, 'add' | 'remove' | 'form'> = { Insert: 'add', Delete: 'remove', Enter: 'form' };
const plain: Record<string, 'clear' | 'edit'> = {
  Delete: 'clear',
  Backspace: 'clear',
  Enter: 'edit',
  F2: 'edit',
};

interface Pressed {
  readonly key: string;
  readonly ctrlKey: boolean;
  readonly metaKey: boolean;
  readonly altKey: boolean;
  readonly shiftKey: boolean;
}

/** ±, µ and the like are typed with AltGr, which arrives as ctrl and alt, or with option. */
function isSign({ key, ctrlKey, altKey }: Pressed): boolean {
  return altKey && key.length === 1 && (ctrlKey || !/[a-z0-9 ]/i.test(key));
}

/** What a key means in the grid while no cell is being edited; null leaves it to the browser. */
export function commandOf(event: Pressed, column: number): TableCommand | null {
  if (isSign(event)) return { do: 'type', text: event.key };
  const command = event.ctrlKey || event.metaKey;
  const key = event.key.toLowerCase();
  if (command) {
    if (key === 'z') return { do: event.shiftKey ? 'redo' : 'undo' };
    return key === 'y' ? { do: 'redo' } : null;
  }
  if (event.altKey) {
    const act = withAlt[event.key];
    return act ? { do: act } : null;
  }
  const step = steps[event.key];
  if (step) return { do: 'move', down: step[0], across: step[1] };
  if (event.key === 'Tab') {
    const next = column + (event.shiftKey ? -1 : 1);
    // At the ends of a row the focus leaves the grid, as it leaves any other control.
    return next < 0 || next >= tableColumns.length ? null : { do: 'move', down: 0, across: next - column };
  }
  const act = plain[event.key];
  if (act) return { do: act };
  return event.key.length === 1 ? { do: 'type', text: event.key } : null;
}

export const tableKeys = [
  { keys: 'Enter', label: 'Edit the cell' },
  { keys: 'Tab', label: 'Next cell' },
  { keys: 'ctrl+v', label: 'Paste a block from a spreadsheet' },
  { keys: 'Delete', label: 'Empty the cell' },
  { keys: 'ctrl+z', label: 'Undo' },
  { keys: 'ctrl+y', label: 'Redo' },
  { keys: 'alt+Insert', label: 'Add a row below' },
  { keys: 'alt+Delete', label: 'Remove the row' },
  { keys: 'alt+Enter', label: 'Open the row as a form' },
];
