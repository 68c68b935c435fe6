import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import type { z } from 'zod';
import type {
  askDeviationRequest,
  decideDeviationRequest,
  DeviationResponse,
} from '@trammel/shared/deviations';
import { appendAudit } from '../../database/append-audit.ts';
import { Deviation } from '../../database/entities/deviation.entity.ts';
import { Submission } from '../../database/entities/submission.entity.ts';
import { readStatement, writeStatement } from '../../database/raw.ts';
import {
  characteristicsOf,
  streamsOf,
  type Characteristics,
  type Prepare,
} from '../../evidence/package-context.ts';
import { storedRowColumns, type StoredRow } from '../../evidence/stored-row.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, Invalid, NotFound, type FieldError } from '../../http/problems.ts';
import { updateVersioned } from '../../http/versions.ts';
import {
  findSubmissionForActor,
  requireOpenForSupplier,
  type FoundSubmission,
} from '../submissions/submissions.queries.ts';
import { mailCustomer, mailSupplier } from './deviation-mails.ts';
import { findDeviations } from './deviations.queries.ts';
import { presentDeviation, type DeviationScene } from '../../evidence/deviation-presenter.ts';
import { rangeFaults } from './deviations.rules.ts';

type Asked = z.output<typeof askDeviationRequest>;

export async function listDeviations(deed: Deed, submissionId: string): Promise<DeviationResponse[]> {
  const { manager } = deed.reader;
  const found = await findSubmissionForActor(manager, deed.actor, submissionId);
  const scene = sceneOf((sql) => readStatement(deed.reader, sql), found);
  const deviations = await findDeviations(manager, submissionId);
  const visible =
    found.side === 'supplier' ? deviations : deviations.filter((deviation) => deviation.state !== 'draft');
  return visible.map((deviation) => presentDeviation(deviation, scene, deed.actor));
}

/** Asks the customer for a deviation; it is sent at once, so that it can be decided before the package comes. */
export function askDeviation(deed: Deed, submissionId: string, asked: Asked): Promise<DeviationResponse> {
  return deed.transact(async (manager) => {
    const found = await findSubmissionForActor(manager, deed.actor, submissionId);
    const submission = requireOpenForSupplier(found);
    const scene = sceneOf((sql) => writeStatement(manager, sql), found);
    assertAskable(manager, submission, scene.characteristics, asked);
    const others = await findDeviations(manager, submissionId);
    const deviation = manager.create(Deviation, {
      id: randomUUID(),
      number: Math.max(0, ...others.map((other) => other.number)) + 1,
      submissionId,
      ...asked,
      state: 'sent',
      askedById: deed.actor.userId,
      askedByName: deed.actor.name,
      askedAt: deed.now,
      decidedById: null,
      decidedByName: null,
      decidedAt: null,
      decisionNote: null,
      version: 1,
    });
    await manager.insert(Deviation, deviation);
    await countOpen(manager, submissionId);
    const balloon = scene.characteristics.byId.get(asked.characteristicId)?.balloon ?? '';
    appendAudit(manager, deed, {
      action: 'deviation.asked',
      objectType: 'deviation',
      objectId: deviation.id,
      summary: `Deviation ${deviation.number} asked for balloon ${balloon} of ${submission.partNumber}`,
      after: asked,
    });
    await mailCustomer(manager, deed, submission, deviation.number, balloon);
    return presentDeviation(deviation, scene, deed.actor);
  });
}

export function changeDeviation(
  deed: Deed,
  deviationId: string,
  version: number,
  asked: Asked,
): Promise<DeviationResponse> {
  return deed.transact(async (manager) => {
    const { deviation, found } = await findForActor(manager, deed, deviationId);
    const submission = requireOpenForSupplier(found);
    assertPending(deviation);
    const scene = sceneOf((sql) => writeStatement(manager, sql), found);
    assertAskable(manager, submission, scene.characteristics, asked);
    const present = (current: Deviation) => presentDeviation(current, scene, deed.actor);
    await updateVersioned(manager, Deviation, { id: deviation.id, version }, asked, present);
    appendAudit(manager, deed, {
      action: 'deviation.changed',
      objectType: 'deviation',
      objectId: deviation.id,
      summary: `Deviation ${deviation.number} of ${submission.partNumber} changed`,
      before: termsOf(deviation),
      after: asked,
    });
    return present(await manager.findOneByOrFail(Deviation, { id: deviation.id }));
  });
}

