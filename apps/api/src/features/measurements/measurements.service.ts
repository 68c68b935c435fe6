import type { z } from 'zod';
import type { EntityManager } from 'typeorm';
import type {
  changeRowRequest,
  FillRowsRequest,
  RowResult,
  saveReadingsRequest,
  SaveReadingsResponse,
} from '@trammel/shared/measurements';
import { appendAudit } from '../../database/append-audit.ts';
import { Gauge } from '../../database/entities/gauge.entity.ts';
import type { Submission } from '../../database/entities/submission.entity.ts';
import { writeStatement } from '../../database/raw.ts';
import { takesAttribute } from '../../evidence/characteristic-facts.ts';
import { characteristicsOf, piecesOf, type Prepare } from '../../evidence/package-context.ts';
import { presentRow, slotsByStream } from '../../evidence/row-presenter.ts';
import type { WritingScope } from '../../evidence/row-work.ts';
import { storedRowColumns, type StoredRow } from '../../evidence/stored-row.ts';
import { rejudgeRows, writeReadings } from '../../evidence/write-readings.ts';
import type { Deed } from '../../http/deed.ts';
import { invalidField, NotFound, Stale } from '../../http/problems.ts';
import { findSubmissionForActor, requireOpenForSupplier } from '../submissions/submissions.queries.ts';

/** Overwritten values kept word for word in the trail; a larger block is counted. */
const keptInTrail = 500;

export function saveReadings(
  deed: Deed,
  submissionId: string,
  command: z.output<typeof saveReadingsRequest>,
): Promise<SaveReadingsResponse> {
  return deed.transact(async (manager) => {
    const submission = await openSubmission(manager, deed, submissionId);
    const written = writeReadings(manager, scopeOf(deed, submission), command.changes, command.overwrite);
    if (written.changed.length > 0) {
      const balloons = new Set(written.changed.map((cell) => cell.balloon));
      appendAudit(manager, deed, {
        action: 'readings.saved',
        objectType: 'submission',
        objectId: submission.id,
        summary: `${written.changed.length} readings saved on ${balloons.size} characteristics`,
        before: cells(written.changed, 'before'),
        after: cells(written.changed, 'after'),
      });
    }
    const slots = slotsByStream(piecesOf((sql) => writeStatement(manager, sql), submission.id));
    return {
      rows: written.rows.map((row) => presentRow(row, slots)),
      conflicts: written.conflicts,
      refused: written.refused,
    };
  });
}

export interface RowKey {
  readonly submissionId: string;
  readonly characteristicId: string;
  readonly streamId: string;
}

export function changeRow(
  deed: Deed,
  key: RowKey,
  version: number,
  command: z.output<typeof changeRowRequest>,
): Promise<RowResult> {
  return deed.transact(async (manager) => {
    const submission = await openSubmission(manager, deed, key.submissionId);
    const prepare: Prepare = (sql) => writeStatement(manager, sql);
    const facts = characteristicsOf(prepare, submission.revisionId).byId.get(key.characteristicId);
    if (!facts) throw new NotFound();
    assertStream(prepare, submission.id, key.streamId);
    if (command.attribute !== null && !takesAttribute(facts)) {
      throw invalidField(
        '/attribute',
        `Balloon ${facts.balloon} takes readings, not counts. Enter the measured values.`,
      );
    }
    await assertOwnGauge(manager, deed, command.gaugeId, '/gaugeId');
    const slots = slotsByStream(piecesOf(prepare, submission.id));
    const before = storedRow(prepare, key);
    if ((before?.version ?? 0) !== version) throw new Stale(before ? presentRow(before, slots) : null);
    const [row] = rejudgeRows(manager, scopeOf(deed, submission), [key], (stored) => {
      stored.gaugeId = command.gaugeId;
      stored.measuredOn = command.measuredOn;
      stored.note = command.note;
      stored.attributeChecked = command.attribute?.checked ?? null;
      stored.attributeFailed = command.attribute?.failed ?? null;
    });
    if (!row) throw new NotFound();
    appendAudit(manager, deed, {
      action: 'row.changed',
      objectType: 'submission',
      objectId: submission.id,
      summary: `Gauge, date, note or counts of balloon ${facts.balloon} changed`,
      before: before && {
        gaugeId: before.gaugeId,
        measuredOn: before.measuredOn,
        note: before.note,
        checked: before.attributeChecked,
        failed: before.attributeFailed,
      },
      after: { balloon: facts.balloon, ...command },
    });
    return presentRow(row, slots);
  });
}

