import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { User } from './user.entity.ts';

@Entity({ name: 'account_tokens' })
@Unique(['tokenHash'])
@Index(['userId'])
export class AccountToken {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  userId!: string;

  @Column({ type: 'varchar' })
  kind!: 'invitation' | 'password-reset';

  /** SHA-256 of the secret that went out by mail. */
  @Column({ type: 'varchar' })
  tokenHash!: string;

  @Column({ type: 'varchar' })
  createdAt!: string;

  @Column({ type: 'varchar' })
  expiresAt!: string;

  @Column({ type: 'varchar', nullable: true })
  usedAt!: string | null;

  @ManyToOne(() => User, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'user_id' })
  user!: Relation<User>;
}
