import type { EntityManager } from 'typeorm';
import type { Deviation } from '../../database/entities/deviation.entity.ts';
import type { Submission } from '../../database/entities/submission.entity.ts';
import type { Deed } from '../../http/deed.ts';
import { enqueueMail } from '../../mail/outbox.ts';
import { deviationAskedMail, deviationDecidedMail } from '../../mail/templates/deviations.ts';
import {
  mailFactsOfRequest,
  peopleOfCustomer,
  peopleWithRole,
} from '../notifications/notifications.queries.ts';

export async function mailCustomer(
  manager: EntityManager,
  deed: Deed,
  submission: Submission,
  number: number,
  balloon: string,
): Promise<void> {
  const facts = await mailFactsOfRequest(
    manager,
    submission.requestId,
    deed.publicUrl,
    `/submissions/${submission.id}/deviations`,
  );
  for (const person of await peopleOfCustomer(manager, submission.requestId)) {
    enqueueMail(manager, deed.now, {
      kind: 'deviation-asked',
      recipient: person.email,
      ...deviationAskedMail(person.name, facts, number, balloon),
    });
  }
}

export async function mailSupplier(
  manager: EntityManager,
  deed: Deed,
  submission: Submission,
  deviation: Deviation,
  decision: 'granted' | 'refused',
): Promise<void> {
  const facts = await mailFactsOfRequest(
    manager,
    submission.requestId,
    deed.publicUrl,
    `/submissions/${submission.id}/deviations`,
  );
  for (const person of await peopleWithRole(manager, submission.supplierId, 'supplier-quality')) {
    enqueueMail(manager, deed.now, {
      kind: `deviation-${decision}`,
      recipient: person.email,
      ...deviationDecidedMail(person.name, facts, deviation.number, decision),
    });
  }
}