export function withdrawDeviation(
  deed: Deed,
  deviationId: string,
  version: number,
): Promise<DeviationResponse> {
  return deed.transact(async (manager) => {
    const { deviation, found } = await findForActor(manager, deed, deviationId);
    const submission = requireOpenForSupplier(found);
    assertPending(deviation);
    const scene = sceneOf((sql) => writeStatement(manager, sql), found);
    const present = (current: Deviation) => presentDeviation(current, scene, deed.actor);
    await updateVersioned(manager, Deviation, { id: deviation.id, version }, { state: 'withdrawn' }, present);
    await countOpen(manager, submission.id);
    appendAudit(manager, deed, {
      action: 'deviation.withdrawn',
      objectType: 'deviation',
      objectId: deviation.id,
      summary: `Deviation ${deviation.number} of ${submission.partNumber} withdrawn`,
      before: { state: deviation.state },
      after: { state: 'withdrawn' },
    });
    return present(await manager.findOneByOrFail(Deviation, { id: deviation.id }));
  });
}

export function decideDeviation(
  deed: Deed,
  deviationId: string,
  version: number,
  command: z.output<typeof decideDeviationRequest>,
): Promise<DeviationResponse> {
  return deed.transact(async (manager) => {
    const { deviation, found } = await findForActor(manager, deed, deviationId);
    if (found.side !== 'customer') throw new NotFound();
    if (deviation.state !== 'sent')
      throw new Conflict(`This deviation request is ${deviation.state} and cannot be decided.`);
    if (found.submission.decidedAt !== null)
      throw new Conflict('The round is decided; its deviations stay as they are.');
    const scene = sceneOf((sql) => writeStatement(manager, sql), found);
    const present = (current: Deviation) => presentDeviation(current, scene, deed.actor);
    await updateVersioned(
      manager,
      Deviation,
      { id: deviation.id, version },
      {
        state: command.decision,
        decisionNote: command.note,
        decidedById: deed.actor.userId,
        decidedByName: deed.actor.name,
        decidedAt: deed.now,
      },
      present,
    );
    await countOpen(manager, deviation.submissionId);
    appendAudit(manager, deed, {
      action: `deviation.${command.decision}`,
      objectType: 'deviation',
      objectId: deviation.id,
      summary: `Deviation ${deviation.number} of ${found.submission.partNumber} ${command.decision}`,
      before: { state: deviation.state },
      after: command,
    });
    await mailSupplier(manager, deed, found.submission, deviation, command.decision);
    return present(await manager.findOneByOrFail(Deviation, { id: deviation.id }));
  });
}

async function findForActor(
  manager: EntityManager,
  deed: Deed,
  id: string,
): Promise<{ deviation: Deviation; found: FoundSubmission }> {
  const deviation = await manager.findOneBy(Deviation, { id });
  if (!deviation) throw new NotFound();
  return { deviation, found: await findSubmissionForActor(manager, deed.actor, deviation.submissionId) };
}

function sceneOf(prepare: Prepare, found: FoundSubmission): DeviationScene {
  const { submission, side, evidenceVisible } = found;
  const rows = evidenceVisible
    ? (prepare(
        `SELECT ${storedRowColumns} FROM characteristic_results WHERE submission_id = ? AND out_count > 0`,
      ).all(submission.id) as StoredRow[])
    : [];
  return { submission, side, characteristics: characteristicsOf(prepare, submission.revisionId), rows };
}

function assertPending(deviation: Deviation): void {
  if (deviation.state !== 'sent' && deviation.state !== 'draft') {
    throw new Conflict(`This deviation request is ${deviation.state}; ask for a new one.`);
  }
}

function assertAskable(
  manager: EntityManager,
  submission: Submission,
  characteristics: Characteristics,
  asked: Asked,
): void {
  const facts = characteristics.byId.get(asked.characteristicId);
  if (!facts) throw new NotFound();
  const streams = new Set(
    streamsOf((sql) => writeStatement(manager, sql), submission.id).map((stream) => stream.id),
  );
  const faults: FieldError[] = rangeFaults(asked, facts);
  asked.streamIds.forEach((streamId, index) => {
    if (!streams.has(streamId))
      faults.push({ pointer: `/streamIds/${index}`, detail: 'There is no such stream in this package.' });
  });
  if (faults.length > 0) throw new Invalid(faults);
}

function termsOf(deviation: Deviation) {
  const { rangeLower, rangeUpper, cause, risk, containment, correctiveAction, quantity, untilOn, streamIds } =
    deviation;
  return { rangeLower, rangeUpper, cause, risk, containment, correctiveAction, quantity, untilOn, streamIds };
}

async function countOpen(manager: EntityManager, submissionId: string): Promise<void> {
  const deviationsOpen = await manager.countBy(Deviation, { submissionId, state: 'sent' });
  await manager.update(Submission, { id: submissionId }, { deviationsOpen });
}
