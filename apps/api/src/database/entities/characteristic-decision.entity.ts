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
import type { RowMark } from '@trammel/shared/submission-review';
import { Characteristic } from './characteristic.entity.ts';
import { Deviation } from './deviation.entity.ts';
import { Submission } from './submission.entity.ts';

@Entity({ name: 'characteristic_decisions' })
@Unique(['submissionId', 'characteristicId'])
export class CharacteristicDecision {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  submissionId!: string;

  @Column({ type: 'varchar' })
  characteristicId!: string;

  @Column({ type: 'varchar', nullable: true })
  mark!: RowMark | null | null;

  @Column({ type: 'text', default: '' })
  remark!: string;

  @Column({ type: 'text', default: '' })
  internalRemark!: string;

  @Column({ type: 'varchar', nullable: true })
  deviationId!: string | null;

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

  @ManyToOne(() => Characteristic, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'characteristic_id' })
  characteristic!: Relation<Characteristic>;

  @ManyToOne(() => Deviation, { nullable: true, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'deviation_id' })
  deviation!: Relation<Deviation> | null;
}
