import type { DataSource } from 'typeorm';
import type { z } from 'zod';
import type {
  BuyingStatusItem,
  BuyingStatusResponse,
  buyingStatusQuery,
} from '@trammel/shared/buying-status';
import type { BuyingVerdict, PackageState } from '@trammel/shared/status';
import { readStatement } from '../../database/raw.ts';
import { afterPosition, containing, cutPage, decodeCursor, directionOf } from '../../http/keyset.ts';
import { blockerOf, buyingVerdictSql, type DecisionInForce } from './buying-verdict.ts';

type Query = z.output<typeof buyingStatusQuery>;

interface Row extends DecisionInForce {
  id: string;
  partNumber: string;
  partName: string;
  supplierName: string;
  supplierId: string;
  verdict: BuyingVerdict;
  approvedRevision: string | null;
  currentRevision: string | null;
  openState: PackageState | null;
  openDesk: 'supplier' | 'customer' | 'closed' | null;
  openDueOn: string | null;
  waitingSince: string | null;
  customerName: string;
  streamsCovered: string | null;
}

const waitingSince = `CASE o.desk WHEN 'customer' THEN o.submitted_at WHEN 'supplier' THEN COALESCE(o.decided_at, o.created_at) END`;

const columnOf = {
  partNumber: 'l.part_number',
  supplier: 'l.supplier_name',
  until: 'l.end_on',
  waitingSince,
} as const;
const valueOf = {
  partNumber: (row: Row) => row.partNumber,
  supplier: (row: Row) => row.supplierName,
  until: (row: Row) => row.endOn,
  waitingSince: (row: Row) => row.waitingSince,
} as const;
type SortKey = keyof typeof columnOf;

const columns = `l.id, l.part_number AS partNumber, l.part_name AS partName, l.supplier_name AS supplierName,
  l.supplier_id AS supplierId, ${buyingVerdictSql} AS verdict, l.outcome, l.end_on AS endOn, l.piece_limit AS pieceLimit,
  l.pieces_used AS piecesUsed, l.approved_revision AS approvedRevision,
  (SELECT v.code FROM part_revisions v WHERE v.part_id = l.part_id AND v.state = 'released' ORDER BY v.sequence DESC LIMIT 1) AS currentRevision,
  o.state AS openState, o.desk AS openDesk, o.due_on AS openDueOn, ${waitingSince} AS waitingSince, c.name AS customerName,
  d.streams_covered AS streamsCovered`;

const sources = `supply_lines l LEFT JOIN submissions o ON o.id = l.open_submission_id
  LEFT JOIN organisations c ON c.id = l.customer_id LEFT JOIN dispositions d ON d.submission_id = l.decided_submission_id`;

/** A page of buying status in one statement, and the counts of the verdicts in a second. */
export function findBuyingStatus(
  reader: DataSource,
  customerId: string,
  query: Query,
  now: string,
): BuyingStatusResponse {
  const today = now.slice(0, 10);
  const { key, descending } = directionOf(query.sort);
  const column = columnOf[key as SortKey];
  const after = afterPosition(column, 'l.id', descending, decodeCursor(query.cursor, query.sort), true);
  const { where, values } = conditions(customerId, query, today);
  const way = descending ? 'DESC' : 'ASC';
  const rows = readStatement(
    reader,
    `SELECT ${columns} FROM ${sources} WHERE ${where}${after.sql} ORDER BY ${column} ${way}, l.id ${way} LIMIT ?`,
  ).all(today, ...values, ...after.values, query.limit + 1) as Row[];
  const page = cutPage(
    rows,
    query.limit,
    query.sort,
    (row) => ({ value: valueOf[key as SortKey](row), id: row.id }),
    (row) => itemOf(row, now),
  );
  return { ...page, asOf: now, counts: countVerdicts(reader, customerId, today) };
}

/** Every row of a filtered list, for the export; streamed by the database, so memory stays flat. */
export function* eachBuyingStatus(
  reader: DataSource,
  customerId: string,
  query: Query,
  now: string,
): Generator<BuyingStatusItem> {
  let cursor: string | undefined;
  do {
    const page: BuyingStatusResponse = findBuyingStatus(
      reader,
      customerId,
      { ...query, limit: 200, cursor },
      now,
    );
    yield* page.items;
    cursor = page.nextCursor ?? undefined;
  } while (cursor !== undefined);
}

export function findLine(
  reader: DataSource,
  customerId: string,
  id: string,
  now: string,
): BuyingStatusItem | null {
  const row = readStatement(
    reader,
    `SELECT ${columns} FROM ${sources} WHERE l.customer_id = ? AND l.id = ?`,
  ).get(now.slice(0, 10), customerId, id) as Row | undefined;
  return row ? itemOf(row, now) : null;
}

function conditions(customerId: string, query: Query, today: string): { where: string; values: unknown[] } {
  let where = 'l.customer_id = ?';
  const values: unknown[] = [customerId];
  if (query.supplierId) {
    where += ' AND l.supplier_id = ?';
    values.push(query.supplierId);
  }
  if (query.verdict) {
    where += ` AND ${buyingVerdictSql} = ?`;
    values.push(today, query.verdict);
  }
  if (query.q) {
    where += ` AND (l.part_number LIKE ? ESCAPE '\\' OR l.part_name LIKE ? ESCAPE '\\' OR l.supplier_name LIKE ? ESCAPE '\\')`;
    const like = containing(query.q);
    values.push(like, like, like);
  }
  return { where, values };
}

function countVerdicts(
  reader: DataSource,
  customerId: string,
  today: string,
): BuyingStatusResponse['counts'] {
  const rows = readStatement(
    reader,
    `SELECT ${buyingVerdictSql} AS verdict, count(*) AS count FROM supply_lines l WHERE l.customer_id = ? GROUP BY 1`,
  ).all(today, customerId) as { verdict: BuyingVerdict; count: number }[];
  const counts = { 'may-buy': 0, 'may-buy-within-limits': 0, hold: 0 };
  for (const { verdict, count } of rows) counts[verdict] = count;
  return counts;
}

function itemOf(row: Row, now: string): BuyingStatusItem {
  const limited = row.pieceLimit !== null;
  return {
    id: row.id,
    partNumber: row.partNumber,
    partName: row.partName,
    supplierName: row.supplierName,
    supplierId: row.supplierId,
    verdict: row.verdict,
    approvedRevision: row.approvedRevision,
    currentRevision: row.currentRevision,
    piecesLeft: limited ? Math.max(0, (row.pieceLimit ?? 0) - row.piecesUsed) : null,
    until: row.endOn,
    blocker: blockerOf(row, now.slice(0, 10)),
    holder:
      row.openDesk === 'supplier' ? row.supplierName : row.openDesk === 'customer' ? row.customerName : null,
    dueOn: row.openDueOn,
    waitingDays: row.waitingSince === null ? null : daysBetween(row.waitingSince, now),
    openPackageState: row.openState,
    // R50: limits never release the final payment for the tool.
    toolingRelease: row.verdict === 'may-buy',
    streamsCovered: row.streamsCovered === null ? [] : (JSON.parse(row.streamsCovered) as string[]),
  };
}

function daysBetween(from: string, to: string): number {
  return Math.max(0, Math.floor((Date.parse(to) - Date.parse(from)) / 86_400_000));
}
