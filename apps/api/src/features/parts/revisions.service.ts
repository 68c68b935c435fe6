import { randomUUID } from 'node:crypto';
import type { changeRevisionRequest, createRevisionRequest, RevisionResponse } from '@trammel/shared/parts';
import { Not, type DataSource, type EntityManager } from 'typeorm';
import type { z } from 'zod';
import { appendAudit } from '../../database/append-audit.ts';
import { PartRevision } from '../../database/entities/part-revision.entity.ts';
import { StoredFile } from '../../database/entities/stored-file.entity.ts';
import { writeStatement } from '../../database/raw.ts';
import type { Actor } from '../../http/actor.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, invalidField, NotFound } from '../../http/problems.ts';
import { assertVersion, updateVersioned } from '../../http/versions.ts';
import { findCharacteristics } from '../characteristics/characteristics.queries.ts';
import { presentRevision } from './parts.presenter.ts';
import {
  findNamesOfRevision,
  findPartForActor,
  findRevisionForActor,
  type FoundRevision,
} from './parts.queries.ts';
import { emptyRevision } from './parts.service.ts';
import { releaseBlockers } from './release.rules.ts';

const acceptedDrawings = new Set(['application/pdf', 'image/png', 'image/jpeg']);

export async function answerRevision(
  from: DataSource | EntityManager,
  actor: Actor,
  id: string,
): Promise<RevisionResponse> {
  const found = await findRevisionForActor(from, actor, id);
  const draft = found.revision.state === 'draft';
  const blockers = draft ? releaseBlockers(found.revision, await findCharacteristics(from, id)) : [];
  return presentRevision(found, await findNamesOfRevision(from, found.revision), blockers, actor);
}

/** The next revision: empty, or a copy whose characteristics keep their lineage and so can be compared. */
export function createRevision(
  deed: Deed,
  partId: string,
  command: z.output<typeof createRevisionRequest>,
): Promise<RevisionResponse> {
  return deed.transact(async (manager) => {
    const part = await findPartForActor(manager, deed.actor, partId);
    const others = await manager.findBy(PartRevision, { partId });
    if (others.some((other) => other.code === command.code)) {
      throw invalidField('/code', `This part already has a revision ${command.code}.`);
    }
    const open = others.find((other) => other.state === 'draft');
    if (open)
      throw new Conflict(`Revision ${open.code} is still a draft. Release it before starting another.`);
    const source =
      command.copyFromRevisionId === null
        ? null
        : others.find((other) => other.id === command.copyFromRevisionId);
    if (source === undefined) throw invalidField('/copyFromRevisionId', 'Choose a revision of this part.');
    const revision = {
      ...emptyRevision(part, deed.now),
      ...(source && {
        tolerancingStandard: source.tolerancingStandard,
        roundingRule: source.roundingRule,
        generalTolerance: source.generalTolerance,
        copiedFromId: source.id,
      }),
      id: randomUUID(),
      code: command.code,
      sequence: Math.max(0, ...others.map((other) => other.sequence)) + 1,
    };
    await manager.insert(PartRevision, revision);
    if (source) copyCharacteristics(manager, source.id, revision.id);
    appendAudit(manager, deed, {
      action: 'revision.created',
      objectType: 'revision',
      objectId: revision.id,
      summary: `Revision ${command.code} of part ${part.number} created${source ? ` as a copy of ${source.code}` : ''}`,
      after: command,
    });
    return answerRevision(manager, deed.actor, revision.id);
  });
}

function copyCharacteristics(manager: EntityManager, fromId: string, toId: string): void {
  const rows = writeStatement(manager, 'SELECT id FROM characteristics WHERE revision_id = ?').all(
    fromId,
  ) as { id: string }[];
  const copy = writeStatement(
    manager,
    `INSERT INTO characteristics (id, revision_id, version, lineage_id, sequence, balloon, sheet, zone, description, kind,
       tolerance, geometric, unit, decimals, class, method, attribute_allowed, pieces, controlled_by, note, nominal,
       lower_limit, upper_limit, natural_lower, explanation)
     SELECT ?, ?, 1, lineage_id, sequence, balloon, sheet, zone, description, kind,
       tolerance, geometric, unit, decimals, class, method, attribute_allowed, pieces, controlled_by, note, nominal,
       lower_limit, upper_limit, natural_lower, explanation
     FROM characteristics WHERE id = ?`,
  );
  for (const row of rows) copy.run(randomUUID(), toId, row.id);
}

