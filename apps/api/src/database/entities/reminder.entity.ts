import { Column, Entity, PrimaryColumn, Unique } from 'typeorm';

/** What has been reminded of already, so that it happens once. */
@Entity({ name: 'reminders' })
@Unique(['kind', 'objectId', 'mark'])
export class Reminder {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  kind!: string;

  @Column({ type: 'varchar' })
  objectId!: string;

  /** Which of the steps, such as 14 days before. */
  @Column({ type: 'varchar' })
  mark!: string;

  @Column({ type: 'varchar' })
  sentAt!: string;
}
