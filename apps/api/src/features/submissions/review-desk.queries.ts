import type { Page } from '@trammel/shared/pagination';
import type { ReviewDeskItem, reviewDeskQuery } from '@trammel/shared/submissions';
import type { DataSource } from 'typeorm';
import type { z } from 'zod';
import { readStatement } from '../../database/raw.ts';
import { afterPosition, containing, cutPage, decodeCursor, directionOf } from '../../http/keyset.ts';
import { dayNumber } from './next-step.rules.ts';

type Query = z.infer<typeof reviewDeskQuery>;

interface Row extends Omit<ReviewDeskItem, 'waitingDays' | 'reviewers' | 'questionOpen'> {
  reviewers: string | null;
  questionOpen: number;
  decidedAt: string | null;
}

const columnOf = {
  submittedAt: 's.submitted_at',
  dueOn: 's.due_on',
  partNumber: 's.part_number',
} as const;
type SortKey = keyof typeof columnOf;

/**
 * The packages a customer has to decide on, in one statement. What came out of a round is told from its submission on;
 * before, the counts are the supplier's own.
 */
export function findReviewDesk(
  reader: DataSource,
  customerId: string,
  query: Query,
  now: string,
): Page<ReviewDeskItem> {
  const { key, descending } = directionOf(query.sort);
  const column = columnOf[key as SortKey];
  const way = descending ? 'DESC' : 'ASC';
  const position = decodeCursor(query.cursor, query.sort);
  const nullable = key === 'submittedAt' && query.show === 'all';
  const after = afterPosition(column, 's.id', descending, position, nullable);
  let where = 's.customer_id = ?';
  const values: unknown[] = [customerId];
  if (query.show === 'waiting') where += " AND s.desk = 'customer'";
  if (query.state) {
    where += ' AND s.state = ?';
    values.push(query.state);
  }
  if (query.supplierId) {
    where += ' AND s.supplier_id = ?';
    values.push(query.supplierId);
  }
  if (query.q) {
    where += ` AND (s.part_number LIKE ? ESCAPE '\\' OR s.part_name LIKE ? ESCAPE '\\' OR o.name LIKE ? ESCAPE '\\')`;
    const like = containing(query.q);
    values.push(like, like, like);
  }
  const rows = readStatement(
    reader,
    `SELECT s.id, s.request_id AS requestId, r.number AS requestNumber, s.round, s.state, o.name AS supplierName,
       s.part_number AS partNumber, s.part_name AS partName, s.revision_code AS revision, s.due_on AS dueOn,
       s.submitted_at AS submittedAt, s.decided_at AS decidedAt,
       CASE WHEN s.submitted_at IS NULL THEN 0 ELSE s.out_count END AS "out",
       CASE WHEN s.submitted_at IS NULL THEN 0 ELSE s.undecided_count END AS undecided,
       CASE WHEN s.submitted_at IS NULL THEN 0 ELSE s.deviations_open END AS deviationsOpen,
       s.special_count AS special, r.question_open AS questionOpen,
       (SELECT group_concat(u.name, char(10)) FROM request_reviewers rr JOIN users u ON u.id = rr.user_id
        WHERE rr.request_id = s.request_id) AS reviewers
     FROM submissions s LEFT JOIN requests r ON r.id = s.request_id LEFT JOIN organisations o ON o.id = s.supplier_id
     WHERE ${where}${after.sql} ORDER BY ${column} ${way}, s.id ${way} LIMIT ?`,
  ).all(...values, ...after.values, query.limit + 1) as Row[];
  const today = dayNumber(now);
  return cutPage(
    rows,
    query.limit,
    query.sort,
    (row) => ({ value: row[key as SortKey], id: row.id }),
    (row) => itemOf(row, today),
  );
}

/** Named field by field: copying the driver's rows whole costs more than reading them. */
function itemOf(row: Row, today: number): ReviewDeskItem {
  const { submittedAt } = row;
  return {
    id: row.id,
    requestId: row.requestId,
    requestNumber: row.requestNumber,
    round: row.round,
    state: row.state,
    supplierName: row.supplierName,
    partNumber: row.partNumber,
    partName: row.partName,
    revision: row.revision,
    dueOn: row.dueOn,
    submittedAt,
    waitingDays: submittedAt === null || row.decidedAt !== null ? 0 : today - dayNumber(submittedAt),
    out: row.out,
    undecided: row.undecided,
    special: row.special,
    deviationsOpen: row.deviationsOpen,
    reviewers: row.reviewers === null ? [] : row.reviewers.split('\n').sort(),
    questionOpen: row.questionOpen === 1,
  };
}
