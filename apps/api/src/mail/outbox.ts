import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { writeStatement } from '../database/raw.ts';
import type { MailContent } from './templates/layout.ts';

export interface MailIntent extends MailContent {
  /** Which of the events of the trade this is, such as `request-issued`. */
  readonly kind: string;
  /** One person: nobody ever learns from a mail who else received it. */
  readonly recipient: string;
}

/** Puts a mail into the outbox in the transaction of its cause. It is sent after the commit, at least once. */
export function enqueueMail(manager: EntityManager, now: string, mail: MailIntent): void {
  const id = randomUUID();
  writeStatement(
    manager,
    `INSERT INTO outbox_mails (id, kind, recipient, subject, text, html, message_id, created_at, next_attempt_at, attempts)
     VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, 0)`,
  ).run(
    id,
    mail.kind,
    mail.recipient,
    mail.subject,
    mail.text,
    mail.html,
    `<${id}@trammel.invalid>`,
    now,
    now,
  );
}
