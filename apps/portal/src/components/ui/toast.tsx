import { useEffect, useSyncExternalStore } from 'react';
import { Button } from './button.tsx';

export interface Toast {
  text: string;
  /** Takes the act back. */
  undo?: () => void;
}

interface Shown extends Toast {
  id: number;
}

let shown: readonly Shown[] = [];
let lastId = 0;
const listeners = new Set<() => void>();

function publish(next: readonly Shown[]): void {
  shown = next;
  for (const listener of listeners) listener();
}

/** Confirms a success; refusals and failures stand beside their cause instead. */
export function showToast(toast: Toast): void {
  lastId += 1;
  publish([...shown.slice(-2), { ...toast, id: lastId }]);
}

export function dropToasts(): void {
  publish([]);
}

const dismiss = (id: number) => publish(shown.filter((toast) => toast.id !== id));

/** Stands once in the layout. */
export function ToastRegion() {
  const toasts = useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => shown,
  );
  return (
    <div
      role="status"
      className="no-print pointer-events-none fixed inset-x-3 bottom-3 z-40 flex flex-col items-end gap-2"
    >
      {toasts.map((toast) => (
        <ToastLine key={toast.id} toast={toast} />
      ))}
    </div>
  );
}

function ToastLine({ toast }: { toast: Shown }) {
  // What can be undone stays long enough to be reached with the keyboard.
  const lifetimeMs = toast.undo ? 12_000 : 5_000;
  useEffect(() => {
    const timer = setTimeout(() => dismiss(toast.id), lifetimeMs);
    return () => clearTimeout(timer);
  }, [toast.id, lifetimeMs]);
  return (
    <div className="pointer-events-auto flex max-w-md items-center gap-3 rounded-max border border-l-4 border-verdigris bg-sheet px-4 py-2">
      <span>{toast.text}</span>
      {toast.undo && (
        <Button
          size="small"
          onClick={() => {
            toast.undo?.();
            dismiss(toast.id);
          }}
        >
          Undo
        </Button>
      )}
      <Button
        size="small"
        weight="quiet"
        onClick={() => dismiss(toast.id)}
        aria-label={`Dismiss: ${toast.text}`}
      >
        Close
      </Button>
    </div>
  );
}
