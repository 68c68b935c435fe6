import type { CheckResponse } from '@trammel/shared/checks';
import { appendAudit } from '../../database/append-audit.ts';
import type { Submission } from '../../database/entities/submission.entity.ts';
import { readStatement, writeStatement } from '../../database/raw.ts';
import { loadCheckInputs } from '../../evidence/check-inputs.ts';
import { inputsDigest, runCheck } from '../../evidence/run-check.ts';
import { storeCheck } from '../../evidence/store-check.ts';
import type { Deed } from '../../http/deed.ts';
import { findSubmissionForActor, requireOpenForSupplier } from '../submissions/submissions.queries.ts';
import { presentCheck, presentStoredCheck } from './checks.presenter.ts';

/** The check as it stands now, without storing anything but the counts that the desks show. */
export async function liveCheck(deed: Deed, submission: Submission): Promise<CheckResponse> {
  const inputs = loadCheckInputs(
    (sql) => readStatement(deed.reader, sql),
    submission.id,
    deed.now.slice(0, 10),
  );
  const check = runCheck(inputs);
  const { stops, decides, informs } = check.counts;
  if (submission.stops !== stops || submission.decides !== decides || submission.informs !== informs) {
    await deed.transact(async (manager) => {
      writeStatement(
        manager,
        'UPDATE submissions SET stops = ?, decides = ?, informs = ? WHERE id = ? AND sealed_at IS NULL',
      ).run(stops, decides, informs, submission.id);
    });
  }
  return presentCheck(submission.id, 'live', check, inputsDigest(inputs), deed.now);
}

/** Runs the official check of an open package and stores it. */
export function officialCheck(deed: Deed, submissionId: string): Promise<CheckResponse> {
  return deed.transact(async (manager) => {
    const submission = requireOpenForSupplier(
      await findSubmissionForActor(manager, deed.actor, submissionId),
    );
    const stored = await storeCheck(manager, deed, submission.id);
    appendAudit(manager, deed, {
      action: 'package.checked',
      objectType: 'submission',
      objectId: submission.id,
      summary: `Check of ${submission.partNumber} ${submission.revisionCode}: ${stored.stops} stop submission, ${stored.decides} for the reviewer`,
      after: { method: stored.method, inputsDigest: stored.inputsDigest, verdict: stored.verdict },
    });
    return presentStoredCheck(stored);
  });
}
