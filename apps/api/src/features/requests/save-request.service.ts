import { randomUUID } from 'node:crypto';
import type { RequestResponse, saveRequestRequest } from '@trammel/shared/requests';
import type { EntityManager } from 'typeorm';
import type { z } from 'zod';
import { appendAudit } from '../../database/append-audit.ts';
import { OrganisationLink } from '../../database/entities/organisation-link.entity.ts';
import { PartRevision } from '../../database/entities/part-revision.entity.ts';
import { RequestReviewer } from '../../database/entities/request-reviewer.entity.ts';
import { ApprovalRequest } from '../../database/entities/request.entity.ts';
import { Site } from '../../database/entities/site.entity.ts';
import type { Actor } from '../../http/actor.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, Invalid, type FieldError } from '../../http/problems.ts';
import { updateVersioned } from '../../http/versions.ts';
import { peopleWithRole } from '../notifications/notifications.queries.ts';
import { presentRequest } from './requests.presenter.ts';
import { findRequestForActor, nextRequestNumber } from './requests.queries.ts';
import { faultsOfRequest } from './requests.rules.ts';

type Saved = z.infer<typeof saveRequestRequest>;

export function createRequest(deed: Deed, body: Saved): Promise<RequestResponse> {
  return deed.transact(async (manager) => {
    const { actor, now } = deed;
    const { partId } = await requireSound(manager, actor, body);
    const id = randomUUID();
    const { reviewerIds, ...facts } = body;
    await manager.insert(ApprovalRequest, {
      ...facts,
      id,
      number: await nextRequestNumber(manager, actor.organisationId, body.supplierId),
      customerId: actor.organisationId,
      partId,
      state: 'draft',
      createdAt: now,
      createdById: actor.userId,
    });
    await writeReviewers(manager, id, reviewerIds);
    appendAudit(manager, deed, {
      action: 'request.drafted',
      objectType: 'request',
      objectId: id,
      summary: 'Drafted a request',
      after: body,
    });
    return presentRequest(manager, actor, id);
  });
}

export function changeRequest(
  deed: Deed,
  requestId: string,
  version: number,
  body: Saved,
): Promise<RequestResponse> {
  return deed.transact(async (manager) => {
    const { actor } = deed;
    const { request, side } = await findRequestForActor(manager, actor, requestId);
    if (side !== 'customer' || request.state !== 'draft') {
      throw new Conflict('Only a draft can be changed; an issued request is agreed with the supplier.');
    }
    const { partId } = await requireSound(manager, actor, body);
    const { reviewerIds, ...facts } = body;
    const before = await presentRequest(manager, actor, requestId);
    // Numbers run within a pair of customer and supplier: another supplier means the next of its own series.
    const number =
      body.supplierId === request.supplierId
        ? request.number
        : await nextRequestNumber(manager, actor.organisationId, body.supplierId);
    await updateVersioned(
      manager,
      ApprovalRequest,
      { id: requestId, version },
      { ...facts, number, partId },
      () => before,
    );
    await manager.delete(RequestReviewer, { requestId });
    await writeReviewers(manager, requestId, reviewerIds);
    appendAudit(manager, deed, {
      action: 'request.changed',
      objectType: 'request',
      objectId: requestId,
      summary: 'Changed the draft of a request',
      after: body,
    });
    return presentRequest(manager, actor, requestId);
  });
}

async function writeReviewers(
  manager: EntityManager,
  requestId: string,
  userIds: readonly string[],
): Promise<void> {
  await manager.insert(
    RequestReviewer,
    userIds.map((userId) => ({ id: randomUUID(), requestId, userId })),
  );
}

/** Throws with every fault; what belongs to another organisation is answered like what does not exist. */
export async function requireSound(
  manager: EntityManager,
  actor: Actor,
  body: Saved,
): Promise<{ partId: string }> {
  const faults: FieldError[] = faultsOfRequest(body);
  const linked = await manager.existsBy(OrganisationLink, {
    customerId: actor.organisationId,
    supplierId: body.supplierId,
  });
  if (!linked) faults.push({ pointer: '/supplierId', detail: 'Choose one of your suppliers.' });
  const site = linked && (await manager.existsBy(Site, { id: body.siteId, organisationId: body.supplierId }));
  if (!site) faults.push({ pointer: '/siteId', detail: 'Choose a site of this supplier.' });
  const revision = await manager.findOneBy(PartRevision, {
    id: body.revisionId,
    organisationId: actor.organisationId,
  });
  if (!revision) faults.push({ pointer: '/revisionId', detail: 'Choose a revision of one of your parts.' });
  const reviewers = await peopleWithRole(manager, actor.organisationId, 'quality-reviewer');
  body.reviewerIds.forEach((id, index) => {
    if (!reviewers.some((person) => person.id === id)) {
      faults.push({
        pointer: `/reviewerIds/${index}`,
        detail: 'Choose a quality reviewer of your organisation.',
      });
    }
  });
  if (faults.length > 0 || !revision) throw new Invalid(faults);
  return { partId: revision.partId };
}
