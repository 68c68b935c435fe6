import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { ApprovalRequest } from './request.entity.ts';
import { User } from './user.entity.ts';

@Entity({ name: 'request_reviewers' })
@Unique(['requestId', 'userId'])
@Index(['userId'])
export class RequestReviewer {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  requestId!: string;

  @Column({ type: 'varchar' })
  userId!: string;

  @ManyToOne(() => ApprovalRequest, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'request_id' })
  request!: Relation<ApprovalRequest>;

  @ManyToOne(() => User, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'user_id' })
  user!: Relation<User>;
}
