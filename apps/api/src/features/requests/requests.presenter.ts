import type { RequestResponse } from '@trammel/shared/requests';
import type { EntityManager } from 'typeorm';
import type { Actor } from '../../http/actor.ts';
import {
  findNamesOfRequest,
  findRequestForActor,
  findReviewersOfRequest,
  findRounds,
} from './requests.queries.ts';
import { requestAbilities } from './requests.rules.ts';

/** A request with what this person may do with it, read through the given manager. */
export async function presentRequest(
  manager: EntityManager,
  actor: Actor,
  requestId: string,
): Promise<RequestResponse> {
  const { request, side } = await findRequestForActor(manager, actor, requestId);
  const names = await findNamesOfRequest(manager, requestId);
  const reviewers = await findReviewersOfRequest(manager, requestId);
  const rounds = await findRounds(manager, requestId);
  return {
    id: request.id,
    number: request.number,
    state: request.state,
    side,
    customer: { id: request.customerId, name: names.customerName },
    supplier: { id: request.supplierId, name: names.supplierName },
    site: { id: request.siteId, name: names.siteName },
    part: {
      id: request.partId,
      number: names.partNumber,
      name: names.partName,
      safetyOrRegulatory: names.safetyOrRegulatory === 1,
    },
    revision: {
      id: request.revisionId,
      code: names.revisionCode,
      superseded: names.revisionState === 'superseded',
    },
    reason: request.reason,
    reasonNote: request.reasonNote,
    level: request.level,
    elements: request.elements,
    streamKind: request.streamKind,
    streams: request.streams,
    piecesPerStream: request.piecesPerStream,
    decisionRule: request.decisionRule,
    dueOn: request.dueOn,
    purchaseOrder: request.purchaseOrder,
    message: request.message,
    reviewers,
    issuedAt: request.issuedAt,
    acknowledgedAt: request.acknowledgedAt,
    acknowledgedBy: names.acknowledgedBy,
    questionOpen: request.questionOpen,
    withdrawnReason: request.withdrawnReason,
    rounds: rounds.map(({ id, round, state }) => ({ id, round, state })),
    abilities: requestAbilities(side, request.state, rounds.at(-1) ?? null),
    version: request.version,
  };
}
