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
import { Part } from './part.entity.ts';
import { StoredFile } from './stored-file.entity.ts';

@Entity({ name: 'part_revisions' })
@Unique(['partId', 'code'])
@Unique(['partId', 'sequence'])
export class PartRevision {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  partId!: string;

  @Column({ type: 'varchar' })
  organisationId!: string;

  @Column({ type: 'varchar' })
  code!: string;

  /** Order of the revisions of a part, 1 upwards. */
  @Column({ type: 'integer' })
  sequence!: number;

  @Column({ type: 'varchar' })
  state!: 'draft' | 'released' | 'superseded';

  @Column({ type: 'varchar', nullable: true })
  drawingFileId!: string | null;

  @Column({ type: 'varchar', nullable: true })
  drawingDate!: string | null;

  @Column({ type: 'varchar', default: '' })
  changeOrder!: string;

  @Column({ type: 'varchar' })
  tolerancingStandard!: 'iso' | 'asme';

  @Column({ type: 'varchar' })
  roundingRule!: 'absolute' | 'astm-e29';

  @Column({ type: 'varchar', default: '' })
  generalTolerance!: string;

  @Column({ type: 'text', default: '' })
  note!: string;

  @Column({ type: 'varchar', nullable: true })
  copiedFromId!: string | null;

  @Column({ type: 'varchar' })
  createdAt!: string;

  @Column({ type: 'varchar', nullable: true })
  releasedAt!: string | null;

  @Column({ type: 'varchar', nullable: true })
  releasedById!: string | null;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => Part, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'part_id' })
  part!: Relation<Part>;

  @ManyToOne(() => StoredFile, { nullable: true, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'drawing_file_id' })
  drawingFile!: Relation<StoredFile> | null;
}
