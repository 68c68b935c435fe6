import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { Submission } from '../../database/entities/submission.entity.ts';
import { writeStatement } from '../../database/raw.ts';

/** Columns of a table that change with the copy; all others are carried over as they are. */
type Changes = Record<string, string | number | null | ((row: Record<string, unknown>) => string | null)>;

/** Copies the rows of one round into another; answers old id → new id. */
function copyRows(
  manager: EntityManager,
  table:
    | 'submission_streams'
    | 'sample_pieces'
    | 'characteristic_results'
    | 'submission_elements'
    | 'element_files',
  fromId: string,
  changes: Changes,
): Map<string, string> {
  const rows = writeStatement(manager, `SELECT * FROM ${table} WHERE submission_id = ?`).all(
    fromId,
  ) as Record<string, unknown>[];
  const ids = new Map<string, string>();
  const [first] = rows;
  if (!first) return ids;
  const columns = Object.keys(first);
  const insert = writeStatement(
    manager,
    `INSERT INTO ${table} (${columns.join(', ')}) VALUES (${columns.map(() => '?').join(', ')})`,
  );
  for (const row of rows) {
    const id = randomUUID();
    ids.set(String(row.id), id);
    const copied: Record<string, unknown> = { ...row, id };
    for (const [column, change] of Object.entries(changes)) {
      copied[column] = typeof change === 'function' ? change(row) : change;
    }
    insert.run(columns.map((column) => copied[column]));
  }
  return ids;
}

/**
 * The next round of a package with the streams, pieces, readings, elements and warrant facts of the last. Signatures,
 * marks, deviations and the official check belong to the round they were made on and stay there.
 */
export async function copyRound(
  manager: EntityManager,
  old: Submission,
  facts: { now: string; dueOn: string },
): Promise<string> {
  const { now, dueOn } = facts;
  const submissionId = randomUUID();
  await manager.insert(Submission, {
    id: submissionId,
    requestId: old.requestId,
    round: old.round + 1,
    customerId: old.customerId,
    supplierId: old.supplierId,
    partId: old.partId,
    revisionId: old.revisionId,
    partNumber: old.partNumber,
    partName: old.partName,
    revisionCode: old.revisionCode,
    state: 'in-preparation',
    desk: 'supplier',
    isOpen: true,
    dueOn,
    createdAt: now,
    updatedAt: now,
    warrant: old.warrant,
    stops: 0,
    decides: 0,
    informs: 0,
    characteristicCount: old.characteristicCount,
    specialCount: old.specialCount,
    outCount: old.outCount,
    undecidedCount: old.undecidedCount,
    measuredRows: old.measuredRows,
    totalRows: old.totalRows,
  });
  const moved = { submission_id: submissionId, version: 1 };
  const placed = (ids: ReadonlyMap<string, string>, column: string) => (row: Record<string, unknown>) =>
    ids.get(String(row[column])) ?? null;

  const streams = copyRows(manager, 'submission_streams', old.id, moved);
  copyRows(manager, 'sample_pieces', old.id, { ...moved, stream_id: placed(streams, 'stream_id') });
  copyRows(manager, 'characteristic_results', old.id, { ...moved, stream_id: placed(streams, 'stream_id') });
  const elements = copyRows(manager, 'submission_elements', old.id, moved);
  copyRows(manager, 'element_files', old.id, {
    submission_id: submissionId,
    element_id: placed(elements, 'element_id'),
  });
  return submissionId;
}
