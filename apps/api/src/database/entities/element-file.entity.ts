import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { StoredFile } from './stored-file.entity.ts';
import { Submission } from './submission.entity.ts';
import { SubmissionElement } from './submission-element.entity.ts';

@Entity({ name: 'element_files' })
@Unique(['elementId', 'fileId'])
@Index(['fileId'])
export class ElementFile {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  submissionId!: string;

  @Column({ type: 'varchar' })
  elementId!: string;

  @Column({ type: 'varchar' })
  fileId!: string;

  @Column({ type: 'varchar' })
  attachedAt!: string;

  @ManyToOne(() => Submission, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'submission_id' })
  submission!: Relation<Submission>;

  @ManyToOne(() => SubmissionElement, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'element_id' })
  element!: Relation<SubmissionElement>;

  @ManyToOne(() => StoredFile, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'file_id' })
  file!: Relation<StoredFile>;
}
