import {
  Column,
  Entity,
  JoinColumn,
  ManyToOne,
  PrimaryColumn,
  Unique,
  VersionColumn,
  type Relation,
} from 'typeorm';
import type { ElementDemand } from '@trammel/shared/requests';
import { Submission } from './submission.entity.ts';

@Entity({ name: 'submission_elements' })
@Unique(['submissionId', 'code'])
export class SubmissionElement {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  submissionId!: string;

  @Column({ type: 'integer' })
  sequence!: number;

  @Column({ type: 'varchar' })
  code!: string;

  @Column({ type: 'varchar' })
  label!: string;

  @Column({ type: 'varchar' })
  demand!: ElementDemand;

  @Column({ type: 'varchar' })
  state!: 'open' | 'submitted' | 'kept-at-supplier' | 'not-applicable';

  @Column({ type: 'text', default: '' })
  reason!: string;

  @Column({ type: 'varchar', default: '' })
  statedPart!: string;

  @Column({ type: 'varchar', default: '' })
  statedRevision!: string;

  @Column({ type: 'varchar', nullable: true })
  dated!: string | null;

  @Column({ type: 'text', default: '' })
  note!: string;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => Submission, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'submission_id' })
  submission!: Relation<Submission>;
}
