import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { Organisation } from './organisation.entity.ts';

/** One organisation buys from another; either may stand on both ends of other links. */
@Entity({ name: 'organisation_links' })
@Unique(['customerId', 'supplierId'])
@Index(['supplierId'])
export class OrganisationLink {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  customerId!: string;

  @Column({ type: 'varchar' })
  supplierId!: string;

  @Column({ type: 'varchar', default: '' })
  supplierNumber!: string;

  @Column({ type: 'varchar' })
  createdAt!: string;

  @ManyToOne(() => Organisation, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'customer_id' })
  customer!: Relation<Organisation>;

  @ManyToOne(() => Organisation, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'supplier_id' })
  supplier!: Relation<Organisation>;
}
