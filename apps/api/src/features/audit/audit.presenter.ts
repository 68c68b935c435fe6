import type { AuditEvent } from '@trammel/shared/audit';
import type { AuditEventRow } from './audit.queries.ts';

export function presentAuditEvent(row: AuditEventRow): AuditEvent {
  return {
    number: row.organisationSequence,
    at: row.at,
    actor: row.actorName,
    organisation: row.organisationName,
    action: row.action,
    objectType: row.objectType,
    objectId: row.objectId,
    summary: row.summary,
    before: row.before === null ? null : JSON.parse(row.before),
    after: row.after === null ? null : JSON.parse(row.after),
    hash: row.hash,
  };
}
