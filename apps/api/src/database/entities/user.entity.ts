import {
  Column,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryColumn,
  Unique,
  VersionColumn,
  type Relation,
} from 'typeorm';
import type { Role } from '@trammel/shared/roles';
import { Organisation } from './organisation.entity.ts';

@Entity({ name: 'users' })
@Unique(['organisationId', 'email'])
@Index(['email'])
export class User {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  organisationId!: string;

  /** Lower case. Unique within the organisation only: an invitation must not tell that the address is known elsewhere. */
  @Column({ type: 'varchar' })
  email!: string;

  @Column({ type: 'varchar' })
  name!: string;

  @Column({ type: 'varchar', default: '' })
  title!: string;

  @Column({ type: 'simple-json' })
  roles!: Role[];

  @Column({ type: 'boolean', default: false })
  maySign!: boolean;

  /** Null until the invitation is accepted. */
  @Column({ type: 'varchar', nullable: true })
  passwordHash!: string | null;

  @Column({ type: 'integer', default: 0 })
  failedAttempts!: number;

  @Column({ type: 'varchar', nullable: true })
  blockedUntil!: string | null;

  @Column({ type: 'varchar', nullable: true })
  disabledAt!: string | null;

  @Column({ type: 'varchar' })
  createdAt!: string;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => Organisation, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'organisation_id' })
  organisation!: Relation<Organisation>;
}
