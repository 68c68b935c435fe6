import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { DAY, later, type Clock } from '../../clock.ts';
import type { Database } from '../../database/data-source.ts';
import { Reminder } from '../../database/entities/reminder.entity.ts';
import { enqueueMail } from '../../mail/outbox.ts';
import {
  dueMail,
  notAcknowledgedMail,
  overdueForBuyerMail,
  overdueMail,
} from '../../mail/templates/requests.ts';
import type { MailContent } from '../../mail/templates/layout.ts';
import { mailFactsOfRequest, peopleWithRole } from './notifications.queries.ts';
import { findRoundsOnTheClock, findSentMarks, type OpenRound } from './reminders.queries.ts';
import {
  acknowledgeWithinDays,
  dayNumber,
  longestNoticeDays,
  remindersDue,
  type ReminderMark,
} from './reminders.rules.ts';

const kind = 'submission-due';

export interface RemindersNeed {
  readonly db: Database;
  readonly clock: Clock;
  readonly publicUrl: string;
}

/** Sends each reminder that has come due and has not gone out, each in a transaction of its own. Answers how many. */
export async function sendReminders({ db, clock, publicUrl }: RemindersNeed): Promise<number> {
  const now = clock.now();
  const rounds = findRoundsOnTheClock(
    db.reader,
    later(now, longestNoticeDays * DAY).slice(0, 10),
    later(now, (1 - acknowledgeWithinDays) * DAY),
  );
  const sent = findSentMarks(db.reader, kind);
  let count = 0;
  for (const round of rounds) {
    for (const mark of remindersDue(round, now)) {
      if (sent.has(`${round.id} ${mark}`)) continue;
      if (await db.writeTransaction((manager) => remind(manager, { round, mark, now, publicUrl })))
        count += 1;
    }
  }
  return count;
}

interface Reminding {
  readonly round: OpenRound;
  readonly mark: ReminderMark;
  readonly now: string;
  readonly publicUrl: string;
}

/** False when it was sent in the meantime, or the package has moved on since it was read. */
async function remind(manager: EntityManager, reminding: Reminding): Promise<boolean> {
  const { round, mark, now, publicUrl } = reminding;
  if (await manager.existsBy(Reminder, { kind, objectId: round.id, mark })) return false;
  const [current]: { state: string; dueOn: string }[] = await manager.query(
    'SELECT state, due_on AS dueOn FROM submissions WHERE id = ?',
    [round.id],
  );
  if (current?.state !== round.state || current.dueOn !== round.dueOn) return false;
  await manager.insert(Reminder, { id: randomUUID(), kind, objectId: round.id, mark, sentAt: now });

  const path = mark === 'not-acknowledged' ? `/requests/${round.requestId}` : `/submissions/${round.id}`;
  const facts = await mailFactsOfRequest(manager, round.requestId, publicUrl, path);
  const roundFacts = { ...facts, dueOn: round.dueOn };
  for (const person of await peopleWithRole(manager, round.supplierId, 'supplier-quality')) {
    const content = contentFor(person.name, reminding, roundFacts);
    enqueueMail(manager, now, { kind: `submission-${mark}`, recipient: person.email, ...content });
  }
  if (mark === 'overdue') {
    const forBuyer = { ...roundFacts, url: `${publicUrl}/buying-status` };
    for (const buyer of await peopleWithRole(manager, round.customerId, 'purchasing')) {
      const content = overdueForBuyerMail(buyer.name, forBuyer);
      enqueueMail(manager, now, { kind: 'submission-overdue', recipient: buyer.email, ...content });
    }
  }
  return true;
}

function contentFor(
  to: string,
  { round, mark, now }: Reminding,
  facts: Parameters<typeof dueMail>[1],
): MailContent {
  const missing = { rows: round.missingRows, elements: round.openElements };
  const left = dayNumber(round.dueOn) - dayNumber(now);
  if (mark === 'not-acknowledged') {
    return notAcknowledgedMail(to, facts, dayNumber(now) - dayNumber(round.startedAt));
  }
  return mark === 'overdue' ? overdueMail(to, facts, -left, missing) : dueMail(to, facts, left, missing);
}
