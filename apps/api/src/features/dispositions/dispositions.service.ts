import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import type { z } from 'zod';
import type {
  changeConditionRequest,
  DispositionDraftResponse,
  DispositionResponse,
  signDispositionRequest,
} from '@trammel/shared/dispositions';
import { openForReview } from '@trammel/shared/status';
import { appendAudit } from '../../database/append-audit.ts';
import { canonicalJson, sha256Hex } from '../../database/canonical-json.ts';
import { Disposition } from '../../database/entities/disposition.entity.ts';
import { InterimCondition } from '../../database/entities/interim-condition.entity.ts';
import { Submission } from '../../database/entities/submission.entity.ts';
import { readStatement, writeStatement } from '../../database/raw.ts';
import { meanings, safetyCaution } from '../../evidence/declaration.ts';
import { seal, signingRole } from '../../evidence/seal.ts';
import type { Signer } from '../../evidence/signing.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, Forbidden, Invalid, NotFound, Stale } from '../../http/problems.ts';
import { updateVersioned } from '../../http/versions.ts';
import { findSubmissionForActor } from '../submissions/submissions.queries.ts';
import { loadDecisionScene } from './decision-scene.ts';
import { mailDecision } from './decision-mails.ts';
import { presentDisposition } from './dispositions.presenter.ts';
import {
  countMarks,
  factFaults,
  outcomeBlocked,
  outcomeBlockers,
  statements,
  type Asked,
} from './dispositions.rules.ts';
import { recordDecision } from './supply-line.ts';

export async function draftDisposition(deed: Deed, submissionId: string): Promise<DispositionDraftResponse> {
  const { manager } = deed.reader;
  const submission = await openForDecision(manager, deed, submissionId);
  const { state, digest } = await loadDecisionScene(
    manager,
    (sql) => readStatement(deed.reader, sql),
    submission,
  );
  const safety = state.rows.filter((row) => row.class === 'safety-regulatory').map((row) => row.balloon);
  return {
    submissionId,
    digest,
    blockers: outcomeBlockers(state),
    counts: countMarks(state),
    streamsCovered: [...state.streamsCovered],
    statement: statements(nameOf(submission), state.streamsCovered, safety.length > 0),
    caution: safetyCaution(safety),
    version: submission.version,
  };
}

/** The customer's decision: sealed, signed, carried to purchasing and mailed in one transaction. */
export async function signDisposition(
  deed: Deed,
  signer: Signer,
  submissionId: string,
  command: z.output<typeof signDispositionRequest>,
): Promise<DispositionResponse> {
  const { password, digest: seen, ...asked } = command;
  await deed.confirmPassword(password);
  return deed.transact(async (manager) => {
    const submission = await openForDecision(manager, deed, submissionId);
    const scene = await loadDecisionScene(manager, (sql) => writeStatement(manager, sql), submission);
    if (scene.digest !== seen) {
      throw new Stale(
        { digest: scene.digest },
        'Marks or deviations changed since this page was opened. Read them again before signing.',
      );
    }
    const blocked = outcomeBlocked(outcomeBlockers(scene.state), asked.outcome);
    if (blocked !== null) throw new Conflict(blocked);
    const faults = factFaults(asked, scene.state, deed.now.slice(0, 10));
    if (faults.length > 0) throw new Invalid(faults);
    const disposition = await writeDisposition(manager, deed, submission, asked, scene.state.streamsCovered);
    const safety = scene.state.rows.some((row) => row.class === 'safety-regulatory');
    const statement = statements(nameOf(submission), scene.state.streamsCovered, safety)[asked.outcome];
    const canonical = canonicalJson({ ...scene.content, disposition: asked, statement });
    const auditHead = appendAudit(manager, deed, {
      action: `package.${asked.outcome}`,
      objectType: 'submission',
      objectId: submissionId,
      summary: `${nameOf(submission)}, round ${submission.round}: disposition signed, ${asked.outcome}`,
      before: { state: submission.state },
      after: { ...asked, digest: sha256Hex(canonical) },
    });
    await seal(manager, deed, signer, {
      submissionId,
      stage: 'disposition',
      meaning: meanings[asked.outcome],
      statement,
      role: signingRole(deed.actor, 'Approver of the customer'),
      canonical,
      digest: sha256Hex(canonical),
      auditHead,
    });
    await manager.update(
      Submission,
      { id: submissionId },
      {
        state: asked.outcome,
        desk: asked.outcome === 'approved' ? 'closed' : 'supplier',
        isOpen: asked.outcome !== 'approved',
        decidedAt: deed.now,
        decidedById: deed.actor.userId,
        updatedAt: deed.now,
      },
    );
    if (asked.outcome === 'approved' || asked.outcome === 'interim-approval')
      await supersedeEarlier(manager, deed, submission);
    await recordDecision(manager, deed.now, submission, asked);
    await mailDecision(manager, deed, submission, asked);
    return presentDisposition(manager, submission, disposition, deed.now.slice(0, 10));
  });
}

