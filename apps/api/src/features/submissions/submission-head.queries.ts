import type { ApprovalRequest } from '../../database/entities/request.entity.ts';
import type { PackageState } from '@trammel/shared/status';
import type { SignatureResponse } from '@trammel/shared/submissions';
import type { EntityManager } from 'typeorm';
import { NotFound } from '../../http/problems.ts';

export interface HeadNames {
  readonly requestNumber: number;
  readonly reason: ApprovalRequest['reason'];
  readonly level: number;
  readonly decisionRule: string;
  readonly streamKind: ApprovalRequest['streamKind'];
  readonly piecesPerStream: number;
  readonly issuedAt: string | null;
  readonly acknowledgedAt: string | null;
  readonly issuedBy: string | null;
  readonly acknowledgedBy: string | null;
  readonly customerName: string;
  readonly supplierName: string;
  readonly siteName: string;
  readonly material: string;
  readonly unitSystem: 'metric' | 'inch';
  readonly safetyOrRegulatory: number;
  readonly revisionState: 'draft' | 'released' | 'superseded';
  readonly roundingRule: 'absolute' | 'astm-e29';
  readonly fileId: string | null;
  readonly fileName: string;
  readonly fileType: string;
  readonly fileSize: number;
  readonly fileSha256: string;
  readonly fileBy: string;
  readonly fileAt: string;
}

export async function findHeadNames(manager: EntityManager, submissionId: string): Promise<HeadNames> {
  const [row]: HeadNames[] = await manager.query(
    `SELECT r.number AS requestNumber, r.reason, r.level, r.decision_rule AS decisionRule, r.stream_kind AS streamKind,
       r.pieces_per_stream AS piecesPerStream, r.issued_at AS issuedAt, r.acknowledged_at AS acknowledgedAt,
       i.name AS issuedBy, a.name AS acknowledgedBy, c.name AS customerName, o.name AS supplierName,
       site.name AS siteName, p.material, p.unit_system AS unitSystem, p.safety_or_regulatory AS safetyOrRegulatory,
       v.state AS revisionState, v.rounding_rule AS roundingRule, f.id AS fileId, f.name AS fileName,
       f.media_type AS fileType, f.size AS fileSize, f.sha256 AS fileSha256, f.uploaded_by_name AS fileBy,
       f.created_at AS fileAt
     FROM submissions s JOIN requests r ON r.id = s.request_id JOIN organisations c ON c.id = s.customer_id
       JOIN organisations o ON o.id = s.supplier_id JOIN sites site ON site.id = r.site_id
       JOIN parts p ON p.id = s.part_id JOIN part_revisions v ON v.id = s.revision_id
       LEFT JOIN users i ON i.id = r.issued_by_id LEFT JOIN users a ON a.id = r.acknowledged_by_id
       LEFT JOIN stored_files f ON f.id = v.drawing_file_id AND f.state = 'stored'
     WHERE s.id = ?`,
    [submissionId],
  );
  if (!row) throw new NotFound();
  return row;
}

export interface RoundRow {
  readonly id: string;
  readonly round: number;
  readonly state: PackageState;
  readonly createdAt: string;
  readonly submittedAt: string | null;
  readonly reviewStartedAt: string | null;
  readonly decidedAt: string | null;
  readonly stops: number;
  readonly measuredRows: number;
  readonly totalRows: number;
  readonly signedBy: string | null;
  readonly signedAt: string | null;
  readonly decidedBy: string | null;
  readonly checkedAt: string | null;
  readonly openElements: number;
}

/** Every round of a request's package, for the route card. */
export function findCardRounds(manager: EntityManager, requestId: string): Promise<RoundRow[]> {
  return manager.query(
    `SELECT s.id, s.round, s.state, s.created_at AS createdAt, s.submitted_at AS submittedAt,
       s.review_started_at AS reviewStartedAt, s.decided_at AS decidedAt, s.stops, s.measured_rows AS measuredRows,
       s.total_rows AS totalRows, w.name AS signedBy, w.signed_at AS signedAt, d.name AS decidedBy,
       k.checked_at AS checkedAt,
       (SELECT count(*) FROM submission_elements e WHERE e.submission_id = s.id AND e.demand <> 'not-required'
          AND e.state = 'open') AS openElements
     FROM submissions s
       LEFT JOIN signatures w ON w.submission_id = s.id AND w.stage = 'warrant'
       LEFT JOIN signatures d ON d.submission_id = s.id AND d.stage = 'disposition'
       LEFT JOIN checks k ON k.id = s.official_check_id
     WHERE s.request_id = ? ORDER BY s.round`,
    [requestId],
  );
}

export async function findSignatures(
  manager: EntityManager,
  submissionId: string,
): Promise<{ warrant: SignatureResponse | null; disposition: SignatureResponse | null }> {
  const rows: (SignatureResponse & { stage: 'warrant' | 'disposition' })[] = await manager.query(
    `SELECT stage, name, role, organisation_name AS organisation, meaning, signed_at AS signedAt, digest,
       key_id AS keyId FROM signatures WHERE submission_id = ?`,
    [submissionId],
  );
  const of = (stage: 'warrant' | 'disposition') => rows.find((row) => row.stage === stage) ?? null;
  return { warrant: of('warrant'), disposition: of('disposition') };
}

export async function countMarkedRows(manager: EntityManager, submissionId: string): Promise<number> {
  const [row]: { marked: number }[] = await manager.query(
    'SELECT count(*) AS marked FROM characteristic_decisions WHERE submission_id = ? AND mark IS NOT NULL',
    [submissionId],
  );
  return row?.marked ?? 0;
}
