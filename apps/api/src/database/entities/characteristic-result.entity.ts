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
import type { Verdict } from '@trammel/shared/status';
import { Characteristic } from './characteristic.entity.ts';
import { Gauge } from './gauge.entity.ts';
import { Submission } from './submission.entity.ts';
import { SubmissionStream } from './submission-stream.entity.ts';

/** Everything measured on one characteristic in one stream: one row, however many pieces. */
@Entity({ name: 'characteristic_results' })
@Unique(['submissionId', 'characteristicId', 'streamId'])
export class CharacteristicResult {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  submissionId!: string;

  @Column({ type: 'varchar' })
  characteristicId!: string;

  @Column({ type: 'varchar' })
  streamId!: string;

  /** Exact texts by slot, one a line; an empty line is not measured. */
  @Column({ type: 'text', default: '' })
  readings!: string;

  /** One letter a reading: i, o, u, n, x. */
  @Column({ type: 'text', default: '' })
  marks!: string;

  @Column({ type: 'integer', nullable: true })
  attributeChecked!: number | null;

  @Column({ type: 'integer', nullable: true })
  attributeFailed!: number | null;

  @Column({ type: 'varchar', nullable: true })
  gaugeId!: string | null;

  @Column({ type: 'varchar', nullable: true })
  measuredOn!: string | null;

  @Column({ type: 'text', default: '' })
  note!: string;

  @Column({ type: 'integer', default: 0 })
  n!: number;

  @Column({ type: 'varchar', nullable: true })
  minimum!: string | null;

  @Column({ type: 'varchar', nullable: true })
  maximum!: string | null;

  @Column({ type: 'double precision', nullable: true })
  mean!: number | null;

  @Column({ type: 'double precision', nullable: true })
  standardDeviation!: number | null;

  @Column({ type: 'integer', default: 0 })
  outCount!: number;

  @Column({ type: 'integer', default: 0 })
  undecidedCount!: number;

  @Column({ type: 'varchar' })
  verdict!: Verdict;

  @Column({ type: 'varchar', nullable: true })
  enteredById!: string | null;

  @Column({ type: 'varchar' })
  updatedAt!: string;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => Submission, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'submission_id' })
  submission!: Relation<Submission>;

  @ManyToOne(() => Characteristic, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'characteristic_id' })
  characteristic!: Relation<Characteristic>;

  @ManyToOne(() => SubmissionStream, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'stream_id' })
  stream!: Relation<SubmissionStream>;

  @ManyToOne(() => Gauge, { nullable: true, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'gauge_id' })
  gauge!: Relation<Gauge> | null;
}
