import type { EntityManager } from 'typeorm';
import type { QueryDeepPartialEntity } from 'typeorm/query-builder/QueryPartialEntity.js';
import { openForSupplier, type PackageState } from '@trammel/shared/status';
import { Submission } from '../../database/entities/submission.entity.ts';
import type { Actor } from '../../http/actor.ts';
import { Conflict, Forbidden, NotFound } from '../../http/problems.ts';
import { sideOf, type Side } from './submissions.rules.ts';

export {
  countRows,
  inWork,
  isDerivedElement,
  openForResubmission,
  pieceLabel,
  sideOf,
  type Side,
} from './submissions.rules.ts';

export interface FoundSubmission {
  readonly submission: Submission;
  readonly side: Side;
  /** The supplier's own work always; for the customer what has been submitted. */
  readonly evidenceVisible: boolean;
}

/** A round as this person may see it; anyone else's is as absent as one that never was. */
export async function findSubmissionForActor(
  manager: EntityManager,
  actor: Actor,
  id: string,
): Promise<FoundSubmission> {
  const submission = await manager.findOneBy(Submission, { id });
  const side = submission ? sideOf(actor, submission) : null;
  if (!submission || !side) throw new NotFound();
  return { submission, side, evidenceVisible: side === 'supplier' || submission.submittedAt !== null };
}

/** Readings, elements and findings reach the customer with the signature, not before. */
export function requireEvidence(found: FoundSubmission): void {
  if (!found.evidenceVisible) {
    throw new Conflict(
      'The supplier has not submitted this round yet. Its evidence can be read from then on.',
    );
  }
}

const closedWords: Partial<Record<PackageState, string>> = {
  requested: 'Acknowledge the request first; then the package can be filled.',
  submitted: 'This round has been submitted and is frozen.',
  'in-review': 'This round has been submitted and is frozen.',
  withdrawn: 'The customer has withdrawn this request.',
};

/** The supplier may change the evidence now, or the reason why not is thrown. */
export function requireOpenForSupplier(found: FoundSubmission): Submission {
  const { submission, side } = found;
  if (side !== 'supplier') throw new Forbidden('Only the supplier of this package changes its evidence.');
  if (!openForSupplier.includes(submission.state)) {
    throw new Conflict(
      closedWords[submission.state] ??
        'This round is decided and stays as it is; the next round can be changed.',
    );
  }
  return submission;
}

/**
 * Raises the round's version and time of change and sets what is given. For a state change that must not overtake
 * another, load the round in the same transaction: writes run one after the other.
 */
export async function touchSubmission(
  manager: EntityManager,
  submission: Pick<Submission, 'id'>,
  now: string,
  changes: QueryDeepPartialEntity<Submission> = {},
): Promise<void> {
  await manager.update(Submission, { id: submission.id }, { ...changes, updatedAt: now });
}
