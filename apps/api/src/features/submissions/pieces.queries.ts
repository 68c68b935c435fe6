import type { PieceResponse, StreamResponse } from '@trammel/shared/measurements';
import type { EntityManager } from 'typeorm';
import type { Actor } from '../../http/actor.ts';
import { NotFound } from '../../http/problems.ts';
import { findSubmissionForActor, type FoundSubmission } from './submissions.queries.ts';

export async function findStreams(manager: EntityManager, submissionId: string): Promise<StreamResponse[]> {
  const rows: (Omit<StreamResponse, 'blocked'> & { blocked: number })[] = await manager.query(
    `SELECT id, name, sequence, blocked, blocked_reason AS blockedReason, version FROM submission_streams
     WHERE submission_id = ? ORDER BY sequence`,
    [submissionId],
  );
  return rows.map((row) => ({ ...row, blocked: row.blocked === 1 }));
}

const columns = `SELECT p.id, p.stream_id AS streamId, p.label, p.slot AS sequence, p.made_on AS madeOn, p.lot, p.version
  FROM sample_pieces p`;

export function findPieces(manager: EntityManager, submissionId: string): Promise<PieceResponse[]> {
  return manager.query(
    `${columns} JOIN submission_streams s ON s.id = p.stream_id WHERE p.submission_id = ? ORDER BY s.sequence, p.slot`,
    [submissionId],
  );
}

export async function findPiece(manager: EntityManager, pieceId: string): Promise<PieceResponse> {
  const [row]: PieceResponse[] = await manager.query(`${columns} WHERE p.id = ?`, [pieceId]);
  if (!row) throw new NotFound();
  return row;
}

/** Labels and places given in a round. */
export function piecesUsed(
  manager: EntityManager,
  submissionId: string,
): Promise<{ id: string; streamId: string; label: string; slot: number }[]> {
  return manager.query(
    'SELECT id, stream_id AS streamId, label, slot FROM sample_pieces WHERE submission_id = ?',
    [submissionId],
  );
}

/** The round a piece belongs to, as this person may see it. */
export async function findSubmissionOfPiece(
  manager: EntityManager,
  actor: Actor,
  pieceId: string,
): Promise<FoundSubmission> {
  const [row]: { submissionId: string }[] = await manager.query(
    'SELECT submission_id AS submissionId FROM sample_pieces WHERE id = ?',
    [pieceId],
  );
  if (!row) throw new NotFound();
  return findSubmissionForActor(manager, actor, row.submissionId);
}
