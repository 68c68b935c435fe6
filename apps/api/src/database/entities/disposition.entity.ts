import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import type { Outcome } from '@trammel/shared/dispositions';
import { Submission } from './submission.entity.ts';

@Entity({ name: 'dispositions' })
@Unique(['submissionId'])
export class Disposition {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  submissionId!: string;

  @Column({ type: 'varchar' })
  outcome!: Outcome;

  @Column({ type: 'simple-json' })
  reasons!: { code: string; characteristicId: string | null; elementId: string | null; text: string }[];

  @Column({ type: 'varchar', nullable: true })
  endOn!: string | null;

  @Column({ type: 'integer', nullable: true })
  pieceLimit!: number | null;

  @Column({ type: 'text', default: '' })
  containment!: string;

  @Column({ type: 'varchar', nullable: true })
  resubmitBy!: string | null;

  @Column({ type: 'text', default: '' })
  comment!: string;

  @Column({ type: 'simple-json' })
  streamsCovered!: string[];

  @Column({ type: 'varchar' })
  decidedById!: string;

  @Column({ type: 'varchar' })
  decidedByName!: string;

  @Column({ type: 'varchar' })
  decidedAt!: string;

  @ManyToOne(() => Submission, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'submission_id' })
  submission!: Relation<Submission>;
}
