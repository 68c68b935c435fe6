import type { EntityManager } from 'typeorm';
import { Deviation } from '../../database/entities/deviation.entity.ts';

/** Deviation requests of a round, oldest first. */
export function findDeviations(manager: EntityManager, submissionId: string): Promise<Deviation[]> {
  return manager.find(Deviation, { where: { submissionId }, order: { number: 'ASC' } });
}
