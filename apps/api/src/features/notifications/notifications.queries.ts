import type { EntityManager } from 'typeorm';
import type { Role } from '@trammel/shared/roles';
import type { RequestFacts } from '../../mail/templates/requests.ts';

export interface Addressee {
  readonly id: string;
  readonly name: string;
  readonly email: string;
}

/** People of an organisation who hold a role and have not been disabled. */
export function peopleWithRole(
  manager: EntityManager,
  organisationId: string,
  role: Role,
): Promise<Addressee[]> {
  return manager.query(
    `SELECT id, name, email FROM users
     WHERE organisation_id = ? AND disabled_at IS NULL
       AND EXISTS (SELECT 1 FROM json_each(users.roles) WHERE value = ?)
     ORDER BY name, id`,
    [organisationId, role],
  );
}

/** The customer's people on a request: its reviewers and whoever issued it. */
export function peopleOfCustomer(manager: EntityManager, requestId: string): Promise<Addressee[]> {
  return manager.query(
    `SELECT u.id, u.name, u.email FROM users u
     WHERE u.disabled_at IS NULL AND u.id IN (
       SELECT user_id FROM request_reviewers WHERE request_id = ?
       UNION SELECT issued_by_id FROM requests WHERE id = ?)
     ORDER BY u.name, u.id`,
    [requestId, requestId],
  );
}

interface FactsRow {
  id: string;
  number: number;
  partNumber: string;
  partName: string;
  revision: string;
  customerName: string;
  supplierName: string;
  siteName: string;
  dueOn: string;
}

/** What a mail about this request may say; the link leads to the request, or where `path` says. */
export async function mailFactsOfRequest(
  manager: EntityManager,
  requestId: string,
  publicUrl: string,
  path = `/requests/${requestId}`,
): Promise<RequestFacts> {
  const [row]: FactsRow[] = await manager.query(
    `SELECT r.id, r.number, p.number AS partNumber, p.name AS partName, v.code AS revision, c.name AS customerName,
       s.name AS supplierName, site.name AS siteName, r.due_on AS dueOn
     FROM requests r JOIN parts p ON p.id = r.part_id JOIN part_revisions v ON v.id = r.revision_id
       JOIN organisations c ON c.id = r.customer_id JOIN organisations s ON s.id = r.supplier_id
       JOIN sites site ON site.id = r.site_id
     WHERE r.id = ?`,
    [requestId],
  );
  if (!row) throw new Error(`Request ${requestId} is not there.`);
  const { number, id: _id, ...facts } = row;
  return { requestNumber: number, ...facts, url: `${publicUrl}${path}` };
}
