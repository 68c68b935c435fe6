import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { User } from './user.entity.ts';

/** A sign-in; the cookie names it, and revoking the row ends it at the next request. */
@Entity({ name: 'sessions' })
@Index(['userId', 'revokedAt'])
export class Session {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  userId!: string;

  @Column({ type: 'varchar' })
  createdAt!: string;

  @Column({ type: 'varchar' })
  lastSeenAt!: string;

  @Column({ type: 'varchar' })
  expiresAt!: string;

  @Column({ type: 'varchar', nullable: true })
  revokedAt!: string | null;

  @Column({ type: 'varchar', default: '' })
  userAgent!: string;

  @ManyToOne(() => User, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'user_id' })
  user!: Relation<User>;
}
