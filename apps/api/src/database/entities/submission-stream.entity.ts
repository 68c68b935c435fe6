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
import { Submission } from './submission.entity.ts';

/** A cavity, spindle or die; judged on its own, never pooled. */
@Entity({ name: 'submission_streams' })
@Unique(['submissionId', 'name'])
export class SubmissionStream {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  submissionId!: string;

  @Column({ type: 'varchar' })
  name!: string;

  @Column({ type: 'integer' })
  sequence!: number;

  @Column({ type: 'boolean', default: false })
  blocked!: boolean;

  @Column({ type: 'text', default: '' })
  blockedReason!: string;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => Submission, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'submission_id' })
  submission!: Relation<Submission>;
}
