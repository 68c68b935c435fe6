import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { Submission } from './submission.entity.ts';

@Entity({ name: 'sealed_packages' })
@Unique(['submissionId', 'stage'])
export class SealedPackage {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  submissionId!: string;

  @Column({ type: 'varchar' })
  stage!: 'warrant' | 'disposition';

  /** Canonical JSON of everything the signature covers. */
  @Column({ type: 'text' })
  canonical!: string;

  @Column({ type: 'varchar' })
  digest!: string;

  @Column({ type: 'varchar' })
  sealedAt!: string;

  @ManyToOne(() => Submission, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'submission_id' })
  submission!: Relation<Submission>;
}
