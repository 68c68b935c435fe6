import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { SupplyLine } from './supply-line.entity.ts';

@Entity({ name: 'deliveries' })
@Index(['supplyLineId', 'recordedAt'])
export class Delivery {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  supplyLineId!: string;

  @Column({ type: 'integer' })
  quantity!: number;

  @Column({ type: 'text', default: '' })
  note!: string;

  @Column({ type: 'varchar' })
  recordedById!: string;

  @Column({ type: 'varchar' })
  recordedByName!: string;

  @Column({ type: 'varchar' })
  recordedAt!: string;

  @ManyToOne(() => SupplyLine, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'supply_line_id' })
  supplyLine!: Relation<SupplyLine>;
}
