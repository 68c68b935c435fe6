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
import { Characteristic } from './characteristic.entity.ts';
import { Submission } from './submission.entity.ts';

@Entity({ name: 'deviations' })
@Unique(['submissionId', 'number'])
@Index(['characteristicId'])
export class Deviation {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'integer' })
  number!: number;

  @Column({ type: 'varchar' })
  submissionId!: string;

  @Column({ type: 'varchar' })
  characteristicId!: string;

  @Column({ type: 'simple-json' })
  streamIds!: string[];

  @Column({ type: 'varchar', nullable: true })
  rangeLower!: string | null;

  @Column({ type: 'varchar', nullable: true })
  rangeUpper!: string | null;

  @Column({ type: 'text' })
  cause!: string;

  @Column({ type: 'text', default: '' })
  risk!: string;

  @Column({ type: 'text' })
  containment!: string;

  @Column({ type: 'text', default: '' })
  correctiveAction!: string;

  @Column({ type: 'integer', nullable: true })
  quantity!: number | null;

  @Column({ type: 'varchar', nullable: true })
  untilOn!: string | null;

  @Column({ type: 'varchar' })
  state!: 'draft' | 'sent' | 'granted' | 'refused' | 'withdrawn';

  @Column({ type: 'varchar' })
  askedById!: string;

  @Column({ type: 'varchar' })
  askedByName!: string;

  @Column({ type: 'varchar' })
  askedAt!: string;

  @Column({ type: 'varchar', nullable: true })
  decidedById!: string | null;

  @Column({ type: 'varchar', nullable: true })
  decidedByName!: string | null;

  @Column({ type: 'varchar', nullable: true })
  decidedAt!: string | null;

  @Column({ type: 'text', nullable: true })
  decisionNote!: string | null;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => Submission, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'submission_id' })
  submission!: Relation<Submission>;

  @ManyToOne(() => Characteristic, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'characteristic_id' })
  characteristic!: Relation<Characteristic>;
}
