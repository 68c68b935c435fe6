import type { DecisionRule } from '@trammel/shared/requests';
import type { RouteCardRound, SubmissionResponse } from '@trammel/shared/submissions';
import type { EntityManager } from 'typeorm';
import type { Actor } from '../../http/actor.ts';
import { routeCardLine } from './route-card.rules.ts';
import {
  countMarkedRows,
  findCardRounds,
  findHeadNames,
  findSignatures,
  type HeadNames,
  type RoundRow,
} from './submission-head.queries.ts';
import { findSubmissionForActor } from './submissions.queries.ts';
import { abilitiesOn, type Side } from './submissions.rules.ts';

/** The head of a package's page for this person: what it is, where it stands, what may be done. */
export async function presentSubmission(
  manager: EntityManager,
  actor: Actor,
  submissionId: string,
): Promise<SubmissionResponse> {
  const { submission, side, evidenceVisible } = await findSubmissionForActor(manager, actor, submissionId);
  const names = await findHeadNames(manager, submissionId);
  const rounds = await findCardRounds(manager, submission.requestId);
  const signatures = await findSignatures(manager, submissionId);
  // Until it is submitted, the customer learns how far a round is and nothing of what came out.
  const seen = (count: number) => (evidenceVisible ? count : 0);
  return {
    id: submission.id,
    requestId: submission.requestId,
    requestNumber: names.requestNumber,
    round: submission.round,
    state: submission.state,
    side,
    customer: { id: submission.customerId, name: names.customerName },
    supplier: { id: submission.supplierId, name: names.supplierName },
    site: names.siteName,
    part: {
      number: submission.partNumber,
      name: submission.partName,
      material: names.material,
      safetyOrRegulatory: names.safetyOrRegulatory === 1,
    },
    revision: {
      id: submission.revisionId,
      code: submission.revisionCode,
      superseded: names.revisionState === 'superseded',
      drawing: presentDrawing(names),
    },
    reason: names.reason,
    level: names.level,
    unitSystem: names.unitSystem,
    dueOn: submission.dueOn,
    decisionRule: JSON.parse(names.decisionRule) as DecisionRule,
    roundingRule: names.roundingRule,
    streamKind: names.streamKind,
    piecesPerStream: names.piecesPerStream,
    routeCard: rounds.map((round) => presentRound(round, names, side)),
    findings: {
      stops: seen(submission.stops),
      decides: seen(submission.decides),
      informs: seen(submission.informs),
    },
    counts: {
      characteristics: submission.characteristicCount,
      rows: submission.totalRows,
      out: seen(submission.outCount),
      undecided: seen(submission.undecidedCount),
      unmeasured: submission.totalRows - submission.measuredRows,
      special: submission.specialCount,
      marked: await countMarkedRows(manager, submissionId),
    },
    submittedAt: submission.submittedAt,
    decidedAt: submission.decidedAt,
    warrantSignature: signatures.warrant,
    dispositionSignature: signatures.disposition,
    abilities: abilitiesOn(actor, side, submission),
    version: submission.version,
  };
}

function presentDrawing(names: HeadNames): SubmissionResponse['revision']['drawing'] {
  if (names.fileId === null) return null;
  return {
    id: names.fileId,
    name: names.fileName,
    mediaType: names.fileType,
    size: names.fileSize,
    sha256: names.fileSha256,
    uploadedBy: names.fileBy,
    uploadedAt: names.fileAt,
  };
}

function presentRound(round: RoundRow, names: HeadNames, side: Side): RouteCardRound {
  const first = round.round === 1;
  const acknowledged = { who: names.acknowledgedBy, at: names.acknowledgedAt };
  const begun = { who: names.supplierName, at: round.createdAt };
  return routeCardLine({
    submissionId: round.id,
    round: round.round,
    state: round.state,
    customerName: names.customerName,
    supplierName: names.supplierName,
    issued: { who: names.issuedBy, at: names.issuedAt },
    started: first ? (names.acknowledgedAt === null ? null : acknowledged) : begun,
    measured: { done: round.measuredRows, of: round.totalRows },
    evidence: { open: round.openElements },
    checked: { at: round.checkedAt, stops: round.stops },
    warrant: round.submittedAt === null ? null : { who: round.signedBy, at: round.submittedAt },
    review: { startedAt: round.reviewStartedAt },
    decision: round.decidedAt === null ? null : { who: round.decidedBy, at: round.decidedAt },
    resultsVisible: side === 'supplier' || round.submittedAt !== null,
  });
}
