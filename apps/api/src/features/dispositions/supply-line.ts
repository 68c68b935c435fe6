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
        endOn: asked.endOn,
        pieceLimit: asked.pieceLimit,
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
