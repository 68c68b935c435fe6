import { useEffect, useRef } from 'react';
import type { FieldError } from '../../lib/use-form.ts';

export interface ErrorSummaryProps {
  /** Refusals that belong to fields: each links to its field. */
  errors: readonly FieldError[];
  /** Turns a field's path into the id of its control; `form.idOf`. */
  idOf: (path: string) => string;
  /** What belongs to no field. */
  failure?: string | null;
}

/** Stands at the top of a form and takes the focus when something was refused. */
export function ErrorSummary({ errors, idOf, failure = null }: ErrorSummaryProps) {
  const box = useRef<HTMLDivElement>(null);
  const count = errors.length + (failure ? 1 : 0);
  const text = errors.map((error) => error.field + error.message).join() + (failure ?? '');
  const shown = useRef('');
  useEffect(() => {
    // Mending one entry shortens the list; the focus then stays in the field being mended.
    if (text !== '' && text.length > shown.current.length) box.current?.focus();
    shown.current = text;
  }, [text]);
  if (count === 0) return null;
  const goTo = (path: string) => {
    const target = document.getElementById(idOf(path));
    target?.focus();
    target?.scrollIntoView({ block: 'center' });
  };
  return (
    <div
      ref={box}
      role="alert"
      tabIndex={-1}
      className="border border-l-4 border-vermilion bg-vermilion/6 px-4 py-3"
    >
      <h2>{count === 1 ? 'One thing to mend' : `${count} things to mend`}</h2>
      <ul className="mt-1 list-disc pl-5">
        {failure && <li>{failure}</li>}
        {errors.map((error) => (
          <li key={error.field}>
            <a
              href={`#${idOf(error.field)}`}
              className="inline-flex min-h-6 items-center text-vermilion"
              onClick={(event) => {
                event.preventDefault();
                goTo(error.field);
              }}
            >
              {error.label === undefined ? error.message : `${error.label}: ${error.message}`}
            </a>
          </li>
        ))}
      </ul>
    </div>
  );
}
