import type { EntityManager } from 'typeorm';
import { openForReview } from '@trammel/shared/status';
import { Submission } from '../../database/entities/submission.entity.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, Forbidden, NotFound } from '../../http/problems.ts';
import { findSubmissionForActor } from '../submissions/submissions.queries.ts';

/** The round as the reviewer may mark it now, or the reason why not is thrown. */
export async function openReview(
  manager: EntityManager,
  deed: Deed,
  submissionId: string,
): Promise<Submission> {
  const { submission, side } = await findSubmissionForActor(manager, deed.actor, submissionId);
  if (side !== 'customer') throw new NotFound();
  if (!openForReview.includes(submission.state)) {
    throw new Conflict(
      submission.decidedAt === null
        ? 'The supplier has not submitted this round yet.'
        : 'This round is decided; its marks stay as they are. A correction needs a new round.',
    );
  }
  if (submission.submittedById === deed.actor.userId)
    throw new Forbidden('Nobody decides on what they submitted.');
  return submission;
}

/** The first mark takes the round into review. */
export async function beginReview(manager: EntityManager, deed: Deed, submission: Submission): Promise<void> {
  const begun =
    submission.state === 'submitted' ? { state: 'in-review' as const, reviewStartedAt: deed.now } : {};
  await manager.update(Submission, { id: submission.id }, { ...begun, updatedAt: deed.now });
}
