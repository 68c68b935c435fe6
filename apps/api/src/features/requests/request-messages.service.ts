import { randomUUID } from 'node:crypto';
import type { RequestMessageItem, RequestThreadResponse } from '@trammel/shared/requests';
import type { EntityManager } from 'typeorm';
import { appendAudit } from '../../database/append-audit.ts';
import { RequestMessage } from '../../database/entities/request-message.entity.ts';
import { ApprovalRequest } from '../../database/entities/request.entity.ts';
import type { Actor } from '../../http/actor.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict } from '../../http/problems.ts';
import { enqueueMail } from '../../mail/outbox.ts';
import { requestMessageMail } from '../../mail/templates/requests.ts';
import {
  mailFactsOfRequest,
  peopleOfCustomer,
  peopleWithRole,
} from '../notifications/notifications.queries.ts';
import { findRequestForActor } from './requests.queries.ts';
import { afterMessage } from './requests.rules.ts';

type Kind = 'question' | 'answer' | 'note';

/** What both sides wrote on a request, oldest first. */
export async function readThread(
  manager: EntityManager,
  actor: Actor,
  requestId: string,
): Promise<RequestThreadResponse> {
  await findRequestForActor(manager, actor, requestId);
  const rows: (Omit<RequestMessageItem, 'own'> & { organisationId: string })[] = await manager.query(
    `SELECT m.id, m.kind, m.text, m.author_name AS author, o.name AS organisation,
       m.organisation_id AS organisationId, m.written_at AS writtenAt
     FROM request_messages m JOIN organisations o ON o.id = m.organisation_id
     WHERE m.request_id = ? ORDER BY m.written_at, m.rowid LIMIT ${longestThread}`,
    [requestId],
  );
  return {
    items: rows.map(({ organisationId, ...message }) => ({
      ...message,
      own: organisationId === actor.organisationId,
    })),
  };
}

/** A thread is read whole, so it must end somewhere. */
const longestThread = 500;

export function writeMessage(
  deed: Deed,
  requestId: string,
  message: { kind: Kind; text: string },
): Promise<RequestThreadResponse> {
  return deed.transact(async (manager) => {
    const { actor, now } = deed;
    const { request, side } = await findRequestForActor(manager, actor, requestId);
    if (request.state !== 'issued') {
      throw new Conflict(
        request.state === 'draft'
          ? 'The supplier does not see a draft; issue the request first.'
          : 'This request is withdrawn; its thread is closed.',
      );
    }
    const asked = await lastQuestion(manager, requestId);
    const askedBy = asked === null ? null : asked === request.customerId ? 'customer' : 'supplier';
    const outcome = afterMessage({ side, kind: message.kind, questionOpen: request.questionOpen, askedBy });
    if ('refused' in outcome) throw new Conflict(outcome.refused);
    const written = await manager.countBy(RequestMessage, { requestId });
    if (written >= longestThread) throw new Conflict(`A thread holds at most ${longestThread} messages.`);

    const id = randomUUID();
    await manager.insert(RequestMessage, {
      id,
      requestId,
      authorId: actor.userId,
      authorName: actor.name,
      organisationId: actor.organisationId,
      ...message,
      writtenAt: now,
    });
    if (outcome.questionOpen !== request.questionOpen) {
      await manager.update(ApprovalRequest, { id: requestId }, { questionOpen: outcome.questionOpen });
    }
    appendAudit(manager, deed, {
      action: `request.${message.kind}`,
      objectType: 'request',
      objectId: requestId,
      summary: { question: 'Asked a question', answer: 'Answered the question', note: 'Wrote a note' }[
        message.kind
      ],
      after: { messageId: id, text: message.text },
    });
    const others =
      side === 'supplier'
        ? await peopleOfCustomer(manager, requestId)
        : await peopleWithRole(manager, request.supplierId, 'supplier-quality');
    const facts = await mailFactsOfRequest(manager, requestId, deed.publicUrl);
    for (const person of others) {
      const content = requestMessageMail(person.name, facts, {
        ...message,
        author: actor.name,
        organisation: actor.organisationName,
      });
      enqueueMail(manager, now, { kind: `request-${message.kind}`, recipient: person.email, ...content });
    }
    return readThread(manager, actor, requestId);
  });
}

/** Organisation that asked the last question, if any. */
async function lastQuestion(manager: EntityManager, requestId: string): Promise<string | null> {
  const [row]: { organisationId: string }[] = await manager.query(
    `SELECT organisation_id AS organisationId FROM request_messages
     WHERE request_id = ? AND kind = 'question' ORDER BY written_at DESC, rowid DESC LIMIT 1`,
    [requestId],
  );
  return row?.organisationId ?? null;
}
