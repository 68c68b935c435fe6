import type { EntityManager } from 'typeorm';
import type { Submission } from '../../database/entities/submission.entity.ts';
import type { Deed } from '../../http/deed.ts';
import { enqueueMail } from '../../mail/outbox.ts';
import { buyingChangedMail, packageDecidedMail } from '../../mail/templates/packages.ts';
import {
  mailFactsOfRequest,
  peopleOfCustomer,
  peopleWithRole,
} from '../notifications/notifications.queries.ts';
import type { Asked } from './dispositions.rules.ts';

/** Supplier and reviewers learn the outcome; purchasing learns the status. One person a mail. */
export async function mailDecision(
  manager: EntityManager,
  deed: Deed,
  submission: Submission,
  asked: Asked,
): Promise<void> {
  const decision = {
    outcome: asked.outcome,
    endOn: asked.endOn,
    pieceLimit: asked.pieceLimit,
    decidedBy: deed.actor.name,
  };
  const facts = await mailFactsOfRequest(
    manager,
    submission.requestId,
    deed.publicUrl,
    `/submissions/${submission.id}`,
  );
  const readers = [
    ...(await peopleWithRole(manager, submission.supplierId, 'supplier-quality')),
    ...(await peopleOfCustomer(manager, submission.requestId)),
  ];
  for (const person of readers) {
    enqueueMail(manager, deed.now, {
      kind: `package-${asked.outcome}`,
      recipient: person.email,
      ...packageDecidedMail(person.name, facts, decision),
    });
  }
  const buying = { ...facts, url: `${deed.publicUrl}/buying-status` };
  for (const person of await peopleWithRole(manager, submission.customerId, 'purchasing')) {
    enqueueMail(manager, deed.now, {
      kind: 'buying-status-changed',
      recipient: person.email,
      ...buyingChangedMail(person.name, buying, decision),
    });
  }
}
