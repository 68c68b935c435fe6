import type { EntityManager } from 'typeorm';
import type { PackageState } from '@trammel/shared/status';
import { ApprovalRequest } from '../../database/entities/request.entity.ts';
import type { Actor } from '../../http/actor.ts';
import { NotFound } from '../../http/problems.ts';
import { sideOf, type Side } from '../submissions/submissions.queries.ts';

export interface RoundSummary {
  readonly id: string;
  readonly round: number;
  readonly state: PackageState;
  readonly isOpen: boolean;
}

export interface FoundRequest {
  readonly request: ApprovalRequest;
  readonly side: Side;
}

/** A request as this person may see it. A supplier learns of it when it is issued, not before. */
export async function findRequestForActor(
  manager: EntityManager,
  actor: Actor,
  id: string,
): Promise<FoundRequest> {
  const request = await manager.findOneBy(ApprovalRequest, { id });
  const side = request ? sideOf(actor, request) : null;
  if (!request || !side || (side === 'supplier' && request.issuedAt === null)) throw new NotFound();
  return { request, side };
}

/** Rounds of a request's package, oldest first. */
export async function findRounds(manager: EntityManager, requestId: string): Promise<RoundSummary[]> {
  const rows: (Omit<RoundSummary, 'isOpen'> & { isOpen: number })[] = await manager.query(
    'SELECT id, round, state, is_open AS isOpen FROM submissions WHERE request_id = ? ORDER BY round',
    [requestId],
  );
  return rows.map((row) => ({ ...row, isOpen: row.isOpen === 1 }));
}

export interface RequestNames {
  readonly customerName: string;
  readonly supplierName: string;
  readonly siteName: string;
  readonly partNumber: string;
  readonly partName: string;
  readonly safetyOrRegulatory: number;
  readonly revisionCode: string;
  readonly revisionState: 'draft' | 'released' | 'superseded';
  readonly acknowledgedBy: string | null;
}

export async function findNamesOfRequest(manager: EntityManager, requestId: string): Promise<RequestNames> {
  const [row]: RequestNames[] = await manager.query(
    `SELECT c.name AS customerName, s.name AS supplierName, site.name AS siteName, p.number AS partNumber,
       p.name AS partName, p.safety_or_regulatory AS safetyOrRegulatory, v.code AS revisionCode,
       v.state AS revisionState, u.name AS acknowledgedBy
     FROM requests r JOIN parts p ON p.id = r.part_id JOIN part_revisions v ON v.id = r.revision_id
       JOIN organisations c ON c.id = r.customer_id JOIN organisations s ON s.id = r.supplier_id
       JOIN sites site ON site.id = r.site_id LEFT JOIN users u ON u.id = r.acknowledged_by_id
     WHERE r.id = ?`,
    [requestId],
  );
  if (!row) throw new NotFound();
  return row;
}

export function findReviewersOfRequest(
  manager: EntityManager,
  requestId: string,
): Promise<{ id: string; name: string }[]> {
  return manager.query(
    `SELECT u.id, u.name FROM request_reviewers rr JOIN users u ON u.id = rr.user_id
     WHERE rr.request_id = ? ORDER BY u.name, u.id`,
    [requestId],
  );
}

/** Number of the request whose package is being worked on for the same revision, supplier and site, if any. */
export async function findNumberInWork(
  manager: EntityManager,
  like: Pick<ApprovalRequest, 'id' | 'customerId' | 'supplierId' | 'siteId' | 'revisionId'>,
): Promise<number | null> {
  const [row]: { number: number }[] = await manager.query(
    `SELECT r.number FROM submissions s JOIN requests r ON r.id = s.request_id
     WHERE s.revision_id = ? AND s.supplier_id = ? AND s.is_open = 1 AND r.site_id = ? AND r.id <> ?
       AND s.state IN ('requested', 'in-preparation', 'submitted', 'in-review')
     LIMIT 1`,
    [like.revisionId, like.supplierId, like.siteId, like.id],
  );
  return row?.number ?? null;
}

/** The next number in the series of this customer with this supplier. */
export async function nextRequestNumber(
  manager: EntityManager,
  customerId: string,
  supplierId: string,
): Promise<number> {
  const [row]: { last: number | null }[] = await manager.query(
    'SELECT MAX(number) AS last FROM requests WHERE customer_id = ? AND supplier_id = ?',
    [customerId, supplierId],
  );
  return (row?.last ?? 0) + 1;
}
