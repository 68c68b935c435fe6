import { invalidField } from './problems.ts';

export type CursorPart = string | number | null;

/** The sort values and id of the last row of a page, opaque to whoever sends them back. */
export function writeCursor(parts: readonly CursorPart[]): string {
  return Buffer.from(JSON.stringify(parts)).toString('base64url');
}

/** Reads a cursor of so many parts; one that was made up or belongs to another list is refused, never guessed at. */
export function readCursor(cursor: string, length: number): CursorPart[] {
  const parts = parsed(cursor);
  const fits =
    Array.isArray(parts) &&
    parts.length === length &&
    parts.every((part) => part === null || typeof part === 'string' || Number.isFinite(part));
  if (!fits) throw invalidField('?cursor', 'This page marker is not from this list. Start again without it.');
  return parts as CursorPart[];
}

function parsed(cursor: string): unknown {
  try {
    return JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8'));
  } catch {
    return undefined;
  }
}
