import type { DataSource } from 'typeorm';
import { readStatement } from '../../database/raw.ts';
import type { RoundOnTheClock } from './reminders.rules.ts';

export interface OpenRound extends RoundOnTheClock {
  readonly id: string;
  readonly requestId: string;
  readonly customerId: string;
  readonly customerName: string;
  readonly supplierId: string;
  readonly missingRows: number;
  readonly openElements: number;
}

/** Rounds in the supplier's hands whose date is near or past, or that wait to be acknowledged. */
export function findRoundsOnTheClock(reader: DataSource, until: string, startedBefore: string): OpenRound[] {
  return readStatement(
    reader,
    `SELECT s.id, s.request_id AS requestId, s.customer_id AS customerId, c.name AS customerName,
       s.supplier_id AS supplierId, s.state, s.due_on AS dueOn, s.created_at AS startedAt,
       s.total_rows - s.measured_rows AS missingRows,
       (SELECT count(*) FROM submission_elements e WHERE e.submission_id = s.id AND e.demand <> 'not-required'
          AND e.state = 'open') AS openElements
     FROM submissions s JOIN organisations c ON c.id = s.customer_id
     WHERE s.is_open = 1 AND s.desk = 'supplier' AND s.state IN ('requested', 'in-preparation')
       AND (s.due_on <= ? OR (s.state = 'requested' AND s.created_at <= ?))`,
  ).all(until, startedBefore) as OpenRound[];
}

/** Which reminders of these rounds went out already, as `objectId mark`. */
export function findSentMarks(reader: DataSource, kind: string): Set<string> {
  const rows = readStatement(
    reader,
    `SELECT m.object_id AS objectId, m.mark FROM reminders m
     JOIN submissions s ON s.id = m.object_id AND s.is_open = 1 AND s.desk = 'supplier' WHERE m.kind = ?`,
  ).all(kind) as { objectId: string; mark: string }[];
  return new Set(rows.map(({ objectId, mark }) => `${objectId} ${mark}`));
}
