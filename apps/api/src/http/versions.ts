import type { EntityManager, EntityTarget, FindOptionsWhere, ObjectLiteral } from 'typeorm';
import type { QueryDeepPartialEntity } from 'typeorm/query-builder/QueryPartialEntity.js';
import { Malformed, NotFound, Stale, VersionRequired } from './problems.ts';

interface Versioned extends ObjectLiteral {
  id: string;
  version: number;
}

export function etagOf(version: number): string {
  return `"${version}"`;
}

/** The version in If-Match. Weak tags and lists are refused: the comparison must be strong and mean one version. */
export function requireVersion(ifMatch: string | undefined): number {
  if (ifMatch === undefined || ifMatch.trim() === '') throw new VersionRequired();
  const match = /^"(\d{1,15})"$/.exec(ifMatch.trim());
  if (!match) throw new Malformed('If-Match takes one version in quotes, such as "3".');
  return Number(match[1]);
}

/** Refuses early, before other rules speak, when the row read in this transaction is not the one the person saw. */
export function assertVersion(row: { version: number }, expected: number, present: () => unknown): void {
  if (row.version !== expected) throw new Stale(present());
}

/**
 * Changes a row only if it still has the version that was read, and raises the version. `save()` would write a stale
 * entity back without a word. `present` turns the row as it stands into what the 412 shows.
 */
export async function updateVersioned<E extends Versioned>(
  manager: EntityManager,
  entity: EntityTarget<E>,
  expected: { id: string; version: number },
  changes: QueryDeepPartialEntity<E>,
  present: (current: E) => unknown = (current) => ({ version: current.version }),
): Promise<number> {
  const where = { id: expected.id, version: expected.version } as FindOptionsWhere<E>;
  const result = await manager.update(entity, where, changes);
  if (result.affected === 1) return expected.version + 1;
  const current = await manager.findOneBy(entity, { id: expected.id } as FindOptionsWhere<E>);
  if (!current) throw new NotFound();
  throw new Stale(present(current));
}