async function loadDraft(
  manager: EntityManager,
  actor: Actor,
  id: string,
  version: number,
): Promise<FoundRevision> {
  const found = await findRevisionForActor(manager, actor, id);
  if (found.side !== 'owner') throw new NotFound();
  assertDraft(found.revision);
  const current = await answerRevision(manager, actor, id);
  assertVersion(found.revision, version, () => current);
  return found;
}

export function assertDraft(revision: PartRevision): void {
  if (revision.state !== 'draft') {
    throw new Conflict(
      `Revision ${revision.code} is ${revision.state} and no longer changes. Create the next revision to change it.`,
    );
  }
}

export function changeRevision(
  deed: Deed,
  revisionId: string,
  version: number,
  command: z.output<typeof changeRevisionRequest>,
): Promise<RevisionResponse> {
  return deed.transact(async (manager) => {
    const { revision, part } = await loadDraft(manager, deed.actor, revisionId, version);
    if (await manager.existsBy(PartRevision, { partId: part.id, code: command.code, id: Not(revision.id) })) {
      throw invalidField('/code', `This part already has a revision ${command.code}.`);
    }
    if (command.drawingFileId !== null) await assertDrawing(manager, deed.actor, command.drawingFileId);
    await updateVersioned(manager, PartRevision, { id: revision.id, version }, command);
    appendAudit(manager, deed, {
      action: 'revision.changed',
      objectType: 'revision',
      objectId: revision.id,
      summary: `Revision ${command.code} of part ${part.number} changed`,
      before: {
        code: revision.code,
        drawingFileId: revision.drawingFileId,
        drawingDate: revision.drawingDate,
        changeOrder: revision.changeOrder,
      },
      after: command,
    });
    return answerRevision(manager, deed.actor, revision.id);
  });
}

async function assertDrawing(manager: EntityManager, actor: Actor, fileId: string): Promise<void> {
  const file = await manager.findOneBy(StoredFile, {
    id: fileId,
    organisationId: actor.organisationId,
    state: 'stored',
  });
  if (!file) throw invalidField('/drawingFileId', 'This file is not there. Upload the drawing again.');
  if (!acceptedDrawings.has(file.mediaType))
    throw invalidField('/drawingFileId', 'A drawing is a PDF, PNG or JPEG file.');
}

/** Freezes the revision, supersedes the one before, and takes its balloon numbers for good. */
export function releaseRevision(deed: Deed, revisionId: string, version: number): Promise<RevisionResponse> {
  return deed.transact(async (manager) => {
    const { revision, part } = await loadDraft(manager, deed.actor, revisionId, version);
    const rows = await findCharacteristics(manager, revision.id);
    const blockers = releaseBlockers(revision, rows);
    if (blockers.length > 0) {
      const more = blockers.length > 5 ? ` And ${blockers.length - 5} more.` : '';
      throw new Conflict(
        `Revision ${revision.code} cannot be released yet. ${blockers.slice(0, 5).join(' ')}${more}`,
      );
    }
    const before = await manager.findOneBy(PartRevision, { partId: part.id, state: 'released' });
    if (before) await updateVersioned(manager, PartRevision, before, { state: 'superseded' });
    await updateVersioned(
      manager,
      PartRevision,
      { id: revision.id, version },
      {
        state: 'released',
        releasedAt: deed.now,
        releasedById: deed.actor.userId,
      },
    );
    const take = writeStatement(
      manager,
      'INSERT INTO used_balloons (id, part_id, balloon, lineage_id) VALUES (?, ?, ?, ?) ON CONFLICT (part_id, balloon) DO NOTHING',
    );
    for (const row of rows) take.run(randomUUID(), part.id, row.balloon, row.lineageId);
    appendAudit(manager, deed, {
      action: 'revision.released',
      objectType: 'revision',
      objectId: revision.id,
      summary: `Revision ${revision.code} of part ${part.number} released with ${rows.length} characteristics${before ? `; it supersedes ${before.code}` : ''}`,
      after: {
        characteristics: rows.length,
        supersedes: before?.code ?? null,
        drawingFileId: revision.drawingFileId,
      },
    });
    return answerRevision(manager, deed.actor, revision.id);
  });
}
