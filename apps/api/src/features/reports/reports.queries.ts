import type { EntityManager } from 'typeorm';
import { Disposition } from '../../database/entities/disposition.entity.ts';
import { InterimCondition } from '../../database/entities/interim-condition.entity.ts';
import { Signature } from '../../database/entities/signature.entity.ts';

/** What was signed as the declaration; a later change of its words does not reach back. */
export async function findStatement(manager: EntityManager, submissionId: string): Promise<string | null> {
  const signature = await manager.findOneBy(Signature, { submissionId, stage: 'warrant' });
  return signature?.statement ?? null;
}

/** The rows of the official check as they were stored, still as text: they are read in another thread. */
export async function findOfficialRows(manager: EntityManager, checkId: string): Promise<string | null> {
  const [row]: { rows: string }[] = await manager.query('SELECT rows FROM checks WHERE id = ?', [checkId]);
  return row?.rows ?? null;
}

export interface FoundDisposition {
  readonly disposition: Disposition;
  readonly conditions: readonly InterimCondition[];
}

export async function findDisposition(
  manager: EntityManager,
  submissionId: string,
): Promise<FoundDisposition | null> {
  const disposition = await manager.findOneBy(Disposition, { submissionId });
  if (!disposition) return null;
  const conditions = await manager.find(InterimCondition, {
    where: { dispositionId: disposition.id },
    order: { dueOn: 'ASC', id: 'ASC' },
  });
  return { disposition, conditions };
}
