import type { EntityManager } from 'typeorm';
import { readStatement, writeStatement } from '../database/raw.ts';
import type { Deed } from '../http/deed.ts';
import { loadCheckInputs } from './check-inputs.ts';
import { runCheck } from './run-check.ts';

/** Above this many rows a check costs more than a small change may; it then runs when the findings are opened. */
const mostRows = 500;

/**
 * Brings the findings a desk counts up to date after the evidence changed. A second, small transaction behind the change:
 * the check itself reads what is committed and holds nobody up.
 */
export async function refreshFindings(deed: Deed, submissionId: string): Promise<void> {
  const row = readStatement(
    deed.reader,
    'SELECT total_rows AS rows, stops, decides, informs FROM submissions WHERE id = ? AND sealed_at IS NULL',
  ).get(submissionId) as { rows: number; stops: number; decides: number; informs: number } | undefined;
  if (!row || row.rows > mostRows) return;
  const prepare = (sql: string) => readStatement(deed.reader, sql);
  const { stops, decides, informs } = runCheck(
    loadCheckInputs(prepare, submissionId, deed.now.slice(0, 10)),
  ).counts;
  if (row.stops === stops && row.decides === decides && row.informs === informs) return;
  await deed.transact((manager: EntityManager) => {
    writeStatement(
      manager,
      'UPDATE submissions SET stops = ?, decides = ?, informs = ? WHERE id = ? AND sealed_at IS NULL',
    ).run(stops, decides, informs, submissionId);
    return Promise.resolve();
  });
}

/** A change of the evidence in its own transaction, and then the findings that follow from it. */
export async function changeEvidence<T>(
  deed: Deed,
  work: (manager: EntityManager) => Promise<{ submissionId: string; answer: T }>,
): Promise<T> {
  const { submissionId, answer } = await deed.transact(work);
  await refreshFindings(deed, submissionId);
  return answer;
}
