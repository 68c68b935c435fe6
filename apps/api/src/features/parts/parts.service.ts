import { randomUUID } from 'node:crypto';
import type { changePartRequest, createPartRequest, PartResponse } from '@trammel/shared/parts';
import type { EntityManager } from 'typeorm';
import { Not } from 'typeorm';
import type { z } from 'zod';
import { appendAudit } from '../../database/append-audit.ts';
import { PartRevision } from '../../database/entities/part-revision.entity.ts';
import { Part } from '../../database/entities/part.entity.ts';
import type { Deed } from '../../http/deed.ts';
import { invalidField } from '../../http/problems.ts';
import { assertVersion, updateVersioned } from '../../http/versions.ts';
import { presentPart } from './parts.presenter.ts';
import { findPartForActor, findRevisionsOfPart } from './parts.queries.ts';

export async function answerPart(manager: EntityManager, part: Part): Promise<PartResponse> {
  return presentPart(part, await findRevisionsOfPart(manager, part.id));
}

async function assertNumberFree(
  manager: EntityManager,
  organisationId: string,
  number: string,
  except = '',
): Promise<void> {
  if (await manager.existsBy(Part, { organisationId, number, id: Not(except) })) {
    throw invalidField('/number', 'There is already a part with this number.');
  }
}

/** A new part with its first, empty revision. */
export function createPart(deed: Deed, command: z.output<typeof createPartRequest>): Promise<PartResponse> {
  const { firstRevision, ...facts } = command;
  const { organisationId, userId } = deed.actor;
  return deed.transact(async (manager) => {
    await assertNumberFree(manager, organisationId, facts.number);
    const part = manager.create(Part, {
      id: randomUUID(),
      organisationId,
      createdAt: deed.now,
      createdById: userId,
      version: 1,
      ...facts,
    });
    await manager.insert(Part, part);
    await manager.insert(PartRevision, {
      ...emptyRevision(part, deed.now),
      id: randomUUID(),
      code: firstRevision,
      sequence: 1,
    });
    appendAudit(manager, deed, {
      action: 'part.created',
      objectType: 'part',
      objectId: part.id,
      summary: `Part ${part.number} with revision ${firstRevision} created`,
      after: command,
    });
    return answerPart(manager, part);
  });
}

export function emptyRevision(part: Part, now: string) {
  return {
    partId: part.id,
    organisationId: part.organisationId,
    state: 'draft',
    drawingFileId: null,
    drawingDate: null,
    changeOrder: '',
    tolerancingStandard: 'iso',
    roundingRule: 'absolute',
    generalTolerance: '',
    note: '',
    copiedFromId: null,
    createdAt: now,
    releasedAt: null,
    releasedById: null,
  } as const;
}

export function changePart(
  deed: Deed,
  partId: string,
  version: number,
  command: z.output<typeof changePartRequest>,
): Promise<PartResponse> {
  return deed.transact(async (manager) => {
    const part = await findPartForActor(manager, deed.actor, partId);
    const present = await answerPart(manager, part);
    assertVersion(part, version, () => present);
    await assertNumberFree(manager, part.organisationId, command.number, part.id);
    await updateVersioned(manager, Part, { id: part.id, version }, command, () => present);
    appendAudit(manager, deed, {
      action: 'part.changed',
      objectType: 'part',
      objectId: part.id,
      summary: `Part ${command.number} changed`,
      before: { number: part.number, name: part.name, material: part.material, commodity: part.commodity },
      after: command,
    });
    return answerPart(manager, { ...part, ...command, version: version + 1 });
  });
}
