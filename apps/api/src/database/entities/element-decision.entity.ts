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
import { Submission } from './submission.entity.ts';
import { SubmissionElement } from './submission-element.entity.ts';

@Entity({ name: 'element_decisions' })
@Unique(['elementId'])
@Index(['submissionId'])
export class ElementDecision {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  submissionId!: string;

  @Column({ type: 'varchar' })
  elementId!: string;

  @Column({ type: 'varchar', nullable: true })
  mark!: 'accepted' | 'refused' | 'questioned' | null | null;

  @Column({ type: 'text', default: '' })
  remark!: string;

  @Column({ type: 'text', default: '' })
  internalRemark!: string;

  @Column({ type: 'varchar' })
  decidedById!: string;

  @Column({ type: 'varchar' })
  decidedByName!: string;

  @Column({ type: 'varchar' })
  decidedAt!: string;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => Submission, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'submission_id' })
  submission!: Relation<Submission>;

  @ManyToOne(() => SubmissionElement, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'element_id' })
  element!: Relation<SubmissionElement>;
}
