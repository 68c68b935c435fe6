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
import type { Outcome } from '@trammel/shared/dispositions';
import { Organisation } from './organisation.entity.ts';
import { Part } from './part.entity.ts';

/** One part from one supplier, as purchasing sees it. */
@Entity({ name: 'supply_lines' })
@Unique(['partId', 'supplierId'])
@Index(['customerId', 'partNumber', 'id'])
@Index(['customerId', 'supplierName', 'id'])
@Index(['customerId', 'endOn', 'id'])
export class SupplyLine {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  customerId!: string;

  @Column({ type: 'varchar' })
  supplierId!: string;

  @Column({ type: 'varchar' })
  partId!: string;

  @Column({ type: 'varchar' })
  partNumber!: string;

  @Column({ type: 'varchar' })
  partName!: string;

  @Column({ type: 'varchar' })
  supplierName!: string;

  /** Newest approved or interim round; the buying verdict is derived from it and the clock. */
  @Column({ type: 'varchar', nullable: true })
  decidedSubmissionId!: string | null;

  @Column({ type: 'varchar', nullable: true })
  openSubmissionId!: string | null;

  @Column({ type: 'varchar', nullable: true })
  outcome!: Outcome | null | null;

  @Column({ type: 'varchar', nullable: true })
  approvedRevision!: string | null;

  @Column({ type: 'varchar', nullable: true })
  endOn!: string | null;

  @Column({ type: 'integer', nullable: true })
  pieceLimit!: number | null;

  @Column({ type: 'integer', default: 0 })
  piecesUsed!: number;

  /** When the clock or the count stopped an interim approval and the mails went out. */
  @Column({ type: 'varchar', nullable: true })
  stoppedAt!: string | null;

  @Column({ type: 'varchar' })
  updatedAt!: string;

  @VersionColumn({ type: 'integer' })
  version!: number;

  @ManyToOne(() => Organisation, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'customer_id' })
  customer!: Relation<Organisation>;

  @ManyToOne(() => Organisation, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'supplier_id' })
  supplier!: Relation<Organisation>;

  @ManyToOne(() => Part, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'part_id' })
  part!: Relation<Part>;
}
