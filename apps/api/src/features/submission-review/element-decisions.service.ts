import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { decideElementRequest, ElementDecisionResponse } from '@trammel/shared/submission-review';
import { appendAudit } from '../../database/append-audit.ts';
import { ElementDecision } from '../../database/entities/element-decision.entity.ts';
import { SubmissionElement } from '../../database/entities/submission-element.entity.ts';
import type { Deed } from '../../http/deed.ts';
import { Invalid, NotFound, Stale } from '../../http/problems.ts';
import { beginReview, openReview } from './open-review.ts';

export function decideElement(
  deed: Deed,
  key: { submissionId: string; elementId: string },
  version: number,
  command: z.output<typeof decideElementRequest>,
): Promise<ElementDecisionResponse> {
  return deed.transact(async (manager) => {
    const submission = await openReview(manager, deed, key.submissionId);
    const element = await manager.findOneBy(SubmissionElement, {
      id: key.elementId,
      submissionId: submission.id,
    });
    if (!element) throw new NotFound();
    const before = await manager.findOneBy(ElementDecision, { elementId: element.id });
    if ((before?.version ?? 0) !== version) {
      throw new Stale(
        before && presentElementDecision(before),
        'A colleague marked this element since you opened it.',
      );
    }
    if (command.mark !== 'accepted' && command.mark !== null && command.remark === '') {
      throw new Invalid([
        { pointer: '/remark', detail: 'Say to the supplier what is wrong or what is asked.' },
      ]);
    }
    const values = {
      ...command,
      decidedById: deed.actor.userId,
      decidedByName: deed.actor.name,
      decidedAt: deed.now,
    };
    if (before) await manager.update(ElementDecision, { id: before.id, version }, values);
    else
      await manager.insert(ElementDecision, {
        id: randomUUID(),
        submissionId: submission.id,
        elementId: element.id,
        ...values,
      });
    await beginReview(manager, deed, submission);
    appendAudit(manager, deed, {
      action: 'element.marked',
      objectType: 'submission',
      objectId: submission.id,
      summary: `${element.label} of ${submission.partNumber}: ${command.mark ?? 'mark taken back'}`,
      before: before && { mark: before.mark, remark: before.remark, internalRemark: before.internalRemark },
      after: command,
    });
    return presentElementDecision(await manager.findOneByOrFail(ElementDecision, { elementId: element.id }));
  });
}

function presentElementDecision(decision: ElementDecision): ElementDecisionResponse {
  return {
    elementId: decision.elementId,
    mark: decision.mark,
    remark: decision.remark,
    internalRemark: decision.internalRemark,
    by: decision.decidedByName,
    at: decision.decidedAt,
    markVersion: decision.version,
  };
}
