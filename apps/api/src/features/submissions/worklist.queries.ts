import type { Page } from '@trammel/shared/pagination';
import type { WorklistItem, worklistQuery } from '@trammel/shared/submissions';
import type { DataSource } from 'typeorm';
import type { z } from 'zod';
import { readStatement } from '../../database/raw.ts';
import { afterPosition, containing, cutPage, decodeCursor, directionOf } from '../../http/keyset.ts';
import { holderOf, nextStep } from './next-step.rules.ts';

type Query = z.infer<typeof worklistQuery>;

interface Row {
  id: string;
  requestId: string;
  requestNumber: number;
  round: number;
  state: WorklistItem['state'];
  desk: 'supplier' | 'customer' | 'closed';
  isOpen: number;
  customerName: string;
  partNumber: string;
  partName: string;
  revision: string;
  dueOn: string;
  stops: number;
  decides: number;
  informs: number;
  measuredRows: number;
  totalRows: number;
  questionOpen: number;
  updatedAt: string;
}

const columnOf = { dueOn: 's.due_on', partNumber: 's.part_number', updatedAt: 's.updated_at' } as const;
type SortKey = keyof typeof columnOf;

/** The packages a supplier has to do with, in one statement. The joins are outer so that the list's index leads the plan. */
export function findWorklist(
  reader: DataSource,
  supplier: { id: string; name: string },
  query: Query,
): Page<WorklistItem> {
  const { key, descending } = directionOf(query.sort);
  const column = columnOf[key as SortKey];
  const way = descending ? 'DESC' : 'ASC';
  const after = afterPosition(column, 's.id', descending, decodeCursor(query.cursor, query.sort));
  let where = 's.supplier_id = ?';
  const values: unknown[] = [supplier.id];
  if (query.show === 'open') where += ' AND s.is_open = 1';
  if (query.state) {
    where += ' AND s.state = ?';
    values.push(query.state);
  }
  if (query.q) {
    where += ` AND (s.part_number LIKE ? ESCAPE '\\' OR s.part_name LIKE ? ESCAPE '\\' OR c.name LIKE ? ESCAPE '\\')`;
    const like = containing(query.q);
    values.push(like, like, like);
  }
  const rows = readStatement(
    reader,
    `SELECT s.id, s.request_id AS requestId, r.number AS requestNumber, s.round, s.state, s.desk, s.is_open AS isOpen,
       c.name AS customerName, s.part_number AS partNumber, s.part_name AS partName, s.revision_code AS revision,
       s.due_on AS dueOn, s.stops, s.decides, s.informs, s.measured_rows AS measuredRows, s.total_rows AS totalRows,
       r.question_open AS questionOpen, s.updated_at AS updatedAt
     FROM submissions s LEFT JOIN requests r ON r.id = s.request_id LEFT JOIN organisations c ON c.id = s.customer_id
     WHERE ${where}${after.sql} ORDER BY ${column} ${way}, s.id ${way} LIMIT ?`,
  ).all(...values, ...after.values, query.limit + 1) as Row[];
  return cutPage(
    rows,
    query.limit,
    query.sort,
    (row) => ({ value: row[key as SortKey], id: row.id }),
    (row) => itemOf(row, supplier.name),
  );
}

function itemOf(row: Row, supplierName: string): WorklistItem {
  const questionOpen = row.questionOpen === 1;
  return {
    id: row.id,
    requestId: row.requestId,
    requestNumber: row.requestNumber,
    round: row.round,
    state: row.state,
    customerName: row.customerName,
    partNumber: row.partNumber,
    partName: row.partName,
    revision: row.revision,
    dueOn: row.dueOn,
    findings: { stops: row.stops, decides: row.decides, informs: row.informs },
    measured: { done: row.measuredRows, of: row.totalRows },
    questionOpen,
    nextStep: nextStep({ ...row, questionOpen, isOpen: row.isOpen === 1 }),
    holder: holderOf(row.desk, { customer: row.customerName, supplier: supplierName }),
    updatedAt: row.updatedAt,
  };
}