export async function readDisposition(deed: Deed, submissionId: string): Promise<DispositionResponse> {
  const { manager } = deed.reader;
  const { submission } = await findSubmissionForActor(manager, deed.actor, submissionId);
  const disposition = await manager.findOneBy(Disposition, { submissionId });
  if (!disposition) throw new NotFound();
  return presentDisposition(manager, submission, disposition, deed.now.slice(0, 10));
}

/** Either side reports evidence; only the customer verifies. */
export function changeCondition(
  deed: Deed,
  conditionId: string,
  version: number,
  command: z.output<typeof changeConditionRequest>,
): Promise<DispositionResponse> {
  return deed.transact(async (manager) => {
    const condition = await manager.findOneBy(InterimCondition, { id: conditionId });
    if (!condition) throw new NotFound();
    const { submission, side } = await findSubmissionForActor(manager, deed.actor, condition.submissionId);
    if (side === 'supplier' && command.state === 'verified')
      throw new Forbidden('The customer verifies a condition; give the evidence.');
    if (side === 'supplier' && condition.state === 'verified')
      throw new Conflict('This condition is verified.');
    if (command.state === 'evidence-given' && command.evidence === '') {
      throw new Invalid([{ pointer: '/evidence', detail: 'Say what shows that the condition is met.' }]);
    }
    const closed = command.state === 'verified';
    await updateVersioned(
      manager,
      InterimCondition,
      { id: condition.id, version },
      {
        ...command,
        closedByName: closed ? deed.actor.name : null,
        closedAt: closed ? deed.now : null,
      },
    );
    appendAudit(manager, deed, {
      action: 'condition.changed',
      objectType: 'submission',
      objectId: submission.id,
      summary: `Condition of ${nameOf(submission)}: ${command.state}`,
      before: { state: condition.state, evidence: condition.evidence },
      after: command,
    });
    const disposition = await manager.findOneByOrFail(Disposition, { id: condition.dispositionId });
    return presentDisposition(manager, submission, disposition, deed.now.slice(0, 10));
  });
}

const nameOf = (submission: Submission) => `${submission.partNumber} rev ${submission.revisionCode}`;

async function openForDecision(
  manager: EntityManager,
  deed: Deed,
  submissionId: string,
): Promise<Submission> {
  const { submission, side } = await findSubmissionForActor(manager, deed.actor, submissionId);
  if (side !== 'customer') throw new NotFound();
  if (!openForReview.includes(submission.state))
    throw new Conflict(`This round is ${submission.state.replaceAll('-', ' ')} and cannot be decided now.`);
  if (submission.submittedById === deed.actor.userId)
    throw new Forbidden('Nobody decides on what they submitted.');
  return submission;
}

async function writeDisposition(
  manager: EntityManager,
  deed: Deed,
  submission: Submission,
  asked: Asked,
  streamsCovered: readonly string[],
): Promise<Disposition> {
  const { conditions, ...facts } = asked;
  const disposition = manager.create(Disposition, {
    id: randomUUID(),
    submissionId: submission.id,
    ...facts,
    streamsCovered: [...streamsCovered],
    decidedById: deed.actor.userId,
    decidedByName: deed.actor.name,
    decidedAt: deed.now,
  });
  await manager.insert(Disposition, disposition);
  if (conditions.length > 0) {
    await manager.insert(
      InterimCondition,
      conditions.map((condition) => ({
        id: randomUUID(),
        dispositionId: disposition.id,
        submissionId: submission.id,
        ...condition,
        state: 'open' as const,
        evidence: '',
      })),
    );
  }
  return disposition;
}

/** An approval takes the place of the interim approvals before it on the same request. */
async function supersedeEarlier(manager: EntityManager, deed: Deed, submission: Submission): Promise<void> {
  await manager.update(
    Submission,
    { requestId: submission.requestId, state: 'interim-approval', isOpen: false },
    { state: 'superseded', updatedAt: deed.now },
  );
}
