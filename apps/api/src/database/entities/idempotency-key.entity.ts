import { Column, Entity, Index, PrimaryColumn, Unique } from 'typeorm';

/** The answer given to an act that must not happen twice. */
@Entity({ name: 'idempotency_keys' })
@Unique(['userId', 'route', 'key'])
@Index(['createdAt'])
export class IdempotencyKey {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  key!: string;

  @Column({ type: 'varchar' })
  userId!: string;

  @Column({ type: 'varchar' })
  route!: string;

  @Column({ type: 'varchar' })
  bodyHash!: string;

  @Column({ type: 'integer' })
  status!: number;

  @Column({ type: 'text' })
  response!: string;

  @Column({ type: 'varchar' })
  createdAt!: string;
}
