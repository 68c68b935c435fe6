import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { ApprovalRequest } from './request.entity.ts';
import { Organisation } from './organisation.entity.ts';

@Entity({ name: 'request_messages' })
@Index(['requestId', 'writtenAt'])
export class RequestMessage {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  requestId!: string;

  @Column({ type: 'varchar' })
  authorId!: string;

  @Column({ type: 'varchar' })
  authorName!: string;

  @Column({ type: 'varchar' })
  organisationId!: string;

  @Column({ type: 'varchar' })
  kind!: 'question' | 'answer' | 'note';

  @Column({ type: 'text' })
  text!: string;

  @Column({ type: 'varchar' })
  writtenAt!: string;

  @ManyToOne(() => ApprovalRequest, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'request_id' })
  request!: Relation<ApprovalRequest>;

  @ManyToOne(() => Organisation, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'organisation_id' })
  organisation!: Relation<Organisation>;
}
