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
import type { DecisionRule, RequestElement, RequestReason } from '@trammel/shared/requests';
import type { RequestState } from '@trammel/shared/status';
import { Organisation } from './organisation.entity.ts';
import { Part } from './part.entity.ts';
import { PartRevision } from './part-revision.entity.ts';
import { Site } from './site.entity.ts';

@Entity({ name: 'requests' })
@Unique(['customerId', 'supplierId', 'number'])
@Index(['customerId', 'createdAt', 'id'])
@Index(['customerId', 'dueOn', 'id'])
@Index(['supplierId'])
@Index(['partId', 'supplierId'])
export class ApprovalRequest {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  /** Counted within the pair of customer and supplier, so that it tells neither about others. */
  @Column({ type: 'integer' })
  number!: number;

  @Column({ type: 'varchar' })
  customerId!: string;

  @Column({ type: 'varchar' })
  supplierId!: string;

  @Column({ type: 'varchar' })
  siteId!: string;

  @Column({ type: 'varchar' })
  partId!: string;

  @Column({ type: 'varchar' })
  revisionId!: string;

  @Column({ type: 'varchar' })
  state!: RequestState;

  @Column({ type: 'varchar' })
  reason!: RequestReason;

  @Column({ type: 'varchar', default: '' })
  reasonNote!: string;

  @Column({ type: 'integer' })
  level!: number;

  @Column({ type: 'simple-json' })
  elements!: RequestElement[];

  @Column({ type: 'varchar' })
  streamKind!: 'cavity' | 'spindle' | 'die' | 'line' | 'pattern' | 'other';

  @Column({ type: 'simple-json' })
  streams!: string[];

  @Column({ type: 'integer' })
  piecesPerStream!: number;

  @Column({ type: 'simple-json' })
  decisionRule!: DecisionRule;

  @Column({ type: 'varchar' })
  dueOn!: string;

  @Column({ type: 'varchar', default: '' })
  purchaseOrder!: string;

  @Column({ type: 'text', default: '' })
  message!: string;

  @Column({ type: 'varchar' })
  createdAt!: string;

  @Column({ type: 'varchar' })
  createdById!: string;

  @Column({ type: 'varchar', nullable: true })
  issuedAt!: string | null;

  @Column({ type: 'varchar', nullable: true })
  issuedById!: string | null;

  @Column({ type: 'varchar', nullable: true })
  acknowledgedAt!: string | null;

  @Column({ type: 'varchar', nullable: true })
  acknowledgedById!: string | null;

  @Column({ type: 'boolean', default: false })
  questionOpen!: boolean;

  @Column({ type: 'varchar', nullable: true })
  withdrawnAt!: string | null;

  @Column({ type: 'text', nullable: true })
  withdrawnReason!: string | null;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => Organisation, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'customer_id' })
  customer!: Relation<Organisation>;

  @ManyToOne(() => Organisation, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'supplier_id' })
  supplier!: Relation<Organisation>;

  @ManyToOne(() => Site, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'site_id' })
  site!: Relation<Site>;

  @ManyToOne(() => Part, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'part_id' })
  part!: Relation<Part>;

  @ManyToOne(() => PartRevision, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'revision_id' })
  revision!: Relation<PartRevision>;
}
