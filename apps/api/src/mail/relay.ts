import type { Logger } from 'pino';
import { MINUTE, SECOND, later, type Clock } from '../clock.ts';
import type { Database } from '../database/data-source.ts';
import { OutboxMail } from '../database/entities/outbox-mail.entity.ts';
import type { MailTransport } from './transport.ts';

const atOnce = 50;
const longestWait = 4 * MINUTE;
/** A mail that the receiving server itself refuses this often is put aside for the administrator. */
const mostRefusals = 8;

interface RelayDependencies {
  readonly db: Database;
  readonly clock: Clock;
  readonly log: Logger;
  readonly transport: MailTransport;
}

/**
 * Sends what is due, oldest first, one after the other. A mail is marked as sent after the server took it, so a crash
 * in between sends it again under the same Message-ID: at least once, and the receiver can tell.
 */
export async function sendDueMails({ db, clock, log, transport }: RelayDependencies): Promise<void> {
  const due = await db.reader
    .getRepository(OutboxMail)
    .createQueryBuilder('mail')
    .where('mail.sentAt IS NULL AND mail.parkedAt IS NULL AND mail.nextAttemptAt <= :now', {
      now: clock.now(),
    })
    .orderBy('mail.createdAt')
    .addOrderBy('mail.id')
    .limit(atOnce)
    .getMany();
  for (const mail of due) {
    try {
      await transport.send({ ...mail, to: mail.recipient });
      await db.writeTransaction((manager) =>
        manager.update(OutboxMail, { id: mail.id }, { sentAt: clock.now(), lastError: null }),
      );
    } catch (error) {
      const fault = faultOf(error);
      await noteFault(db, clock, mail, fault);
      log.warn(
        { mail: mail.id, kind: mail.kind, code: fault.code, attempts: mail.attempts + 1 },
        'mail not sent',
      );
      // No server: the next mail would fare no better, and they are to leave in order.
      if (!fault.refused) return;
    }
  }
}

interface Fault {
  readonly code: string;
  /** The server answered and said no; otherwise it was out of reach. */
  readonly refused: boolean;
}

function faultOf(error: unknown): Fault {
  const coded = error as { responseCode?: unknown; code?: unknown };
  if (typeof coded.responseCode === 'number') return { code: String(coded.responseCode), refused: true };
  return { code: typeof coded.code === 'string' ? coded.code : 'unknown', refused: false };
}

async function noteFault(db: Database, clock: Clock, mail: OutboxMail, fault: Fault): Promise<void> {
  const attempts = mail.attempts + (fault.refused ? 1 : 0);
  const wait = fault.refused ? Math.min(longestWait, 5 * SECOND * 2 ** attempts) : 10 * SECOND;
  await db.writeTransaction((manager) =>
    manager.update(
      OutboxMail,
      { id: mail.id },
      {
        attempts,
        lastError: fault.code,
        nextAttemptAt: later(clock.now(), wait),
        ...(attempts >= mostRefusals && { parkedAt: clock.now() }),
      },
    ),
  );
}
