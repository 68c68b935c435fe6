import { useState } from 'react';
import { useKeyGroups, useKeys } from '../../lib/use-keys.ts';
import { Dialog } from './dialog.tsx';

const words: Record<string, string> = {
  ArrowUp: '↑',
  ArrowDown: '↓',
  ArrowLeft: '←',
  ArrowRight: '→',
  ctrl: 'Ctrl',
  shift: 'Shift',
  alt: 'Alt',
};

/** Stands once in the layout: `?` lists the keys of the page. */
export function KeyboardHelp() {
  const [open, setOpen] = useState(false);
  const groups = useKeyGroups();
  useKeys('Everywhere', [{ keys: '?', label: 'List the keys of this page', run: () => setOpen(true) }]);
  return (
    <Dialog open={open} onClose={() => setOpen(false)} title="Keys of this page">
      {groups.map((group, index) => (
        <section key={`${group.name}${index}`}>
          <h3 className="mb-1">{group.name}</h3>
          <dl className="grid grid-cols-[minmax(96px,auto)_1fr] gap-x-4 gap-y-1">
            {group.bindings.map((binding) => (
              <div key={binding.keys + binding.label} className="contents">
                <dt>
                  <KeyCaps keys={binding.keys} />
                </dt>
                <dd>{binding.label}</dd>
              </div>
            ))}
          </dl>
        </section>
      ))}
    </Dialog>
  );
}

export function KeyCaps({ keys }: { keys: string }) {
  const parts = keys === '+' ? ['+'] : keys.split('+');
  return (
    <span className="inline-flex gap-1">
      {parts.map((part) => (
        <kbd key={part} className="rounded border border-pencil px-1.5 text-[0.8125rem] leading-5">
          {words[part] ?? part}
        </kbd>
      ))}
    </span>
  );
}
