import { useEffect, useRef, useState, useSyncExternalStore } from 'react';
import { Autosave, type AutosaveOptions, type AutosaveSnapshot } from './autosave.ts';

export interface UseAutosaveOptions<T> extends AutosaveOptions<T> {
  value: T;
  /** Puts a draft that a closed tab left into the form. */
  onRecover: (value: T) => void;
}

export interface UseAutosave<T> extends AutosaveSnapshot<T> {
  flush: () => Promise<void>;
  retryNow: () => void;
  resolve: Autosave<T>['resolve'];
}

/** `initial`, `version` and `key` are those of the first render: give the component a `key` per object. */
export function useAutosave<T>(options: UseAutosaveOptions<T>): UseAutosave<T> {
  const latest = useRef(options);
  useEffect(() => {
    latest.current = options;
  });
  const [autosave] = useState(() => new Autosave<T>(options));
  const snapshot = useSyncExternalStore(autosave.subscribe, autosave.read);

  useEffect(() => {
    const recovered = autosave.recover();
    if (recovered !== null) latest.current.onRecover(recovered);
    const leave = () => void autosave.flush({ keepalive: true });
    window.addEventListener('online', autosave.retryNow);
    window.addEventListener('pagehide', leave);
    return () => {
      window.removeEventListener('online', autosave.retryNow);
      window.removeEventListener('pagehide', leave);
      leave();
    };
  }, [autosave]);

  useEffect(() => {
    autosave.change(options.value);
  }, [autosave, options.value]);

  return {
    ...snapshot,
    flush: () => autosave.flush(),
    retryNow: autosave.retryNow,
    resolve: autosave.resolve.bind(autosave),
  };
}
