import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { Organisation } from '../../database/entities/organisation.entity.ts';
import type { Submission } from '../../database/entities/submission.entity.ts';
import { SupplyLine } from '../../database/entities/supply-line.entity.ts';
import type { Asked } from './dispositions.rules.ts';

/**
 * Carries a signed decision over to what purchasing sees. A rejection or a package sent back leaves an earlier approval
 * of the same part in force: it speaks of the new package only.
 */
export async function recordDecision(
  manager: EntityManager,
  now: string,
  submission: Submission,
  asked: Asked,
): Promise<void> {
  const line = await manager.findOneBy(SupplyLine, {
    partId: submission.partId,
    supplierId: submission.supplierId,
  });
  const permits = asked.outcome === 'approved' || asked.outcome === 'interim-approval';
  const opened = asked.outcome === 'approved' ? null : submission.id;
  const decided = permits
    ? {
        decidedSubmissionId: submission.id,
        outcome: asked.outcome,
        approvedRevision: submission.revisionCode,
        ...tightest([asked, ...(await deviationsUsed(manager, submission.id))]),
        piecesUsed: 0,
        stoppedAt: null,
      }
    : {};
  if (line) {
    await manager.update(
      SupplyLine,
      { id: line.id },
      { ...decided, openSubmissionId: opened, updatedAt: now },
    );
    return;
  }
  const supplier = await manager.findOneByOrFail(Organisation, { id: submission.supplierId });
  await manager.insert(SupplyLine, {
    id: randomUUID(),
    customerId: submission.customerId,
    supplierId: submission.supplierId,
    partId: submission.partId,
    partNumber: submission.partNumber,
    partName: submission.partName,
    supplierName: supplier.name,
    openSubmissionId: opened,
    updatedAt: now,
    ...decided,
  });
}

interface BuyingLimits {
  readonly endOn: string | null;
  readonly pieceLimit: number | null;
}

/** A row accepted under a deviation carries the deviation's date and quantity over to what may be bought (R51). */
async function deviationsUsed(manager: EntityManager, submissionId: string): Promise<BuyingLimits[]> {
  return manager.query(
    `SELECT d.until_on AS endOn, d.quantity AS pieceLimit FROM characteristic_decisions c JOIN deviations d ON d.id = c.deviation_id
     WHERE c.submission_id = ? AND c.mark = 'accepted'`,
    [submissionId],
  );
}

function tightest(limits: readonly BuyingLimits[]): BuyingLimits {
  const dates = limits.map((limit) => limit.endOn).filter((date) => date !== null);
  const pieces = limits.map((limit) => limit.pieceLimit).filter((count) => count !== null);
  return { endOn: dates.sort()[0] ?? null, pieceLimit: pieces.length === 0 ? null : Math.min(...pieces) };
}
