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
import { Organisation } from './organisation.entity.ts';

@Entity({ name: 'parts' })
@Unique(['organisationId', 'number'])
@Index(['organisationId', 'createdAt', 'id'])
@Index(['organisationId', 'name', 'id'])
export class Part {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  organisationId!: string;

  @Column({ type: 'varchar' })
  number!: string;

  @Column({ type: 'varchar' })
  name!: string;

  @Column({ type: 'varchar', default: '' })
  material!: string;

  @Column({ type: 'varchar', default: '' })
  commodity!: string;

  @Column({ type: 'varchar' })
  unitSystem!: 'metric' | 'inch';

  @Column({ type: 'boolean', default: false })
  safetyOrRegulatory!: boolean;

  @Column({ type: 'varchar' })
  createdAt!: string;

  @Column({ type: 'varchar' })
  createdById!: string;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => Organisation, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'organisation_id' })
  organisation!: Relation<Organisation>;
}
