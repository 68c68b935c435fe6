import type { RequestResponse } from '@trammel/shared/requests';
import { appendAudit } from '../../database/append-audit.ts';
import { Disposition } from '../../database/entities/disposition.entity.ts';
import { Submission } from '../../database/entities/submission.entity.ts';
import { SupplyLine } from '../../database/entities/supply-line.entity.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, Forbidden } from '../../http/problems.ts';
import { touchSubmission } from '../submissions/submissions.queries.ts';
import { copyRound } from './next-round.ts';
import { presentRequest } from './requests.presenter.ts';
import { findRequestForActor, findRounds } from './requests.queries.ts';
import { mayResubmit } from './requests.rules.ts';

/** Opens the next round as a copy of the last, so that only what was wrong is done again. */
export function startNextRound(deed: Deed, requestId: string): Promise<RequestResponse> {
  return deed.transact(async (manager) => {
    const { actor, now } = deed;
    const { request, side } = await findRequestForActor(manager, actor, requestId);
    if (side !== 'supplier') throw new Forbidden('Only the supplier starts the next round.');
    const last = (await findRounds(manager, requestId)).at(-1) ?? null;
    if (!last || !mayResubmit(request.state, last)) {
      throw new Conflict(
        'A next round follows a package that was sent back, rejected or approved for a time only.',
      );
    }
    const old = await manager.findOneByOrFail(Submission, { id: last.id });
    const disposition = await manager.findOneBy(Disposition, { submissionId: old.id });
    await touchSubmission(manager, old, now, { isOpen: false, desk: 'closed' });
    const submissionId = await copyRound(manager, old, {
      now,
      dueOn: disposition?.resubmitBy ?? request.dueOn,
    });
    await manager.update(
      SupplyLine,
      { partId: request.partId, supplierId: request.supplierId },
      { openSubmissionId: submissionId, updatedAt: now },
    );
    appendAudit(manager, deed, {
      action: 'submission.started',
      objectType: 'submission',
      objectId: submissionId,
      summary: `Started round ${old.round + 1}`,
      after: { requestId, round: old.round + 1, copiedFrom: old.id },
    });
    return presentRequest(manager, actor, requestId);
  });
}
