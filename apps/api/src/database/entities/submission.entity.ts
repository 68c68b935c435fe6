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
import type { PackageState } from '@trammel/shared/status';
import type { WarrantFacts } from '@trammel/shared/warrants';
import { ApprovalRequest } from './request.entity.ts';
import { Organisation } from './organisation.entity.ts';
import { PartRevision } from './part-revision.entity.ts';

/** One round of a package: what the supplier hands in and the customer decides on. */
@Entity({ name: 'submissions' })
@Unique(['requestId', 'round'])
@Index(['supplierId', 'isOpen', 'dueOn', 'id'])
@Index(['supplierId', 'isOpen', 'partNumber', 'id'])
@Index(['supplierId', 'updatedAt', 'id'])
@Index(['customerId', 'desk', 'submittedAt', 'id'])
@Index(['customerId', 'submittedAt', 'id'])
@Index(['customerId', 'desk', 'dueOn', 'id'])
@Index(['customerId', 'desk', 'partNumber', 'id'])
@Index(['customerId', 'dueOn', 'id'])
@Index(['customerId', 'partNumber', 'id'])
@Index(['supplierId', 'dueOn', 'id'])
@Index(['supplierId', 'partNumber', 'id'])
@Index(['revisionId'])
export class Submission {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  requestId!: string;

  @Column({ type: 'integer' })
  round!: number;

  @Column({ type: 'varchar' })
  customerId!: string;

  @Column({ type: 'varchar' })
  supplierId!: string;

  @Column({ type: 'varchar' })
  partId!: string;

  @Column({ type: 'varchar' })
  revisionId!: string;

  /** Frozen with the package (R01). */
  @Column({ type: 'varchar' })
  partNumber!: string;

  @Column({ type: 'varchar' })
  partName!: string;

  @Column({ type: 'varchar' })
  revisionCode!: string;

  @Column({ type: 'varchar' })
  state!: PackageState;

  /** Whose hands the package is in. */
  @Column({ type: 'varchar' })
  desk!: 'supplier' | 'customer' | 'closed';

  /** The newest round of a package that is not settled. */
  @Column({ type: 'boolean' })
  isOpen!: boolean;

  @Column({ type: 'varchar' })
  dueOn!: string;

  @Column({ type: 'varchar' })
  createdAt!: string;

  @Column({ type: 'varchar' })
  updatedAt!: string;

  @Column({ type: 'varchar', nullable: true })
  submittedAt!: string | null;

  @Column({ type: 'varchar', nullable: true })
  submittedById!: string | null;

  @Column({ type: 'varchar', nullable: true })
  reviewStartedAt!: string | null;

  @Column({ type: 'varchar', nullable: true })
  decidedAt!: string | null;

  @Column({ type: 'varchar', nullable: true })
  decidedById!: string | null;

  @Column({ type: 'simple-json' })
  warrant!: WarrantFacts;

  @Column({ type: 'integer', default: 0 })
  stops!: number;

  @Column({ type: 'integer', default: 0 })
  decides!: number;

  @Column({ type: 'integer', default: 0 })
  informs!: number;

  @Column({ type: 'integer', default: 0 })
  characteristicCount!: number;

  @Column({ type: 'integer', default: 0 })
  specialCount!: number;

  @Column({ type: 'integer', default: 0 })
  outCount!: number;

  @Column({ type: 'integer', default: 0 })
  undecidedCount!: number;

  @Column({ type: 'integer', default: 0 })
  measuredRows!: number;

  @Column({ type: 'integer', default: 0 })
  totalRows!: number;

  @Column({ type: 'integer', default: 0 })
  deviationsOpen!: number;

  @Column({ type: 'varchar', nullable: true })
  officialCheckId!: string | null;

  /** Set by the warrant: from then on database triggers refuse changes to the evidence. */
  @Column({ type: 'varchar', nullable: true })
  sealedAt!: string | null;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => ApprovalRequest, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'request_id' })
  request!: Relation<ApprovalRequest>;

  @ManyToOne(() => Organisation, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'customer_id' })
  customer!: Relation<Organisation>;

  @ManyToOne(() => Organisation, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'supplier_id' })
  supplier!: Relation<Organisation>;

  @ManyToOne(() => PartRevision, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'revision_id' })
  revision!: Relation<PartRevision>;
}
