import type {
  CharacteristicInput,
  CharacteristicResponse,
  characteristicTableRequest,
  CharacteristicsResponse,
} from '@trammel/shared/characteristics';
import type { EntityManager } from 'typeorm';
import type { z } from 'zod';
import { appendAudit } from '../../database/append-audit.ts';
import {
  writeCharacteristicTable,
  type TableChange,
  type TableFault,
  type TableOutcome,
} from '../../database/characteristic-table.ts';
import { Characteristic } from '../../database/entities/characteristic.entity.ts';
import type { PartRevision } from '../../database/entities/part-revision.entity.ts';
import { writeStatement } from '../../database/raw.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, Invalid, NotFound, Stale } from '../../http/problems.ts';
import { findRevisionForActor } from '../parts/parts.queries.ts';
import { presentCharacteristic } from './characteristics.presenter.ts';
import { findCharacteristics } from './characteristics.queries.ts';

type Removal = { readonly id: string; readonly version: number };

async function loadDraft(manager: EntityManager, deed: Deed, revisionId: string): Promise<PartRevision> {
  const { revision, side } = await findRevisionForActor(manager, deed.actor, revisionId);
  if (side !== 'owner') throw new NotFound();
  if (revision.state !== 'draft') {
    throw new Conflict(
      `Revision ${revision.code} is ${revision.state} and no longer changes. Create the next revision to change it.`,
    );
  }
  return revision;
}

/** Writes the block or throws what the person must be told; `place` turns the row of a fault into its pointer. */
async function write(
  manager: EntityManager,
  deed: Deed,
  revision: PartRevision,
  changes: readonly TableChange[],
  removed: readonly Removal[],
  place: (fault: TableFault) => string,
): Promise<Extract<TableOutcome, { done: unknown }>['done']> {
  const outcome = await writeCharacteristicTable(manager, revision, changes, removed);
  if ('stale' in outcome) {
    const current = await findCharacteristics(manager, revision.id);
    throw new Stale(
      { items: current.map(presentCharacteristic) },
      'Rows of this table were changed by someone else since you opened it.',
    );
  }
  if ('faults' in outcome)
    throw new Invalid(outcome.faults.map((fault) => ({ pointer: place(fault), detail: fault.detail })));
  const { done } = outcome;
  if (done.added + done.changed + done.removed === 0) return done;
  // The version of the revision covers its rows: who releases it has seen them as they are.
  writeStatement(manager, 'UPDATE part_revisions SET version = version + 1 WHERE id = ?').run(revision.id);
  appendAudit(manager, deed, {
    action: 'characteristics.changed',
    objectType: 'revision',
    objectId: revision.id,
    summary: `Characteristics of revision ${revision.code}: ${done.added} added, ${done.changed} changed, ${done.removed} removed`,
    before: done.before,
    after: done.after,
  });
  return done;
}

export function saveTable(
  deed: Deed,
  revisionId: string,
  command: z.output<typeof characteristicTableRequest>,
): Promise<CharacteristicsResponse> {
  return deed.transact(async (manager) => {
    const revision = await loadDraft(manager, deed, revisionId);
    const changes = command.rows.map(({ id, version, ...input }) => ({ id, version, input }));
    await write(
      manager,
      deed,
      revision,
      changes,
      command.removed,
      (fault) => `/rows/${fault.row}/${fault.field}`,
    );
    return { items: (await findCharacteristics(manager, revisionId)).map(presentCharacteristic) };
  });
}

export function addCharacteristic(
  deed: Deed,
  revisionId: string,
  input: CharacteristicInput,
): Promise<CharacteristicResponse> {
  return deed.transact(async (manager) => {
    const revision = await loadDraft(manager, deed, revisionId);
    await write(
      manager,
      deed,
      revision,
      [{ id: null, version: null, input }],
      [],
      (fault) => `/${fault.field}`,
    );
    return presentCharacteristic(
      await manager.findOneByOrFail(Characteristic, { revisionId, balloon: input.balloon }),
    );
  });
}

async function findOfActor(
  manager: EntityManager,
  deed: Deed,
  id: string,
): Promise<{ row: Characteristic; revision: PartRevision }> {
  const row = await manager.findOneBy(Characteristic, { id });
  if (!row) throw new NotFound();
  return { row, revision: await loadDraft(manager, deed, row.revisionId) };
}

export function changeCharacteristic(
  deed: Deed,
  id: string,
  version: number,
  input: CharacteristicInput,
): Promise<CharacteristicResponse> {
  return deed.transact(async (manager) => {
    const { row, revision } = await findOfActor(manager, deed, id);
    if (row.version !== version) throw new Stale(presentCharacteristic(row));
    await write(manager, deed, revision, [{ id, version, input }], [], (fault) => `/${fault.field}`);
    return presentCharacteristic(await manager.findOneByOrFail(Characteristic, { id }));
  });
}

export function removeCharacteristic(deed: Deed, id: string, version: number): Promise<void> {
  return deed.transact(async (manager) => {
    const { row, revision } = await findOfActor(manager, deed, id);
    if (row.version !== version) throw new Stale(presentCharacteristic(row));
    await write(manager, deed, revision, [], [{ id, version }], () => '');
  });
}
