import { randomUUID } from 'node:crypto';
import type { RequestResponse } from '@trammel/shared/requests';
import type { EntityManager } from 'typeorm';
import { appendAudit } from '../../database/append-audit.ts';
import { Organisation } from '../../database/entities/organisation.entity.ts';
import { PartRevision } from '../../database/entities/part-revision.entity.ts';
import { Part } from '../../database/entities/part.entity.ts';
import { ApprovalRequest } from '../../database/entities/request.entity.ts';
import { SupplyLine } from '../../database/entities/supply-line.entity.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, Forbidden } from '../../http/problems.ts';
import { assertVersion, updateVersioned } from '../../http/versions.ts';
import { enqueueMail } from '../../mail/outbox.ts';
import { requestIssuedMail } from '../../mail/templates/requests.ts';
import { mailFactsOfRequest, peopleWithRole } from '../notifications/notifications.queries.ts';
import { createFirstRound } from './first-round.ts';
import { presentRequest } from './requests.presenter.ts';
import { findNumberInWork, findRequestForActor, findReviewersOfRequest } from './requests.queries.ts';
import { issueBlockers } from './requests.rules.ts';
import { requireSound } from './save-request.service.ts';
import { reasonWords } from './reason-words.ts';

/** Sends a draft to the supplier: opens the package's first round and its line in buying status. */
export function issueRequest(deed: Deed, requestId: string, version: number): Promise<RequestResponse> {
  return deed.transact(async (manager) => {
    const { actor, now } = deed;
    const { request, side } = await findRequestForActor(manager, actor, requestId);
    if (side !== 'customer') throw new Forbidden('Only the customer issues a request.');
    if (request.state !== 'draft') {
      throw new Conflict(
        request.state === 'issued' ? 'This request has been issued already.' : 'This request is withdrawn.',
      );
    }
    const before = await presentRequest(manager, actor, requestId);
    assertVersion(request, version, () => before);
    const reviewers = await findReviewersOfRequest(manager, requestId);
    await requireSound(manager, actor, { ...request, reviewerIds: reviewers.map(({ id }) => id) });

    const revision = await manager.findOneByOrFail(PartRevision, { id: request.revisionId });
    const part = await manager.findOneByOrFail(Part, { id: request.partId });
    const blockers = issueBlockers({
      revisionCode: revision.code,
      revisionState: revision.state,
      dueOn: request.dueOn,
      today: now.slice(0, 10),
      inWorkNumber: await findNumberInWork(manager, request),
    });
    if (blockers.length > 0) throw new Conflict(blockers.join(' '));

    await updateVersioned(
      manager,
      ApprovalRequest,
      { id: requestId, version },
      { state: 'issued', issuedAt: now, issuedById: actor.userId },
    );
    const submissionId = await createFirstRound(manager, { request, part, revision, now });
    await openSupplyLine(manager, request, part, submissionId, now);
    appendAudit(manager, deed, {
      action: 'request.issued',
      objectType: 'request',
      objectId: requestId,
      summary: `Issued the request for ${part.number} rev ${revision.code}`,
      after: { submissionId, dueOn: request.dueOn, level: request.level },
    });
    await tellSupplier(manager, deed, request);
    return presentRequest(manager, actor, requestId);
  });
}

async function openSupplyLine(
  manager: EntityManager,
  request: ApprovalRequest,
  part: Part,
  submissionId: string,
  now: string,
): Promise<void> {
  const { customerId, supplierId } = request;
  const line = await manager.findOneBy(SupplyLine, { partId: part.id, supplierId });
  if (line) {
    await manager.update(SupplyLine, { id: line.id }, { openSubmissionId: submissionId, updatedAt: now });
    return;
  }
  const supplier = await manager.findOneByOrFail(Organisation, { id: supplierId });
  await manager.insert(SupplyLine, {
    id: randomUUID(),
    customerId,
    supplierId,
    partId: part.id,
    partNumber: part.number,
    partName: part.name,
    supplierName: supplier.name,
    openSubmissionId: submissionId,
    updatedAt: now,
  });
}

async function tellSupplier(manager: EntityManager, deed: Deed, request: ApprovalRequest): Promise<void> {
  const facts = await mailFactsOfRequest(manager, request.id, deed.publicUrl);
  const asked = {
    level: request.level,
    reason: reasonWords[request.reason],
    streams: request.streams.length,
    piecesPerStream: request.piecesPerStream,
  };
  for (const person of await peopleWithRole(manager, request.supplierId, 'supplier-quality')) {
    const content = requestIssuedMail(person.name, facts, asked);
    enqueueMail(manager, deed.now, { kind: 'request-issued', recipient: person.email, ...content });
  }
}
