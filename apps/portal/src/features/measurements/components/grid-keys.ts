import type { KeyBinding } from '../../../lib/use-keys.ts';

/** Heard by the grid itself; listed for the keyboard help. */
export const gridKeys: KeyBinding[] = [
  { keys: 'Enter', label: 'Edit, or take the value and go down' },
  { keys: 'Tab', label: 'Take the value and go right' },
  { keys: 'shift+ArrowDown', label: 'Select more' },
  { keys: 'ctrl+c', label: 'Copy the block' },
  { keys: 'ctrl+v', label: 'Paste a block from a spreadsheet' },
  { keys: 'ctrl+d', label: 'Fill the selection from its first row' },
  { keys: 'Delete', label: 'Clear the selection' },
  { keys: 'ctrl+z', label: 'Take back' },
  { keys: 'ctrl+y', label: 'Do again' },
  { keys: 'ctrl+s', label: 'Save now' },
];
