import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import type { z } from 'zod';
import type { decideCharacteristicRequest, DecisionsResponse } from '@trammel/shared/submission-review';
import { appendAudit } from '../../database/append-audit.ts';
import { CharacteristicDecision } from '../../database/entities/characteristic-decision.entity.ts';
import { writeStatement } from '../../database/raw.ts';
import { decodeReadings } from '../../evidence/readings-text.ts';
import type { Deed } from '../../http/deed.ts';
import { Invalid, NotFound, Stale } from '../../http/problems.ts';
import { beginReview, openReview } from './open-review.ts';
import { loadScene, type ReviewScene, type SceneRow } from './review-scene.ts';
import { presentDecision } from './submission-review.presenter.ts';
import { refusalOfMark } from './submission-review.rules.ts';

type Decide = z.output<typeof decideCharacteristicRequest>;

export function decideCharacteristic(
  deed: Deed,
  key: { submissionId: string; characteristicId: string },
  version: number,
  command: Decide,
): Promise<DecisionsResponse> {
  return deed.transact(async (manager) => {
    const submission = await openReview(manager, deed, key.submissionId);
    const scene = await loadScene(manager, (sql) => writeStatement(manager, sql), submission);
    const row = scene.rows.find((candidate) => candidate.facts.id === key.characteristicId);
    if (!row) throw new NotFound();
    if ((row.decision?.version ?? 0) !== version) {
      throw new Stale(
        presentDecision(row.decision, 'customer'),
        'A colleague marked this row since you opened it.',
      );
    }
    const refusal = refusalOfMark(markedRow(scene, row), command);
    if (refusal) throw new Invalid([refusal]);
    const decision = await writeDecision(manager, deed, submission.id, row, command);
    await beginReview(manager, deed, submission);
    appendAudit(manager, deed, {
      action: 'characteristic.marked',
      objectType: 'submission',
      objectId: submission.id,
      summary: `Balloon ${row.facts.balloon} of ${submission.partNumber}: ${command.mark ?? 'mark taken back'}`,
      before: row.decision && {
        mark: row.decision.mark,
        remark: row.decision.remark,
        internalRemark: row.decision.internalRemark,
        deviationId: row.decision.deviationId,
      },
      after: { balloon: row.facts.balloon, ...command },
    });
    const open = scene.rows.filter(
      (other) => other !== row && (other.decision?.mark ?? null) === null,
    ).length;
    return {
      decisions: [{ characteristicId: row.facts.id, decision: presentDecision(decision, 'customer') }],
      remaining: open + (command.mark === null ? 1 : 0),
    };
  });
}

/** Accepts many rows at once. Every one must be clean: otherwise all are left and each that is not is named. */
export function acceptCleanRows(
  deed: Deed,
  submissionId: string,
  characteristicIds: readonly string[],
): Promise<DecisionsResponse> {
  return deed.transact(async (manager) => {
    const submission = await openReview(manager, deed, submissionId);
    const scene = await loadScene(manager, (sql) => writeStatement(manager, sql), submission);
    const byId = new Map(scene.rows.map((row) => [row.facts.id, row]));
    const asked = characteristicIds.map((id) => byId.get(id));
    const faults = asked.flatMap((row, index) => {
      if (!row)
        return [
          {
            pointer: `/characteristicIds/${index}`,
            detail: 'There is no such characteristic in this package.',
          },
        ];
      return row.clean
        ? []
        : [
            {
              pointer: `/characteristicIds/${index}`,
              detail: `Balloon ${row.facts.balloon} needs to be looked at by itself.`,
            },
          ];
    });
    if (faults.length > 0) throw new Invalid(faults);
    const decisions: DecisionsResponse['decisions'] = [];
    for (const row of asked) {
      if (!row || (row.decision?.mark ?? null) !== null) continue;
      const decision = await writeDecision(manager, deed, submission.id, row, {
        mark: 'accepted',
        remark: row.decision?.remark ?? '',
        internalRemark: row.decision?.internalRemark ?? '',
        deviationId: null,
      });
      decisions.push({ characteristicId: row.facts.id, decision: presentDecision(decision, 'customer') });
    }
    await beginReview(manager, deed, submission);
    appendAudit(manager, deed, {
      action: 'characteristics.accepted',
      objectType: 'submission',
      objectId: submission.id,
      summary: `${decisions.length} clean rows of ${submission.partNumber} accepted together`,
      after: { balloons: asked.map((row) => row?.facts.balloon) },
    });
    const accepted = new Set(decisions.map((entry) => entry.characteristicId));
    const remaining = scene.rows.filter(
      (row) => (row.decision?.mark ?? null) === null && !accepted.has(row.facts.id),
    ).length;
    return { decisions, remaining };
  });
}

async function writeDecision(
  manager: EntityManager,
  deed: Deed,
  submissionId: string,
  row: SceneRow,
  command: Decide,
): Promise<CharacteristicDecision> {
  const values = {
    ...command,
    decidedById: deed.actor.userId,
    decidedByName: deed.actor.name,
    decidedAt: deed.now,
  };
  const before = row.decision;
  if (before) {
    const { affected } = await manager.update(
      CharacteristicDecision,
      { id: before.id, version: before.version },
      values,
    );
    if (affected !== 1) throw new Stale(presentDecision(before, 'customer'));
    return { ...before, ...values, version: before.version + 1 };
  }
  const decision = manager.create(CharacteristicDecision, {
    id: randomUUID(),
    submissionId,
    characteristicId: row.facts.id,
    ...values,
    version: 1,
  });
  await manager.insert(CharacteristicDecision, decision);
  return decision;
}

function markedRow(scene: ReviewScene, row: SceneRow) {
  const open = new Set(scene.streams.filter((stream) => !stream.blocked).map((stream) => stream.id));
  const streams = row.results
    .filter((result) => open.has(result.streamId))
    .map((result) => ({
      id: result.streamId,
      texts: decodeReadings(result.readings),
      marks: result.marks,
      out: result.verdict === 'out-of-tolerance',
    }));
  return { facts: row.facts, verdict: row.verdict, deviations: row.deviations, streams };
}
