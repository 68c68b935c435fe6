import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { Submission } from './submission.entity.ts';
import { User } from './user.entity.ts';

@Entity({ name: 'signatures' })
@Unique(['submissionId', 'stage'])
export class Signature {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  submissionId!: string;

  @Column({ type: 'varchar' })
  stage!: 'warrant' | 'disposition';

  @Column({ type: 'varchar' })
  userId!: string;

  @Column({ type: 'varchar' })
  name!: string;

  @Column({ type: 'varchar' })
  role!: string;

  @Column({ type: 'varchar' })
  organisationName!: string;

  @Column({ type: 'varchar' })
  meaning!: string;

  @Column({ type: 'text' })
  statement!: string;

  @Column({ type: 'varchar' })
  digest!: string;

  @Column({ type: 'varchar' })
  keyId!: string;

  /** Ed25519 over the digest, base64. */
  @Column({ type: 'varchar' })
  signatureValue!: string;

  /** Hash of the newest audit row at signing. */
  @Column({ type: 'varchar' })
  auditHead!: string;

  @Column({ type: 'varchar' })
  signedAt!: string;

  @ManyToOne(() => Submission, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'submission_id' })
  submission!: Relation<Submission>;

  @ManyToOne(() => User, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'user_id' })
  user!: Relation<User>;
}
