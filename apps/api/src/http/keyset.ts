import type { Page } from '@trammel/shared/pagination';
import { z } from 'zod';
import { invalidField } from './problems.ts';

/** Where the page before ended: the value sorted by and the id that settles ties. */
export interface KeysetPosition {
  readonly value: string | number | null;
  readonly id: string;
}

const cursorShape = z.tuple([
  z.string(),
  z.union([z.string().max(400), z.number(), z.null()]),
  z.string().max(60),
]);

export function encodeCursor(sort: string, position: KeysetPosition): string {
  return Buffer.from(JSON.stringify([sort, position.value, position.id])).toString('base64url');
}

/** Null for the first page. A cursor of another sort, or one we did not make, is refused at its place. */
export function decodeCursor(cursor: string | undefined, sort: string): KeysetPosition | null {
  if (cursor === undefined || cursor === '') return null;
  const parsed = cursorShape.safeParse(readJson(cursor));
  if (!parsed.success || parsed.data[0] !== sort) {
    throw invalidField('?cursor', 'This place belongs to another list or sort; start at the first page.');
  }
  return { value: parsed.data[1], id: parsed.data[2] };
}

function readJson(cursor: string): unknown {
  try {
    return JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8'));
  } catch {
    return null;
  }
}

/** A contract's sort word, such as `-dueOn`, as column name and direction. */
export function directionOf(sort: string): { key: string; descending: boolean } {
  return sort.startsWith('-') ? { key: sort.slice(1), descending: true } : { key: sort, descending: false };
}

/**
 * The rows after a position, as a condition that an index over (column, id) serves. SQLite sorts null before any value;
 * say when the column may be null, because that condition costs a descending list its index.
 */
export function afterPosition(
  column: string,
  idColumn: string,
  descending: boolean,
  position: KeysetPosition | null,
  nullable = false,
): { sql: string; values: unknown[] } {
  if (position === null) return { sql: '', values: [] };
  const sign = descending ? '<' : '>';
  const { value, id } = position;
  if (value !== null) {
    const after = `(${column}, ${idColumn}) ${sign} (?, ?)`;
    return {
      sql: descending && nullable ? ` AND (${after} OR ${column} IS NULL)` : ` AND ${after}`,
      values: [value, id],
    };
  }
  const withinNulls = `(${column} IS NULL AND ${idColumn} ${sign} ?)`;
  return {
    sql: descending ? ` AND ${withinNulls}` : ` AND (${withinNulls} OR ${column} IS NOT NULL)`,
    values: [id],
  };
}

/** Cuts `limit + 1` rows to a page; the row too many only tells that there is more. */
export function cutPage<Row, Item>(
  rows: readonly Row[],
  limit: number,
  sort: string,
  positionOf: (row: Row) => KeysetPosition,
  itemOf: (row: Row) => Item,
): Page<Item> {
  const shown = rows.slice(0, limit);
  const last = shown.at(-1);
  return {
    items: shown.map(itemOf),
    nextCursor: rows.length > limit && last !== undefined ? encodeCursor(sort, positionOf(last)) : null,
  };
}

/** A typed search as a LIKE pattern in which % and _ mean themselves; use with `ESCAPE '\'`. */
export function containing(text: string): string {
  return `%${text.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`;
}
