import type { z } from 'zod';
import type { EntityManager } from 'typeorm';
import type { saveWarrantRequest, signWarrantRequest, WarrantResponse } from '@trammel/shared/warrants';
import { openForSupplier } from '@trammel/shared/status';
import { appendAudit } from '../../database/append-audit.ts';
import { Signature } from '../../database/entities/signature.entity.ts';
import { Submission } from '../../database/entities/submission.entity.ts';
import { readStatement, writeStatement } from '../../database/raw.ts';
import { loadCheckInputs, type CheckInputs } from '../../evidence/check-inputs.ts';
import { declaration, meanings, safetyCaution } from '../../evidence/declaration.ts';
import { runCheck } from '../../evidence/run-check.ts';
import { seal, signingRole } from '../../evidence/seal.ts';
import type { Signer } from '../../evidence/signing.ts';
import { storeCheck } from '../../evidence/store-check.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, Stale } from '../../http/problems.ts';
import { updateVersioned } from '../../http/versions.ts';
import { enqueueMail } from '../../mail/outbox.ts';
import { packageReceiptMail, packageSubmittedMail } from '../../mail/templates/packages.ts';
import { mailFactsOfRequest, peopleOfCustomer } from '../notifications/notifications.queries.ts';
import {
  findSubmissionForActor,
  requireEvidence,
  requireOpenForSupplier,
  type FoundSubmission,
} from '../submissions/submissions.queries.ts';
import { presentSignature } from '../../evidence/signature-presenter.ts';
import { safetyBalloons, warrantBlockers, warrantContent, warrantCounts } from './warrants.rules.ts';

export async function readWarrant(deed: Deed, submissionId: string): Promise<WarrantResponse> {
  const { manager } = deed.reader;
  const found = await findSubmissionForActor(manager, deed.actor, submissionId);
  requireEvidence(found);
  const inputs = loadCheckInputs(
    (sql) => readStatement(deed.reader, sql),
    submissionId,
    deed.now.slice(0, 10),
  );
  return present(manager, deed, found, inputs);
}

export function saveWarrant(
  deed: Deed,
  submissionId: string,
  version: number,
  facts: z.output<typeof saveWarrantRequest>,
): Promise<WarrantResponse> {
  return deed.transact(async (manager) => {
    const found = await findSubmissionForActor(manager, deed.actor, submissionId);
    const submission = requireOpenForSupplier(found);
    await updateVersioned(
      manager,
      Submission,
      { id: submission.id, version },
      { warrant: facts, updatedAt: deed.now },
      (current) => ({ version: current.version, facts: current.warrant }),
    );
    appendAudit(manager, deed, {
      action: 'warrant.changed',
      objectType: 'submission',
      objectId: submission.id,
      summary: `Facts on the warrant of ${submission.partNumber} changed`,
      before: submission.warrant,
      after: facts,
    });
    const fresh = await findSubmissionForActor(manager, deed.actor, submissionId);
    return present(manager, deed, fresh, inputsFor(manager, deed, submissionId));
  });
}

/** Signing and submitting are one act: check, seal, signature, state and mails stand or fall together. */
export async function signWarrant(
  deed: Deed,
  signer: Signer,
  submissionId: string,
  command: z.output<typeof signWarrantRequest>,
): Promise<WarrantResponse> {
  await deed.confirmPassword(command.password);
  return deed.transact(async (manager) => {
    const submission = requireOpenForSupplier(
      await findSubmissionForActor(manager, deed.actor, submissionId),
    );
    const inputs = inputsFor(manager, deed, submissionId);
    const check = runCheck(inputs);
    const blockers = warrantBlockers(check, deed.actor.maySign);
    if (blockers.length > 0) throw new Conflict(blockers.join(' '));
    const content = warrantContent(inputs, check);
    if (content.digest !== command.digest) {
      throw new Stale(
        { digest: content.digest },
        'The package changed since this page was opened. Read it again before signing.',
      );
    }
    const stored = await storeCheck(manager, deed, submissionId);
    const auditHead = appendAudit(manager, deed, {
      action: 'package.submitted',
      objectType: 'submission',
      objectId: submissionId,
      summary: `${submission.partNumber} rev ${submission.revisionCode}, round ${submission.round}: warrant signed and package submitted`,
      before: { state: submission.state },
      after: { state: 'submitted', digest: content.digest, check: stored.id },
    });
    await seal(manager, deed, signer, {
      submissionId,
      stage: 'warrant',
      meaning: meanings.warrant,
      statement: declaration,
      role: signingRole(deed.actor, 'Signatory of the supplier'),
      canonical: content.canonical,
      digest: content.digest,
      auditHead,
    });
    await manager.update(
      Submission,
      { id: submissionId },
      {
        state: 'submitted',
        desk: 'customer',
        submittedAt: deed.now,
        submittedById: deed.actor.userId,
        sealedAt: deed.now,
        updatedAt: deed.now,
      },
    );
    await mailSubmitted(manager, deed, submission, content.digest);
    const fresh = await findSubmissionForActor(manager, deed.actor, submissionId);
    return present(manager, deed, fresh, inputs);
  });
}

function inputsFor(manager: EntityManager, deed: Deed, submissionId: string): CheckInputs {
  return loadCheckInputs((sql) => writeStatement(manager, sql), submissionId, deed.now.slice(0, 10));
}

async function present(
  manager: EntityManager,
  deed: Deed,
  found: FoundSubmission,
  inputs: CheckInputs,
): Promise<WarrantResponse> {
  const { submission, side } = found;
  const check = runCheck(inputs);
  const open = side === 'supplier' && openForSupplier.includes(submission.state);
  const signature = await manager.findOneBy(Signature, { submissionId: submission.id, stage: 'warrant' });
  return {
    submissionId: submission.id,
    facts: submission.warrant,
    declaration: signature?.statement ?? declaration,
    streamsCovered: inputs.streams.filter((stream) => !stream.blocked).map((stream) => stream.name),
    streamsBlocked: inputs.streams
      .filter((stream) => stream.blocked)
      .map((stream) => ({ name: stream.name, reason: stream.blockedReason })),
    counts: warrantCounts(inputs, check),
    findings: signature
      ? { stops: submission.stops, decides: submission.decides, informs: submission.informs }
      : check.counts,
    digest: signature?.digest ?? warrantContent(inputs, check).digest,
    caution: safetyCaution(safetyBalloons(inputs)),
    signature: signature && presentSignature(signature),
    abilities: {
      edit: open && deed.actor.permissions.has('measurement:write'),
      sign: open && deed.actor.permissions.has('warrant:sign'),
    },
    blockers: open ? warrantBlockers(check, deed.actor.maySign) : [],
    version: submission.version,
  };
}

async function mailSubmitted(
  manager: EntityManager,
  deed: Deed,
  submission: Submission,
  digest: string,
): Promise<void> {
  const facts = await mailFactsOfRequest(
    manager,
    submission.requestId,
    deed.publicUrl,
    `/submissions/${submission.id}/review`,
  );
  for (const person of await peopleOfCustomer(manager, submission.requestId)) {
    enqueueMail(manager, deed.now, {
      kind: 'package-submitted',
      recipient: person.email,
      ...packageSubmittedMail(person.name, facts, submission.round),
    });
  }
  enqueueMail(manager, deed.now, {
    kind: 'package-receipt',
    recipient: deed.actor.email,
    ...packageReceiptMail(deed.actor.name, facts, { round: submission.round, digest, at: deed.now }),
  });
}
