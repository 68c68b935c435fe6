import Database from 'better-sqlite3';
import { describe, expect, it } from 'vitest';
import { afterPosition, containing, cutPage, decodeCursor, directionOf, encodeCursor } from './keyset.ts';
import { Invalid } from './problems.ts';

interface Row {
  id: string;
  at: string | null;
}

function listed(rows: readonly Row[], sort: string, limit: number): Row[][] {
  const db = new Database(':memory:');
  db.exec('CREATE TABLE t (id TEXT, at TEXT)');
  for (const row of rows) db.prepare('INSERT INTO t VALUES (?, ?)').run(row.id, row.at);
  const { descending } = directionOf(sort);
  const way = descending ? 'DESC' : 'ASC';
  const pages: Row[][] = [];
  let cursor: string | undefined;
  do {
    const after = afterPosition('at', 'id', descending, decodeCursor(cursor, sort), true);
    const found = db
      .prepare(`SELECT id, at FROM t WHERE 1 = 1${after.sql} ORDER BY at ${way}, id ${way} LIMIT ?`)
      .all(...after.values, limit + 1) as Row[];
    const page = cutPage(
      found,
      limit,
      sort,
      (row) => ({ value: row.at, id: row.id }),
      (row) => row,
    );
    pages.push(page.items);
    cursor = page.nextCursor ?? undefined;
  } while (cursor !== undefined);
  db.close();
  return pages;
}

const rows: Row[] = [
  { id: 'a', at: null },
  { id: 'b', at: '2026-01-02' },
  { id: 'c', at: '2026-01-01' },
  { id: 'd', at: null },
  { id: 'e', at: '2026-01-02' },
  { id: 'f', at: '2026-01-02' },
];

describe('pages by keyset', () => {
  it.each([
    ['at', 'adcbef'],
    ['-at', 'febcda'],
  ])('sorted by %s show every row once, with ties and empty values', (sort, order) => {
    for (const limit of [1, 2, 3, 6, 10]) {
      const pages = listed(rows, sort, limit);
      expect(
        pages
          .flat()
          .map((row) => row.id)
          .join(''),
      ).toBe(order);
      expect(pages.every((page) => page.length <= limit)).toBe(true);
    }
  });

  it('refuse a cursor that is not of this list', () => {
    expect(decodeCursor(undefined, 'at')).toBeNull();
    const cursor = encodeCursor('at', { value: '2026-01-02', id: 'b' });
    expect(decodeCursor(cursor, 'at')).toEqual({ value: '2026-01-02', id: 'b' });
    for (const wrong of ['nonsense', encodeCursor('-at', { value: null, id: 'b' }), btoa('{"a":1}')]) {
      expect(() => decodeCursor(wrong, 'at')).toThrow(Invalid);
    }
  });

  it('take the signs of a search literally', () => {
    expect(containing('50%_\\')).toBe('%50\\%\\_\\\\%');
  });
});
