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
import type {
  CharacteristicClass,
  CharacteristicKind,
  GeometricSpec,
  ToleranceSpec,
  UnitSymbol,
} from '@trammel/shared/characteristics';
import { PartRevision } from './part-revision.entity.ts';

@Entity({ name: 'characteristics' })
@Unique(['revisionId', 'balloon'])
@Unique(['revisionId', 'lineageId'])
@Index(['revisionId', 'sequence'])
export class Characteristic {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  revisionId!: string;

  /** The same for a characteristic through all revisions of its part. */
  @Column({ type: 'varchar' })
  lineageId!: string;

  @Column({ type: 'integer' })
  sequence!: number;

  @Column({ type: 'varchar' })
  balloon!: string;

  @Column({ type: 'varchar', default: '' })
  sheet!: string;

  @Column({ type: 'varchar', default: '' })
  zone!: string;

  @Column({ type: 'varchar' })
  description!: string;

  @Column({ type: 'varchar' })
  kind!: CharacteristicKind;

  @Column({ type: 'simple-json' })
  tolerance!: ToleranceSpec;

  @Column({ type: 'simple-json', nullable: true })
  geometric!: GeometricSpec | null | null;

  @Column({ type: 'varchar' })
  unit!: UnitSymbol;

  @Column({ type: 'integer' })
  decimals!: number;

  @Column({ type: 'varchar' })
  class!: CharacteristicClass;

  @Column({ type: 'varchar', default: '' })
  method!: string;

  @Column({ type: 'boolean', default: false })
  attributeAllowed!: boolean;

  @Column({ type: 'integer', nullable: true })
  pieces!: number | null;

  @Column({ type: 'simple-json' })
  controlledBy!: string[];

  @Column({ type: 'text', default: '' })
  note!: string;

  @Column({ type: 'varchar', nullable: true })
  nominal!: string | null;

  /** Exact decimal text worked out from the tolerance. */
  @Column({ type: 'varchar', nullable: true })
  lowerLimit!: string | null;

  @Column({ type: 'varchar', nullable: true })
  upperLimit!: string | null;

  @Column({ type: 'boolean', default: false })
  naturalLower!: boolean;

  @Column({ type: 'varchar', default: '' })
  explanation!: string;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => PartRevision, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'revision_id' })
  revision!: Relation<PartRevision>;
}
