import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Organisation } from './organisation.entity.ts';

/** A file held between preview and confirmation; swept after a day. */
@Entity({ name: 'table_imports' })
@Index(['createdAt'])
export class TableImport {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  organisationId!: string;

  @Column({ type: 'varchar' })
  userId!: string;

  @Column({ type: 'varchar' })
  kind!: 'characteristics' | 'readings';

  /** Revision or submission. */
  @Column({ type: 'varchar' })
  targetId!: string;

  @Column({ type: 'varchar' })
  fileName!: string;

  @Column({ type: 'varchar' })
  format!: 'csv' | 'xlsx';

  @Column({ type: 'simple-json' })
  sheets!: string[];

  /** The file as read: CSV text by encoding, or the cells of each sheet. */
  @Column({ type: 'text' })
  content!: string;

  /** JSON of settings and mapping last shown. */
  @Column({ type: 'text' })
  settings!: string;

  @Column({ type: 'varchar' })
  createdAt!: string;

  @Column({ type: 'varchar', nullable: true })
  confirmedAt!: string | null;

  @ManyToOne(() => Organisation, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'organisation_id' })
  organisation!: Relation<Organisation>;
}
