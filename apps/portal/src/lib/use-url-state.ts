import { useCallback, useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';

/** Values that a page keeps in its address; what equals its default is left out of it. */
export function useUrlState<Keys extends string>(
  defaults: Record<Keys, string>,
): readonly [
  Record<Keys, string>,
  (change: Partial<Record<Keys, string>>, options?: { push?: boolean }) => void,
] {
  const [search, setSearch] = useSearchParams();
  const frozen = JSON.stringify(defaults);

  const values = useMemo(() => {
    const known = JSON.parse(frozen) as Record<Keys, string>;
    for (const key of Object.keys(known) as Keys[]) known[key] = search.get(key) ?? known[key];
    return known;
  }, [frozen, search]);

  const change = useCallback(
    (patch: Partial<Record<Keys, string>>, options: { push?: boolean } = {}) => {
      const known = JSON.parse(frozen) as Record<string, string>;
      setSearch(
        (before) => {
          const next = new URLSearchParams(before);
          // A page of a list belongs to its filter and sort: another filter starts at the first page.
          if (!('cursor' in patch)) next.delete('cursor');
          for (const [key, value] of Object.entries(patch) as [string, string][]) {
            if (value === known[key] || value === '') next.delete(key);
            else next.set(key, value);
          }
          return next;
        },
        { replace: !options.push, preventScrollReset: true },
      );
    },
    [frozen, setSearch],
  );

  return [values, change] as const;
}
