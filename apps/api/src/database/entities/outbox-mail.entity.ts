import { Column, Entity, Index, PrimaryColumn, Unique } from 'typeorm';

/** A mail to be sent, written in the transaction of its cause. */
@Entity({ name: 'outbox_mails' })
@Unique(['messageId'])
@Index(['sentAt', 'parkedAt', 'nextAttemptAt'])
export class OutboxMail {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  kind!: string;

  @Column({ type: 'varchar' })
  recipient!: string;

  @Column({ type: 'varchar' })
  subject!: string;

  @Column({ type: 'text' })
  text!: string;

  @Column({ type: 'text' })
  html!: string;

  @Column({ type: 'varchar' })
  messageId!: string;

  @Column({ type: 'varchar' })
  createdAt!: string;

  @Column({ type: 'varchar' })
  nextAttemptAt!: string;

  @Column({ type: 'integer', default: 0 })
  attempts!: number;

  @Column({ type: 'varchar', nullable: true })
  sentAt!: string | null;

  @Column({ type: 'varchar', nullable: true })
  parkedAt!: string | null;

  @Column({ type: 'varchar', nullable: true })
  lastError!: string | null;
}
