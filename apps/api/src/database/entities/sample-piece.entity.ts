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
import { SubmissionStream } from './submission-stream.entity.ts';

@Entity({ name: 'sample_pieces' })
@Unique(['submissionId', 'label'])
@Unique(['streamId', 'slot'])
export class SamplePiece {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  submissionId!: string;

  @Column({ type: 'varchar' })
  streamId!: string;

  /** Place of this piece in the readings of its stream, 0 upwards; never given again. */
  @Column({ type: 'integer' })
  slot!: number;

  @Column({ type: 'varchar' })
  label!: string;

  @Column({ type: 'varchar', nullable: true })
  madeOn!: string | null;

  @Column({ type: 'varchar', default: '' })
  lot!: string;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => Submission, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'submission_id' })
  submission!: Relation<Submission>;

  @ManyToOne(() => SubmissionStream, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'stream_id' })
  stream!: Relation<SubmissionStream>;
}