/** Sets gauge, date or both on many rows at once; what is absent stays. */
export function fillRows(
  deed: Deed,
  submissionId: string,
  command: FillRowsRequest,
): Promise<{ rows: RowResult[] }> {
  return deed.transact(async (manager) => {
    const submission = await openSubmission(manager, deed, submissionId);
    const prepare: Prepare = (sql) => writeStatement(manager, sql);
    await assertOwnGauge(manager, deed, command.gaugeId ?? null, '/gaugeId');
    for (const streamId of new Set(command.rows.map((row) => row.streamId)))
      assertStream(prepare, submission.id, streamId);
    const rows = rejudgeRows(manager, scopeOf(deed, submission), command.rows, (stored) => {
      if (command.gaugeId !== undefined) stored.gaugeId = command.gaugeId;
      if (command.measuredOn !== undefined) stored.measuredOn = command.measuredOn;
    });
    appendAudit(manager, deed, {
      action: 'rows.filled',
      objectType: 'submission',
      objectId: submission.id,
      summary: `Gauge or date set on ${rows.length} rows`,
      after: {
        gaugeId: command.gaugeId,
        measuredOn: command.measuredOn,
        rows: command.rows.slice(0, keptInTrail),
      },
    });
    const slots = slotsByStream(piecesOf(prepare, submission.id));
    return { rows: rows.map((row) => presentRow(row, slots)) };
  });
}

export function scopeOf(deed: Deed, submission: Submission): WritingScope {
  return {
    submissionId: submission.id,
    requestId: submission.requestId,
    revisionId: submission.revisionId,
    userId: deed.actor.userId,
    now: deed.now,
  };
}

async function openSubmission(manager: EntityManager, deed: Deed, id: string): Promise<Submission> {
  return requireOpenForSupplier(await findSubmissionForActor(manager, deed.actor, id));
}

function storedRow(prepare: Prepare, key: RowKey): StoredRow | undefined {
  return prepare(
    `SELECT ${storedRowColumns} FROM characteristic_results WHERE submission_id = ? AND characteristic_id = ? AND stream_id = ?`,
  ).get(key.submissionId, key.characteristicId, key.streamId) as StoredRow | undefined;
}

function assertStream(prepare: Prepare, submissionId: string, streamId: string): void {
  const stream = prepare('SELECT id FROM submission_streams WHERE id = ? AND submission_id = ?').get(
    streamId,
    submissionId,
  );
  if (!stream) throw new NotFound();
}

async function assertOwnGauge(
  manager: EntityManager,
  deed: Deed,
  gaugeId: string | null,
  pointer: string,
): Promise<void> {
  if (gaugeId === null) return;
  const gauge = await manager.findOneBy(Gauge, { id: gaugeId, organisationId: deed.actor.organisationId });
  if (!gauge)
    throw invalidField(pointer, 'There is no such gauge in your register. Choose one from the list.');
}

function cells(
  changed: readonly { balloon: string; piece: string; before: string | null; after: string | null }[],
  side: 'before' | 'after',
) {
  const overwritten = side === 'before' ? changed.filter((cell) => cell.before !== null) : changed;
  return {
    count: overwritten.length,
    cells: overwritten.slice(0, keptInTrail).map((cell) => [cell.balloon, cell.piece, cell[side]]),
  };
}
