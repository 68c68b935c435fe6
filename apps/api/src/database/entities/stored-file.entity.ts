import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { Organisation } from './organisation.entity.ts';

/** A file in the object store; readable only once its digest was read back. */
@Entity({ name: 'stored_files' })
@Unique(['objectKey'])
@Index(['organisationId', 'createdAt'])
export class StoredFile {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  organisationId!: string;

  @Column({ type: 'varchar' })
  uploadedById!: string;

  @Column({ type: 'varchar' })
  uploadedByName!: string;

  /** As the person called it; never part of the key. */
  @Column({ type: 'varchar' })
  name!: string;

  @Column({ type: 'varchar' })
  mediaType!: string;

  @Column({ type: 'integer' })
  size!: number;

  @Column({ type: 'varchar' })
  sha256!: string;

  @Column({ type: 'varchar' })
  objectKey!: string;

  @Column({ type: 'varchar' })
  state!: 'pending' | 'stored';

  @Column({ type: 'varchar' })
  createdAt!: string;

  @ManyToOne(() => Organisation, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'organisation_id' })
  organisation!: Relation<Organisation>;
}
