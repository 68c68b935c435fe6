import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { StoredCheck } from '../database/entities/check.entity.ts';
import { Submission } from '../database/entities/submission.entity.ts';
import { writeStatement } from '../database/raw.ts';
import type { Deed } from '../http/deed.ts';
import { loadCheckInputs } from './check-inputs.ts';
import { checkedRows, inputsDigest, runCheck } from './run-check.ts';

/** Judges a package and keeps the outcome, in the transaction of the act that needs it. */
export async function storeCheck(
  manager: EntityManager,
  deed: Pick<Deed, 'actor' | 'now'>,
  submissionId: string,
): Promise<StoredCheck> {
  const inputs = loadCheckInputs((sql) => writeStatement(manager, sql), submissionId, deed.now.slice(0, 10));
  const check = runCheck(inputs);
  const stored = manager.create(StoredCheck, {
    id: randomUUID(),
    submissionId,
    method: check.method,
    inputsDigest: inputsDigest(inputs),
    verdict: check.verdict,
    ...check.counts,
    findings: check.findings,
    rows: checkedRows(check),
    checkedAt: deed.now,
    checkedById: deed.actor.userId,
  });
  await manager.insert(StoredCheck, stored);
  await manager.update(Submission, { id: submissionId }, { ...check.counts, officialCheckId: stored.id });
  return stored;
}
