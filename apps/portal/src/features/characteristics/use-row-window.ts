import { useEffect, useState, type RefObject } from 'react';

export const rowHeight = 32;
const overscan = 8;
/** Before the box has been measured. */
const assumedHeight = 600;

/** Which rows of a long table are drawn: those in sight and a few around them. */
export function useRowWindow(box: RefObject<HTMLElement | null>, count: number) {
  const [view, setView] = useState({ top: 0, height: assumedHeight });
  useEffect(() => {
    const element = box.current;
    if (!element) return;
    const measure = () => setView({ top: element.scrollTop, height: element.clientHeight || assumedHeight });
    measure();
    element.addEventListener('scroll', measure, { passive: true });
    const observer = typeof ResizeObserver === 'undefined' ? null : new ResizeObserver(measure);
    observer?.observe(element);
    return () => {
      element.removeEventListener('scroll', measure);
      observer?.disconnect();
    };
  }, [box]);

  const scrollTo = (row: number) => {
    const element = box.current;
    if (!element) return;
    const top = Math.max(0, row) * rowHeight;
    const bottom = top + 2 * rowHeight - element.clientHeight;
    if (top < element.scrollTop) element.scrollTo({ top });
    else if (bottom > element.scrollTop && element.clientHeight > 0) element.scrollTo({ top: bottom });
  };
  return {
    first: Math.max(0, Math.floor(view.top / rowHeight) - overscan),
    last: Math.min(count, Math.ceil((view.top + view.height) / rowHeight) + overscan),
    scrollTo,
  };
}
