import type { RequestResponse } from '@trammel/shared/requests';
import type { EntityManager } from 'typeorm';
import { appendAudit } from '../../database/append-audit.ts';
import { ApprovalRequest } from '../../database/entities/request.entity.ts';
import { SupplyLine } from '../../database/entities/supply-line.entity.ts';
import { changeEvidence } from '../../evidence/refresh-findings.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, Forbidden } from '../../http/problems.ts';
import { assertVersion, updateVersioned } from '../../http/versions.ts';
import { enqueueMail } from '../../mail/outbox.ts';
import { requestAcknowledgedMail, requestWithdrawnMail } from '../../mail/templates/requests.ts';
import {
  mailFactsOfRequest,
  peopleOfCustomer,
  peopleWithRole,
} from '../notifications/notifications.queries.ts';
import { touchSubmission } from '../submissions/submissions.queries.ts';
import { presentRequest } from './requests.presenter.ts';
import { findRequestForActor, findRounds } from './requests.queries.ts';
import { mayWithdraw } from './requests.rules.ts';

/** The supplier takes the request on: from here the package can be filled. */
export function acknowledgeRequest(deed: Deed, requestId: string): Promise<RequestResponse> {
  return changeEvidence(deed, async (manager: EntityManager) => {
    const { actor, now } = deed;
    const { request, side } = await findRequestForActor(manager, actor, requestId);
    if (side !== 'supplier') throw new Forbidden('Only the supplier acknowledges a request.');
    const last = (await findRounds(manager, requestId)).at(-1);
    if (request.state !== 'issued' || last?.state !== 'requested') {
      throw new Conflict(
        request.state === 'withdrawn'
          ? 'The customer has withdrawn this request.'
          : 'This request has been acknowledged already.',
      );
    }
    const { version } = request;
    await updateVersioned(
      manager,
      ApprovalRequest,
      { id: requestId, version },
      { acknowledgedAt: now, acknowledgedById: actor.userId },
    );
    await touchSubmission(manager, last, now, { state: 'in-preparation' });
    appendAudit(manager, deed, {
      action: 'request.acknowledged',
      objectType: 'request',
      objectId: requestId,
      summary: 'Acknowledged the request',
    });
    const facts = await mailFactsOfRequest(manager, requestId, deed.publicUrl);
    for (const person of await peopleOfCustomer(manager, requestId)) {
      const content = requestAcknowledgedMail(person.name, facts, actor.name);
      enqueueMail(manager, now, { kind: 'request-acknowledged', recipient: person.email, ...content });
    }
    return { submissionId: last.id, answer: await presentRequest(manager, actor, requestId) };
  });
}

/** The customer calls the request off. What was entered stays readable; nothing more is owed. */
export function withdrawRequest(
  deed: Deed,
  requestId: string,
  version: number,
  reason: string,
): Promise<RequestResponse> {
  return deed.transact(async (manager) => {
    const { actor, now } = deed;
    const { request, side } = await findRequestForActor(manager, actor, requestId);
    if (side !== 'customer') throw new Forbidden('Only the customer withdraws a request.');
    const before = await presentRequest(manager, actor, requestId);
    assertVersion(request, version, () => before);
    const last = (await findRounds(manager, requestId)).at(-1) ?? null;
    if (!mayWithdraw(request.state, last)) {
      throw new Conflict(
        request.state === 'withdrawn'
          ? 'This request is withdrawn already.'
          : 'This package has been approved; what is approved is not withdrawn.',
      );
    }
    await updateVersioned(
      manager,
      ApprovalRequest,
      { id: requestId, version },
      { state: 'withdrawn', withdrawnAt: now, withdrawnReason: reason, questionOpen: false },
    );
    if (last) {
      await touchSubmission(manager, last, now, { state: 'withdrawn', desk: 'closed', isOpen: false });
      await manager.update(
        SupplyLine,
        { openSubmissionId: last.id },
        { openSubmissionId: null, updatedAt: now },
      );
    }
    appendAudit(manager, deed, {
      action: 'request.withdrawn',
      objectType: 'request',
      objectId: requestId,
      summary: `Withdrew the request: ${reason}`,
      before: { state: request.state, packageState: last?.state ?? null },
      after: { state: 'withdrawn' },
    });
    if (request.state === 'issued') {
      const facts = await mailFactsOfRequest(manager, requestId, deed.publicUrl);
      for (const person of await peopleWithRole(manager, request.supplierId, 'supplier-quality')) {
        const content = requestWithdrawnMail(person.name, facts, reason);
        enqueueMail(manager, now, { kind: 'request-withdrawn', recipient: person.email, ...content });
      }
    }
    return presentRequest(manager, actor, requestId);
  });
}
