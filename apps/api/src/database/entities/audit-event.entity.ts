import { Column, Entity, Index, PrimaryColumn, Unique } from 'typeorm';

/** Append-only, hash-chained; triggers refuse UPDATE and DELETE. */
@Entity({ name: 'audit_events' })
@Unique(['organisationId', 'organisationSequence'])
@Index(['objectId'])
export class AuditEvent {
  @PrimaryColumn({ type: 'integer' })
  sequence!: number;

  /** Gapless within one organisation: what its people see instead of the number of the whole trail. */
  @Column({ type: 'integer' })
  organisationSequence!: number;

  @Column({ type: 'varchar' })
  at!: string;

  @Column({ type: 'varchar', nullable: true })
  actorId!: string | null;

  @Column({ type: 'varchar' })
  actorName!: string;

  /** Whose act it was. */
  @Column({ type: 'varchar', nullable: true })
  organisationId!: string | null;

  @Column({ type: 'varchar' })
  organisationName!: string;

  @Column({ type: 'varchar' })
  action!: string;

  @Column({ type: 'varchar' })
  objectType!: string;

  @Column({ type: 'varchar' })
  objectId!: string;

  @Column({ type: 'varchar' })
  summary!: string;

  @Column({ type: 'text', nullable: true })
  before!: string | null;

  @Column({ type: 'text', nullable: true })
  after!: string | null;

  @Column({ type: 'varchar' })
  previousHash!: string;

  @Column({ type: 'varchar' })
  hash!: string;
}
