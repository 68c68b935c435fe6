import type { EntityManager } from 'typeorm';
import { StoredCheck } from '../../database/entities/check.entity.ts';
import type { Submission } from '../../database/entities/submission.entity.ts';

/** The check that speaks for a submitted round. */
export function findOfficialCheck(
  manager: EntityManager,
  submission: Submission,
): Promise<StoredCheck | null> {
  if (submission.officialCheckId === null) return Promise.resolve(null);
  return manager.findOneBy(StoredCheck, { id: submission.officialCheckId });
}
