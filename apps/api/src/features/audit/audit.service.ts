import { AnchorsBroken, type AuditAnchors } from '../../database/audit-anchors.ts';
import { appendAudit } from '../../database/append-audit.ts';
import { verifyAuditTrail, type AuditVerification } from '../../database/verify-audit.ts';
import type { Deed } from '../../http/deed.ts';

/** Reading the trail is itself recorded: once for a first page, not for each that follows. */
export function recordReading(deed: Deed, filter: object): Promise<string> {
  return deed.transact((manager) =>
    Promise.resolve(
      appendAudit(manager, deed, {
        action: 'audit.read',
        objectType: 'organisation',
        objectId: deed.actor.organisationId,
        summary: `${deed.actor.name} read the audit trail`,
        after: filter,
      }),
    ),
  );
}

export async function verifyForPeople(deed: Deed, anchors: AuditAnchors): Promise<AuditVerification> {
  try {
    return await verifyAuditTrail(deed.reader, await anchors.read());
  } catch (error) {
    if (!(error instanceof AnchorsBroken)) throw error;
    return { rows: 0, sound: false, firstBroken: null, reason: error.message };
  }
}
