import type { FileResponse } from '@trammel/shared/documents';
import type { ElementResponse } from '@trammel/shared/submissions';
import type { EntityManager } from 'typeorm';
import type { Actor } from '../../http/actor.ts';
import { NotFound } from '../../http/problems.ts';
import { findSubmissionForActor, type FoundSubmission } from './submissions.queries.ts';
import { isDerivedElement, type Side } from './submissions.rules.ts';

interface Row extends Omit<ElementResponse, 'derived' | 'files' | 'mark' | 'markVersion'> {
  submissionId: string;
  mark: 'accepted' | 'refused' | 'questioned' | null;
  remark: string | null;
  internalRemark: string | null;
  markedBy: string | null;
  markedAt: string | null;
  markVersion: number | null;
  decidedAt: string | null;
}

const columns = `SELECT e.id, e.submission_id AS submissionId, e.code, e.label, e.demand, e.state, e.reason,
  e.stated_part AS statedPart, e.stated_revision AS statedRevision, e.dated, e.note, e.version,
  d.mark, d.remark, d.internal_remark AS internalRemark, d.decided_by_name AS markedBy, d.decided_at AS markedAt,
  d.version AS markVersion, s.decided_at AS decidedAt
  FROM submission_elements e JOIN submissions s ON s.id = e.submission_id
    LEFT JOIN element_decisions d ON d.element_id = e.id`;

/** Elements of a round with their files, in the order of the request. */
export async function findElements(
  manager: EntityManager,
  submissionId: string,
  side: Side,
): Promise<ElementResponse[]> {
  const rows: Row[] = await manager.query(`${columns} WHERE e.submission_id = ? ORDER BY e.sequence`, [
    submissionId,
  ]);
  const files: (FileResponse & { elementId: string })[] = await manager.query(
    `${fileColumns} WHERE ef.submission_id = ? ORDER BY ef.attached_at, ef.rowid`,
    [submissionId],
  );
  return rows.map((row) =>
    present(
      row,
      files.filter((file) => file.elementId === row.id),
      side,
    ),
  );
}

export async function findElement(
  manager: EntityManager,
  elementId: string,
  side: Side,
): Promise<ElementResponse> {
  const [row]: Row[] = await manager.query(`${columns} WHERE e.id = ?`, [elementId]);
  if (!row) throw new NotFound();
  const files: (FileResponse & { elementId: string })[] = await manager.query(
    `${fileColumns} WHERE ef.element_id = ? ORDER BY ef.attached_at, ef.rowid`,
    [elementId],
  );
  return present(row, files, side);
}

/** The round an element belongs to, as this person may see it. */
export async function findSubmissionOfElement(
  manager: EntityManager,
  actor: Actor,
  elementId: string,
): Promise<FoundSubmission> {
  const [row]: { submissionId: string }[] = await manager.query(
    'SELECT submission_id AS submissionId FROM submission_elements WHERE id = ?',
    [elementId],
  );
  if (!row) throw new NotFound();
  return findSubmissionForActor(manager, actor, row.submissionId);
}

const fileColumns = `SELECT f.id, f.name, f.media_type AS mediaType, f.size, f.sha256, f.uploaded_by_name AS uploadedBy,
  f.created_at AS uploadedAt, ef.element_id AS elementId
  FROM element_files ef JOIN stored_files f ON f.id = ef.file_id`;

/** The supplier reads marks and remarks once the disposition is signed; the customer's internal remarks never. */
function present(
  row: Row,
  files: readonly (FileResponse & { elementId: string })[],
  side: Side,
): ElementResponse {
  const shown = side === 'customer' || row.decidedAt !== null;
  return {
    id: row.id,
    code: row.code,
    label: row.label,
    demand: row.demand,
    state: row.state,
    derived: isDerivedElement(row.code),
    reason: row.reason,
    statedPart: row.statedPart,
    statedRevision: row.statedRevision,
    dated: row.dated,
    note: row.note,
    files: files.map(({ elementId: _elementId, ...file }) => file),
    mark:
      shown && row.mark !== null
        ? {
            mark: row.mark,
            remark: row.remark ?? '',
            ...(side === 'customer' && { internalRemark: row.internalRemark ?? '' }),
            by: row.markedBy ?? '',
            at: row.markedAt ?? '',
          }
        : null,
    markVersion: shown ? (row.markVersion ?? 0) : 0,
    version: row.version,
  };
}
