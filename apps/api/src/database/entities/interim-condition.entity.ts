import {
  Column,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryColumn,
  VersionColumn,
  type Relation,
} from 'typeorm';
import { Disposition } from './disposition.entity.ts';
import { Submission } from './submission.entity.ts';

@Entity({ name: 'interim_conditions' })
@Index(['submissionId'])
export class InterimCondition {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  dispositionId!: string;

  @Column({ type: 'varchar' })
  submissionId!: string;

  @Column({ type: 'text' })
  text!: string;

  @Column({ type: 'varchar' })
  owner!: string;

  @Column({ type: 'varchar' })
  dueOn!: string;

  @Column({ type: 'varchar' })
  state!: 'open' | 'evidence-given' | 'verified';

  @Column({ type: 'text', default: '' })
  evidence!: string;

  @Column({ type: 'varchar', nullable: true })
  closedByName!: string | null;

  @Column({ type: 'varchar', nullable: true })
  closedAt!: string | null;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => Submission, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'submission_id' })
  submission!: Relation<Submission>;

  @ManyToOne(() => Disposition, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'disposition_id' })
  disposition!: Relation<Disposition>;
}
