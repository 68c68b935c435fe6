import type { EntityManager } from 'typeorm';
import { writeStatement } from '../database/raw.ts';
import { readEntry } from './reading-entry.ts';
import { RowWork, type WritingScope } from './row-work.ts';
import type { StoredRow } from './stored-row.ts';

export interface ReadingChange {
  readonly characteristicId: string;
  readonly pieceId: string;
  readonly text: string | null;
  /** What stood there when the person typed; `undefined` does not ask. */
  readonly was?: string | null | undefined;
}

export interface WrittenReadings {
  readonly rows: StoredRow[];
  readonly conflicts: {
    characteristicId: string;
    pieceId: string;
    now: string | null;
    wanted: string | null;
  }[];
  readonly refused: { characteristicId: string; pieceId: string; text: string; reason: string }[];
  /** Cells that changed, with what stood there before. */
  readonly changed: { balloon: string; piece: string; before: string | null; after: string | null }[];
}

/**
 * Writes readings of an open package and judges the rows they touch, in the caller's transaction.
 * A cell that no longer holds what the person saw is reported and left, unless `overwrite`; text that is no reading is
 * refused with its reason and left as it was. Rows whose bonus hangs on a changed size are judged anew as well.
 */
export function writeReadings(
  manager: EntityManager,
  scope: WritingScope,
  changes: readonly ReadingChange[],
  overwrite: boolean,
): WrittenReadings {
  const work = new RowWork(manager, scope);
  const result: WrittenReadings = { rows: [], conflicts: [], refused: [], changed: [] };
  const pieces = work.piecesFor(changes);
  for (const change of changes) {
    const facts = work.characteristics.byId.get(change.characteristicId);
    const piece = pieces.get(change.pieceId);
    if (!facts || !piece) {
      result.refused.push({
        ...change,
        text: change.text ?? '',
        reason: 'This characteristic or piece is not in the package.',
      });
      continue;
    }
    const row = work.row(facts, piece.streamId);
    const before = row.texts[piece.slot] ?? null;
    if (before === change.text) continue;
    if (!overwrite && change.was !== undefined && change.was !== before) {
      result.conflicts.push({
        characteristicId: facts.id,
        pieceId: change.pieceId,
        now: before,
        wanted: change.text,
      });
      continue;
    }
    if (change.text !== null) {
      const entry = readEntry(change.text, facts);
      if (entry.kind === 'refused') {
        result.refused.push({
          characteristicId: facts.id,
          pieceId: change.pieceId,
          text: change.text,
          reason: entry.reason,
        });
        continue;
      }
    }
    while (row.texts.length <= piece.slot) row.texts.push(null);
    row.texts[piece.slot] = change.text;
    row.changed = true;
    result.changed.push({ balloon: facts.balloon, piece: piece.label, before, after: change.text });
  }
  result.rows.push(...work.store());
  return result;
}

/** Judges the named rows anew, after an attribute result, a piece or a stream changed. */
export function rejudgeRows(
  manager: EntityManager,
  scope: WritingScope,
  rows: readonly { characteristicId: string; streamId: string }[],
  change: (row: StoredRow) => void = () => undefined,
): StoredRow[] {
  const work = new RowWork(manager, scope);
  for (const { characteristicId, streamId } of rows) {
    const facts = work.characteristics.byId.get(characteristicId);
    if (!facts) continue;
    const row = work.row(facts, streamId);
    change(row.stored);
    row.changed = true;
  }
  return work.store();
}

/** Takes a removed piece's readings out of its stream and judges the rows again. Returns how many readings went. */
export function clearSlot(
  manager: EntityManager,
  scope: WritingScope,
  streamId: string,
  slot: number,
): number {
  const work = new RowWork(manager, scope);
  let cleared = 0;
  for (const facts of work.characteristics.list) {
    const row = work.row(facts, streamId);
    if (row.stored.version === 0 || (row.texts[slot] ?? null) === null) continue;
    row.texts[slot] = null;
    row.changed = true;
    cleared += 1;
  }
  work.store();
  return cleared;
}

/** Counts the rows of a package afresh, after streams or pieces changed. */
export function recountRows(manager: EntityManager, submissionId: string): void {
  writeStatement(
    manager,
    `UPDATE submissions SET
       out_count = (SELECT count(*) FROM characteristic_results r JOIN submission_streams s ON s.id = r.stream_id
                    WHERE r.submission_id = submissions.id AND s.blocked = 0 AND r.verdict = 'out-of-tolerance'),
       undecided_count = (SELECT count(*) FROM characteristic_results r JOIN submission_streams s ON s.id = r.stream_id
                    WHERE r.submission_id = submissions.id AND s.blocked = 0 AND r.verdict = 'undecided'),
       measured_rows = (SELECT count(*) FROM characteristic_results r JOIN submission_streams s ON s.id = r.stream_id
                    WHERE r.submission_id = submissions.id AND s.blocked = 0 AND r.verdict NOT IN ('not-measured', 'no-verdict')),
       total_rows = (SELECT count(*) FROM characteristics c WHERE c.revision_id = submissions.revision_id
                       AND c.kind NOT IN ('basic', 'reference'))
                  * (SELECT count(*) FROM submission_streams s WHERE s.submission_id = submissions.id AND s.blocked = 0)
     WHERE id = ?`,
  ).run(submissionId);
}
