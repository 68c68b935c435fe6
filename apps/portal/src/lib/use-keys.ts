import { useEffect, useRef, useSyncExternalStore } from 'react';

export interface KeyBinding {
  /** `j`, `?`, `Enter`, `Escape`, `ctrl+z` (also the command key), `shift+ArrowDown`. */
  keys: string;
  /** What it does, as the list of keys tells it. */
  label: string;
  /** Left out where the component itself hears the key and only wants it listed. */
  run?: (event: KeyboardEvent) => void;
  /** Heard also while a field is being typed in. */
  whileTyping?: boolean;
}

export interface KeyGroup {
  name: string;
  bindings: KeyBinding[];
}

let groups: KeyGroup[] = [];
const listeners = new Set<() => void>();

function publish(next: KeyGroup[]): void {
  groups = next;
  for (const listener of listeners) listener();
}

/** Makes keys work while the component is shown, and lists them under `?`. */
export function useKeys(name: string, bindings: KeyBinding[], enabled = true): void {
  const latest = useRef(bindings);
  useEffect(() => {
    latest.current = bindings;
  });
  const listed = bindings.map((binding) => `${binding.keys}\u0000${binding.label}`).join('\u0001');

  useEffect(() => {
    if (!enabled) return;
    const group = { name, bindings: latest.current };
    publish([...groups, group]);
    const hear = (event: KeyboardEvent) => {
      const hit = latest.current.find((binding) => binding.run && matches(event, binding));
      if (hit?.run === undefined || event.defaultPrevented) return;
      event.preventDefault();
      hit.run(event);
    };
    document.addEventListener('keydown', hear);
    return () => {
      document.removeEventListener('keydown', hear);
      publish(groups.filter((other) => other !== group));
    };
  }, [name, listed, enabled]);
}

export function useKeyGroups(): readonly KeyGroup[] {
  return useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => groups,
  );
}

export function matches(event: KeyboardEvent, binding: Pick<KeyBinding, 'keys' | 'whileTyping'>): boolean {
  const parts = binding.keys.split('+');
  const key = binding.keys === '+' ? '+' : (parts.at(-1) ?? '');
  const wants = (name: string) => parts.length > 1 && parts.slice(0, -1).includes(name);
  const sameKey = key.length === 1 ? event.key.toLowerCase() === key.toLowerCase() : event.key === key;
  if (!sameKey || event.isComposing || event.altKey !== wants('alt')) return false;
  if ((event.ctrlKey || event.metaKey) !== wants('ctrl')) return false;
  // A sign such as ? needs shift on some keyboards and not on others: only letters and named keys tell it apart.
  const shiftCounts = key.length > 1 || /[a-z]/i.test(key);
  if (shiftCounts && event.shiftKey !== wants('shift')) return false;
  if (document.querySelector('dialog[open]') && !isInsideOpenDialog(event.target)) return false;
  return binding.whileTyping === true || !isTyping(event.target);
}

function isTyping(target: EventTarget | null): boolean {
  if (!(target instanceof HTMLElement)) return false;
  if (
    target.isContentEditable ||
    target instanceof HTMLTextAreaElement ||
    target instanceof HTMLSelectElement
  )
    return true;
  return (
    target instanceof HTMLInputElement && !['checkbox', 'radio', 'button', 'submit'].includes(target.type)
  );
}

function isInsideOpenDialog(target: EventTarget | null): boolean {
  return target instanceof Element && target.closest('dialog[open]') !== null;
}
