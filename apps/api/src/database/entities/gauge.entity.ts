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
import type { UnitSymbol } from '@trammel/shared/characteristics';
import { Organisation } from './organisation.entity.ts';

@Entity({ name: 'gauges' })
@Unique(['organisationId', 'code'])
@Index(['organisationId', 'dueOn', 'id'])
export class Gauge {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  organisationId!: string;

  @Column({ type: 'varchar' })
  code!: string;

  @Column({ type: 'varchar' })
  kind!: string;

  @Column({ type: 'varchar', nullable: true })
  resolution!: string | null;

  @Column({ type: 'varchar' })
  unit!: UnitSymbol;

  @Column({ type: 'varchar', nullable: true })
  calibratedOn!: string | null;

  @Column({ type: 'varchar', nullable: true })
  dueOn!: string | null;

  @Column({ type: 'varchar', default: '' })
  certificate!: string;

  @Column({ type: 'varchar' })
  createdAt!: string;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => Organisation, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'organisation_id' })
  organisation!: Relation<Organisation>;
}
