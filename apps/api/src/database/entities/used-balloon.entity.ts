import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { Part } from './part.entity.ts';

/** A number once given stays with its characteristic for ever (R05). */
@Entity({ name: 'used_balloons' })
@Unique(['partId', 'balloon'])
export class UsedBalloon {
  @PrimaryColumn({ type: 'varchar' })
  id!: string;

  @Column({ type: 'varchar' })
  partId!: string;

  @Column({ type: 'varchar' })
  balloon!: string;

  @Column({ type: 'varchar' })
  lineageId!: string;

  @ManyToOne(() => Part, { nullable: false, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'part_id' })
  part!: Relation<Part>;
}
