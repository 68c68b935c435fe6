import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import type { CheckedRow, Finding } from '@trammel/shared/checks';
import type { Verdict } from '@trammel/shared/status';
import { Submission } from './submission.entity.ts';

/** An official check: what was judged, by which method, and what came out. */
@Entity({ name: 'checks' })
@Index(['submissionId', 'checkedAt'])
export class StoredCheck {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  submissionId!: string;

  @Column({ type: 'varchar' })
  method!: string;

  @Column({ type: 'varchar' })
  inputsDigest!: string;

  @Column({ type: 'varchar' })
  verdict!: Verdict;

  @Column({ type: 'integer' })
  stops!: number;

  @Column({ type: 'integer' })
  decides!: number;

  @Column({ type: 'integer' })
  informs!: number;

  @Column({ type: 'simple-json' })
  findings!: Finding[];

  @Column({ type: 'simple-json' })
  rows!: CheckedRow[];

  @Column({ type: 'varchar' })
  checkedAt!: string;

  @Column({ type: 'varchar' })
  checkedById!: string;

  @ManyToOne(() => Submission, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'submission_id' })
  submission!: Relation<Submission>;
}
