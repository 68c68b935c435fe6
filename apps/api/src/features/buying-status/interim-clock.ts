import { randomUUID } from 'node:crypto';
import type { DataSource, EntityManager } from 'typeorm';
import { appendAudit } from '../../database/append-audit.ts';
import type { Clock } from '../../clock.ts';
import type { Database } from '../../database/data-source.ts';
import { Organisation } from '../../database/entities/organisation.entity.ts';
import { Reminder } from '../../database/entities/reminder.entity.ts';
import { Submission } from '../../database/entities/submission.entity.ts';
import { SupplyLine } from '../../database/entities/supply-line.entity.ts';
import { readStatement } from '../../database/raw.ts';
import { enqueueMail } from '../../mail/outbox.ts';
import { interimEndingMail, interimStoppedMail } from '../../mail/templates/packages.ts';
import {
  mailFactsOfRequest,
  peopleOfCustomer,
  peopleWithRole,
} from '../notifications/notifications.queries.ts';
import { buyingVerdictOf } from './buying-verdict.ts';

/** Days before the end on which those concerned are told. */
const steps = [1, 7, 14, 30] as const;
const day = 86_400_000;

interface NeededByClock {
  readonly db: Database;
  readonly clock: Clock;
  readonly publicUrl: string;
}

/**
 * Warns before an interim approval ends and, when date or pieces are used up, marks the stop and tells everyone. The
 * verdict itself needs no job: it follows from the calendar. Answers how many lines were warned of or stopped.
 */
export async function runInterimClock({ db, clock, publicUrl }: NeededByClock): Promise<number> {
  const now = clock.now();
  let count = 0;
  for (const id of linesOnTheClock(db.reader, now)) {
    if (await db.writeTransaction((manager) => tick(manager, id, now, publicUrl))) count += 1;
  }
  return count;
}

function linesOnTheClock(reader: DataSource, now: string): string[] {
  const horizon = new Date(Date.parse(now) + 30 * day).toISOString().slice(0, 10);
  const rows = readStatement(
    reader,
    `SELECT id FROM supply_lines WHERE stopped_at IS NULL AND outcome IN ('interim-approval', 'approved')
       AND (end_on <= ? OR (piece_limit IS NOT NULL AND pieces_used >= piece_limit))`,
  ).all(horizon) as { id: string }[];
  return rows.map((row) => row.id);
}

async function tick(
  manager: EntityManager,
  lineId: string,
  now: string,
  publicUrl: string,
): Promise<boolean> {
  const line = await manager.findOneBy(SupplyLine, { id: lineId });
  if (!line || line.stoppedAt !== null || line.decidedSubmissionId === null) return false;
  const submission = await manager.findOneByOrFail(Submission, { id: line.decidedSubmissionId });
  if (buyingVerdictOf(line, now.slice(0, 10)) === 'hold')
    return stop(manager, { line, submission, now, publicUrl });
  if (line.endOn === null) return false;
  const left = Math.round(
    (Date.parse(`${line.endOn}T00:00:00Z`) - Date.parse(`${now.slice(0, 10)}T00:00:00Z`)) / day,
  );
  const step = steps.find((days) => left <= days);
  if (step === undefined) return false;
  const mark = `${line.endOn} ${step}`;
  if (await manager.existsBy(Reminder, { kind: 'interim-ending', objectId: submission.id, mark }))
    return false;
  await manager.insert(Reminder, {
    id: randomUUID(),
    kind: 'interim-ending',
    objectId: submission.id,
    mark,
    sentAt: now,
  });
  const facts = await mailFactsOfRequest(manager, submission.requestId, publicUrl, '/buying-status');
  for (const person of await concerned(manager, submission)) {
    enqueueMail(manager, now, {
      kind: 'interim-ending',
      recipient: person.email,
      ...interimEndingMail(person.name, facts, left, line.endOn),
    });
  }
  return true;
}

async function stop(
  manager: EntityManager,
  {
    line,
    submission,
    now,
    publicUrl,
  }: { line: SupplyLine; submission: Submission; now: string; publicUrl: string },
): Promise<boolean> {
  await manager.update(SupplyLine, { id: line.id }, { stoppedAt: now, updatedAt: now });
  if (submission.state === 'interim-approval') {
    await manager.update(Submission, { id: submission.id }, { state: 'lapsed', updatedAt: now });
  }
  const customer = await manager.findOneByOrFail(Organisation, { id: line.customerId });
  const cause = line.endOn !== null && line.endOn < now.slice(0, 10) ? 'date' : 'pieces';
  appendAudit(
    manager,
    { now, actor: null, organisation: { id: customer.id, name: customer.name } },
    {
      action: 'supply-line.stopped',
      objectType: 'supply-line',
      objectId: line.id,
      summary: `${line.partNumber} from ${line.supplierName} turned to hold: ${cause === 'date' ? 'the date has passed' : 'the pieces are used up'}`,
      before: { stoppedAt: null },
      after: { stoppedAt: now, endOn: line.endOn, piecesUsed: line.piecesUsed },
    },
  );
  const facts = await mailFactsOfRequest(manager, submission.requestId, publicUrl, '/buying-status');
  for (const person of await concerned(manager, submission)) {
    enqueueMail(manager, now, {
      kind: 'interim-stopped',
      recipient: person.email,
      ...interimStoppedMail(person.name, facts, cause),
    });
  }
  return true;
}

/** Supplier, reviewers and purchasing, each once. */
async function concerned(manager: EntityManager, submission: Submission) {
  const people = [
    ...(await peopleWithRole(manager, submission.supplierId, 'supplier-quality')),
    ...(await peopleOfCustomer(manager, submission.requestId)),
    ...(await peopleWithRole(manager, submission.customerId, 'purchasing')),
  ];
  return [...new Map(people.map((person) => [person.id, person])).values()];
}
