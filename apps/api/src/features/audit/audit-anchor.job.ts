import type { AuditAnchors } from '../../database/audit-anchors.ts';
import { auditHead, verifyAuditTrail } from '../../database/verify-audit.ts';
import type { Core } from '../../http/core.ts';

const checkedAtStart = 10_000;

/** Each hour and when the process stops: the head of the chain goes into the file beside the database. */
export async function noteAuditHead({ db, clock }: Core, anchors: AuditAnchors): Promise<void> {
  await anchors.note(auditHead(db.reader), clock.now());
}

/** A broken trail is said loudly and serving goes on: stopping the work would help whoever broke it. */
export async function verifyAtStart({ db, log }: Core, anchors: AuditAnchors): Promise<void> {
  const head = auditHead(db.reader);
  const from = Math.max(1, (head?.sequence ?? 0) - checkedAtStart + 1);
  try {
    const noted = (await anchors.read()).filter((anchor) => anchor.sequence >= from);
    const verdict = await verifyAuditTrail(db.reader, noted, from);
    if (!verdict.sound)
      log.fatal({ row: verdict.firstBroken, reason: verdict.reason }, 'the audit trail is broken');
  } catch (error) {
    log.fatal({ err: error }, 'the audit trail could not be verified');
  }
}
