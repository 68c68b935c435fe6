import { useEffect, useRef, useState } from 'react';

export interface PointerActs {
  point: (row: number, column: number, extend: boolean) => void;
  open: (row: number, column: number) => void;
}

/** The same two functions for every drawing, so that rows which did not change are left alone. */
export function useStableActs(acts: PointerActs): PointerActs {
  const latest = useRef(acts);
  useEffect(() => {
    latest.current = acts;
  });
  const [stable] = useState<PointerActs>(() => ({
    point: (row, column, extend) => latest.current.point(row, column, extend),
    open: (row, column) => latest.current.open(row, column),
  }));
  return stable;
}
