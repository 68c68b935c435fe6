import type { DataSource, EntityManager } from 'typeorm';
import { Characteristic } from '../../database/entities/characteristic.entity.ts';

type Executor = DataSource | EntityManager;

/** All characteristics of a revision in the order of their balloons. At most 2,000 stand on one. */
export function findCharacteristics(from: Executor, revisionId: string): Promise<Characteristic[]> {
  return from.getRepository(Characteristic).find({ where: { revisionId }, order: { sequence: 'ASC' } });
}
