import type { Page } from '@trammel/shared/pagination';
import type { RequestListItem, requestListQuery } from '@trammel/shared/requests';
import type { DataSource } from 'typeorm';
import type { z } from 'zod';
import { readStatement } from '../../database/raw.ts';
import type { Actor } from '../../http/actor.ts';
import { afterPosition, containing, cutPage, decodeCursor, directionOf } from '../../http/keyset.ts';

type Query = z.infer<typeof requestListQuery>;
type Row = Omit<RequestListItem, 'questionOpen'> & { questionOpen: number };

const columnOf = { dueOn: 'r.due_on', createdAt: 'r.created_at' } as const;
type SortKey = keyof typeof columnOf;

/** Requests this person's organisation sent, and those it received once they were issued. */
export function findRequests(reader: DataSource, actor: Actor, query: Query): Page<RequestListItem> {
  const { key, descending } = directionOf(query.sort);
  const column = columnOf[key as SortKey];
  const way = descending ? 'DESC' : 'ASC';
  const after = afterPosition(column, 'r.id', descending, decodeCursor(query.cursor, query.sort));
  const filters: string[] = [];
  const filterValues: unknown[] = [];
  if (query.state) {
    filters.push('r.state = ?');
    filterValues.push(query.state);
  }
  if (query.q) {
    const like = containing(query.q);
    filters.push(
      `(p.number LIKE ? ESCAPE '\\' OR p.name LIKE ? ESCAPE '\\' OR s.name LIKE ? ESCAPE '\\' OR c.name LIKE ? ESCAPE '\\')`,
    );
    filterValues.push(like, like, like, like);
  }
  const where = filters.map((filter) => ` AND ${filter}`).join('');

  // One limited branch a side, so that each is read from its own index; what a person's role does not include is left out.
  const branches: { sql: string; values: unknown[] }[] = [];
  const branch = (side: 'customer' | 'supplier', ends: string) => ({
    sql: `SELECT * FROM (
      SELECT r.id, r.number, r.state, l.state AS packageState, l.id AS submissionId, '${side}' AS side,
        p.number AS partNumber, p.name AS partName, v.code AS revision, c.name AS customerName,
        s.name AS supplierName, r.due_on AS dueOn, r.question_open AS questionOpen, r.created_at AS createdAt
      FROM requests r
        LEFT JOIN parts p ON p.id = r.part_id
        LEFT JOIN part_revisions v ON v.id = r.revision_id
        LEFT JOIN organisations c ON c.id = r.customer_id
        LEFT JOIN organisations s ON s.id = r.supplier_id
        LEFT JOIN submissions l ON l.request_id = r.id
          AND l.round = (SELECT MAX(round) FROM submissions WHERE request_id = r.id)
      WHERE ${ends}${where}${after.sql}
      ORDER BY ${column} ${way}, r.id ${way} LIMIT ?)`,
    values: [actor.organisationId, ...filterValues, ...after.values, query.limit + 1],
  });
  if (actor.permissions.has('request:write')) branches.push(branch('customer', 'r.customer_id = ?'));
  if (actor.permissions.has('request:answer')) {
    branches.push(branch('supplier', 'r.supplier_id = ? AND r.issued_at IS NOT NULL'));
  }
  if (branches.length === 0) return { items: [], nextCursor: null };

  const rows = readStatement(
    reader,
    `${branches.map(({ sql }) => sql).join(' UNION ALL ')} ORDER BY ${key} ${way}, id ${way} LIMIT ?`,
  ).all(...branches.flatMap(({ values }) => values), query.limit + 1) as Row[];
  return cutPage(
    rows,
    query.limit,
    query.sort,
    (row) => ({ value: row[key as SortKey], id: row.id }),
    (row) => ({ ...row, questionOpen: row.questionOpen === 1 }),
  );
}
