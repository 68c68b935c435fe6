import type { DataSource, EntityManager } from 'typeorm';
import { DAY, later } from '../../clock.ts';
import { TableImport } from '../../database/entities/table-import.entity.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, NotFound } from '../../http/problems.ts';

/** Files are held for a day between preview and confirmation. */
export const heldFor = DAY;

/** A held file of this very person; anyone else's does not exist. */
export async function findImport(
  from: DataSource | EntityManager,
  deed: Deed,
  id: string,
  kind: TableImport['kind'],
): Promise<TableImport> {
  const { userId, organisationId } = deed.actor;
  const held = await from.getRepository(TableImport).findOneBy({ id, kind, userId, organisationId });
  if (!held || held.createdAt < later(deed.now, -heldFor)) throw new NotFound();
  return held;
}

export function assertNotConfirmed(held: TableImport): void {
  if (held.confirmedAt !== null)
    throw new Conflict('This import was confirmed already. Send the file again to import it once more.');
}
