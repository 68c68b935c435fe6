import { randomUUID } from 'node:crypto';
import type { PieceResponse, StreamResponse } from '@trammel/shared/measurements';
import type { SubmissionPiecesResponse } from '@trammel/shared/submissions';
import type { EntityManager } from 'typeorm';
import { appendAudit } from '../../database/append-audit.ts';
import { SamplePiece } from '../../database/entities/sample-piece.entity.ts';
import { SubmissionStream } from '../../database/entities/submission-stream.entity.ts';
import type { Submission } from '../../database/entities/submission.entity.ts';
import { writeStatement } from '../../database/raw.ts';
import { changeEvidence } from '../../evidence/refresh-findings.ts';
import { clearSlot, recountRows } from '../../evidence/write-readings.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, Invalid, invalidField, NotFound, type FieldError } from '../../http/problems.ts';
import { assertVersion, updateVersioned } from '../../http/versions.ts';
import { findPiece, findPieces, findStreams, findSubmissionOfPiece, piecesUsed } from './pieces.queries.ts';
import {
  findSubmissionForActor,
  requireEvidence,
  requireOpenForSupplier,
  touchSubmission,
} from './submissions.queries.ts';
import { abilitiesOn, nextSlot } from './submissions.rules.ts';

interface PieceFields {
  readonly label: string;
  readonly streamId: string;
  readonly madeOn: string | null;
  readonly lot: string;
}

const mostPiecesInStream = 300;

export async function readPieces(deed: Deed, submissionId: string): Promise<SubmissionPiecesResponse> {
  const { manager } = deed.reader;
  const found = await findSubmissionForActor(manager, deed.actor, submissionId);
  requireEvidence(found);
  return {
    streams: await findStreams(manager, submissionId),
    pieces: await findPieces(manager, submissionId),
    editable: abilitiesOn(deed.actor, found.side, found.submission).measure,
  };
}

/** Takes a stream out of the package, or back in. A blocked stream stays on record with its reason (R23). */
export function blockStream(
  deed: Deed,
  submissionId: string,
  streamId: string,
  version: number,
  change: { blocked: boolean; reason: string },
): Promise<StreamResponse> {
  return changeEvidence(deed, async (manager: EntityManager) => {
    const found = await findSubmissionForActor(manager, deed.actor, submissionId);
    const submission = requireOpenForSupplier(found);
    const streams = await findStreams(manager, submissionId);
    const stream = streams.find(({ id }) => id === streamId);
    if (!stream) throw new NotFound();
    assertVersion(stream, version, () => stream);
    if (change.blocked && change.reason === '') {
      throw invalidField('/reason', 'Say why this stream is blocked; the customer reads it on the warrant.');
    }
    if (change.blocked && streams.every(({ id, blocked }) => blocked || id === streamId)) {
      throw new Conflict('One stream must stay in the package; this is the last one that is not blocked.');
    }
    await updateVersioned(
      manager,
      SubmissionStream,
      { id: streamId, version },
      { blocked: change.blocked, blockedReason: change.blocked ? change.reason : '' },
      () => stream,
    );
    recountRows(manager, submissionId);
    await touchSubmission(manager, submission, deed.now);
    appendAudit(manager, deed, {
      action: change.blocked ? 'stream.blocked' : 'stream.unblocked',
      objectType: 'submission',
      objectId: submissionId,
      summary: change.blocked ? `Blocked ${stream.name}: ${change.reason}` : `Unblocked ${stream.name}`,
      before: { blocked: stream.blocked, reason: stream.blockedReason },
      after: change,
    });
    const after = (await findStreams(manager, submissionId)).find(({ id }) => id === streamId);
    if (!after) throw new NotFound();
    return { submissionId, answer: after };
  });
}

export function addPieces(
  deed: Deed,
  submissionId: string,
  pieces: readonly PieceFields[],
): Promise<SubmissionPiecesResponse> {
  return changeEvidence(deed, async (manager: EntityManager) => {
    const found = await findSubmissionForActor(manager, deed.actor, submissionId);
    const submission = requireOpenForSupplier(found);
    const streams = await findStreams(manager, submissionId);
    const used = await piecesUsed(manager, submissionId);
    const slots = new Map<string, number[]>(streams.map(({ id }) => [id, []]));
    for (const piece of used) slots.get(piece.streamId)?.push(piece.slot);
    const labels = new Set(used.map(({ label }) => label));
    const faults: FieldError[] = [];
    const insert = writeStatement(
      manager,
      `INSERT INTO sample_pieces (id, submission_id, stream_id, slot, label, made_on, lot, version)
       VALUES (?, ?, ?, ?, ?, ?, ?, 1)`,
    );
    pieces.forEach((piece, index) => {
      const taken = slots.get(piece.streamId);
      if (!taken) {
        faults.push({ pointer: `/pieces/${index}/streamId`, detail: 'Choose a stream of this package.' });
        return;
      }
      if (taken.length >= mostPiecesInStream) {
        const detail = `A stream takes at most ${mostPiecesInStream} pieces.`;
        faults.push({ pointer: `/pieces/${index}/streamId`, detail });
        return;
      }
      if (labels.has(piece.label)) {
        faults.push({ pointer: `/pieces/${index}/label`, detail: labelTaken(piece.label) });
        return;
      }
      labels.add(piece.label);
      const slot = nextSlot(taken);
      taken.push(slot);
      insert.run(randomUUID(), submissionId, piece.streamId, slot, piece.label, piece.madeOn, piece.lot);
    });
    if (faults.length > 0) throw new Invalid(faults);
    await touchSubmission(manager, submission, deed.now);
    appendAudit(manager, deed, {
      action: 'pieces.added',
      objectType: 'submission',
      objectId: submissionId,
      summary: pieces.length === 1 ? 'Added 1 sample piece' : `Added ${pieces.length} sample pieces`,
      after: pieces.slice(0, 50),
    });
    const answer = { streams, pieces: await findPieces(manager, submissionId), editable: true };
    return { submissionId, answer };
  });
}

export function changePiece(
  deed: Deed,
  pieceId: string,
  version: number,
  change: PieceFields,
): Promise<PieceResponse> {
  return changeEvidence(deed, async (manager: EntityManager) => {
    const found = await findSubmissionOfPiece(manager, deed.actor, pieceId);
    const submission = requireOpenForSupplier(found);
    const before = await findPiece(manager, pieceId);
    assertVersion(before, version, () => before);
    if (change.streamId !== before.streamId) {
      throw invalidField('/streamId', 'A piece stays in its stream; remove it and add it to the other one.');
    }
    const other = (await piecesUsed(manager, submission.id)).find(({ label }) => label === change.label);
    if (other && other.id !== pieceId) throw invalidField('/label', labelTaken(change.label));
    const { label, madeOn, lot } = change;
    await updateVersioned(
      manager,
      SamplePiece,
      { id: pieceId, version },
      { label, madeOn, lot },
      () => before,
    );
    await touchSubmission(manager, submission, deed.now);
    appendAudit(manager, deed, {
      action: 'piece.changed',
      objectType: 'submission',
      objectId: submission.id,
      summary: `Changed sample piece ${before.label}`,
      before: { label: before.label, madeOn: before.madeOn, lot: before.lot },
      after: { label, madeOn, lot },
    });
    return { submissionId: submission.id, answer: await findPiece(manager, pieceId) };
  });
}

/** Removes a piece with its readings, which are asked about first, and judges the rows of its stream again. */
export function removePiece(deed: Deed, pieceId: string, confirmed: boolean): Promise<void> {
  return changeEvidence(deed, async (manager: EntityManager) => {
    const found = await findSubmissionOfPiece(manager, deed.actor, pieceId);
    const submission = requireOpenForSupplier(found);
    const piece = await manager.findOneByOrFail(SamplePiece, { id: pieceId });
    const cleared = clearReadings(manager, deed, submission, piece);
    if (cleared > 0 && !confirmed) {
      const readings = cleared === 1 ? 'a reading' : `${cleared} readings`;
      throw new Conflict(
        `Piece ${piece.label} bears ${readings}, which would go with it. Repeat with confirm=readings to remove both.`,
      );
    }
    await manager.delete(SamplePiece, { id: pieceId });
    await touchSubmission(manager, submission, deed.now);
    appendAudit(manager, deed, {
      action: 'piece.removed',
      objectType: 'submission',
      objectId: submission.id,
      summary: `Removed sample piece ${piece.label} with ${cleared} readings`,
      before: { label: piece.label, streamId: piece.streamId, madeOn: piece.madeOn, lot: piece.lot },
    });
    return { submissionId: submission.id, answer: undefined };
  });
}

function clearReadings(
  manager: EntityManager,
  deed: Deed,
  submission: Submission,
  piece: SamplePiece,
): number {
  const scope = {
    submissionId: submission.id,
    requestId: submission.requestId,
    revisionId: submission.revisionId,
    userId: deed.actor.userId,
    now: deed.now,
  };
  return clearSlot(manager, scope, piece.streamId, piece.slot);
}

function labelTaken(label: string): string {
  return `There is already a piece ${label} in this package.`;
}
