// Longer than most: the table is written as one piece, so that all of a revision is refused or written at once.
import { randomUUID } from 'node:crypto';
import { isUndetermined, type ToleranceLimits } from '@trammel/metrology/conformance';
import { statedLimits } from '@trammel/metrology/tolerance-notation';
import type { CharacteristicInput } from '@trammel/shared/characteristics';
import type { EntityManager } from 'typeorm';
import { compareBalloons } from './balloon-order.ts';
import { Characteristic } from './entities/characteristic.entity.ts';
import type { PartRevision } from './entities/part-revision.entity.ts';
import { writeStatement } from './raw.ts';

export interface TableChange {
  /** Null for a new row. */
  readonly id: string | null;
  readonly version: number | null;
  readonly input: CharacteristicInput;
}

export interface TableFault {
  /** Place of the row in the changes. */
  readonly row: number;
  /** Field of the characteristic, as a path. */
  readonly field: string;
  readonly detail: string;
}

export type TableOutcome =
  | {
      readonly done: {
        readonly added: number;
        readonly changed: number;
        readonly removed: number;
        readonly before: unknown[];
        readonly after: unknown[];
      };
    }
  | { readonly faults: readonly TableFault[] }
  /** Rows that someone else changed or removed since they were read. */
  | { readonly stale: readonly string[] };

/**
 * Writes a block of rows of a draft revision, all or nothing: the caller turns faults into its answer and throws, so
 * that the transaction is undone. Rows stand in the order of their balloons.
 */
export async function writeCharacteristicTable(
  manager: EntityManager,
  revision: PartRevision,
  changes: readonly TableChange[],
  removed: readonly { readonly id: string; readonly version: number }[],
): Promise<TableOutcome> {
  const existing = new Map(
    (await manager.findBy(Characteristic, { revisionId: revision.id })).map((row) => [row.id, row]),
  );
  const stale = [...removed, ...changes]
    .filter((row): row is typeof row & { id: string } => row.id !== null)
    .filter((row) => existing.get(row.id)?.version !== row.version)
    .map((row) => row.id);
  if (stale.length > 0) return { stale };

  const faults: TableFault[] = [];
  const resolved = changes.map(({ input }, row) => {
    const limits = statedLimits(input.tolerance, input.unit);
    if (isUndetermined(limits)) faults.push({ row, field: 'tolerance', detail: `${limits.reason}.` });
    for (const fault of faultsOfInput(input)) faults.push({ row, ...fault });
    return limits;
  });
  const gone = new Set(removed.map((row) => row.id));
  const reserved = await reservedBalloons(manager, revision.partId);
  const lineages = lineagesOf(changes, existing, gone, reserved);
  faults.push(...balloonFaults(changes, existing, gone, reserved, lineages));
  if (faults.length > 0) return { faults };

  const before: unknown[] = [];
  const after: unknown[] = [];
  for (const { id } of removed) {
    before.push(summaryOf(existing.get(id)));
    writeStatement(manager, 'DELETE FROM characteristics WHERE id = ?').run(id);
  }
  freeBalloons(manager, changes, existing);
  for (const [index, change] of changes.entries()) {
    const limits = resolved[index];
    if (limits === undefined || isUndetermined(limits)) continue;
    if (change.id !== null) before.push(summaryOf(existing.get(change.id)));
    writeRow(manager, revision.id, change, lineages[index] ?? randomUUID(), limits);
    after.push({
      balloon: change.input.balloon,
      description: change.input.description,
      limits: limits.explanation,
    });
  }
  renumber(manager, revision.id);
  const added = changes.filter((change) => change.id === null).length;
  return { done: { added, changed: changes.length - added, removed: removed.length, before, after } };
}

/** What the fields of one row must agree on, whatever stands in other rows. */
export function faultsOfInput(input: CharacteristicInput): { field: string; detail: string }[] {
  const faults: { field: string; detail: string }[] = [];
  const geometric = input.kind === 'geometric';
  if (geometric && input.geometric === null) {
    faults.push({ field: 'geometric', detail: 'Choose which geometric tolerance it is.' });
  }
  if (!geometric && input.geometric !== null) {
    faults.push({ field: 'geometric', detail: 'Only a geometric characteristic has a geometric tolerance.' });
  }
  if (input.geometric?.sizeBalloon === input.balloon) {
    faults.push({
      field: 'geometric/sizeBalloon',
      detail: 'A characteristic cannot take its bonus from itself: name the size row.',
    });
  }
  if (input.controlledBy.includes(input.balloon)) {
    faults.push({
      field: 'controlledBy',
      detail: 'A basic dimension is controlled by another row, not by itself.',
    });
  }
  return faults;
}

interface Reserved {
  readonly lineageId: string;
  readonly description: string | null;
  readonly kind: string | null;
}

/** Numbers given by released revisions of the part, with what they stood for last (R05). */
async function reservedBalloons(manager: EntityManager, partId: string): Promise<Map<string, Reserved>> {
  const rows: (Reserved & { balloon: string })[] = await manager.query(
    `SELECT u.balloon, u.lineage_id AS lineageId, c.description, c.kind FROM used_balloons u
     LEFT JOIN characteristics c ON c.id = (
       SELECT c2.id FROM characteristics c2 JOIN part_revisions r ON r.id = c2.revision_id
       WHERE c2.lineage_id = u.lineage_id AND r.part_id = u.part_id AND r.state <> 'draft'
       ORDER BY r.sequence DESC LIMIT 1)
     WHERE u.part_id = ?`,
    [partId],
  );
  return new Map(rows.map((row) => [row.balloon, row]));
}

/** A row taken out and put back as it was is the same characteristic again. */
function lineagesOf(
  changes: readonly TableChange[],
  existing: ReadonlyMap<string, Characteristic>,
  gone: ReadonlySet<string>,
  reserved: ReadonlyMap<string, Reserved>,
): (string | null)[] {
  const present = new Set(
    [...existing.values()].filter((row) => !gone.has(row.id)).map((row) => row.lineageId),
  );
  return changes.map(({ id, input }) => {
    if (id !== null) return existing.get(id)?.lineageId ?? null;
    const known = reserved.get(input.balloon);
    const same =
      known?.description?.toLowerCase() === input.description.toLowerCase() && known.kind === input.kind;
    return known && same && !present.has(known.lineageId) ? known.lineageId : null;
  });
}

function balloonFaults(
  changes: readonly TableChange[],
  existing: ReadonlyMap<string, Characteristic>,
  gone: ReadonlySet<string>,
  reserved: ReadonlyMap<string, Reserved>,
  lineages: readonly (string | null)[],
): TableFault[] {
  const touched = new Set(changes.map((change) => change.id).filter((id) => id !== null));
  const holder = new Map<string, string>();
  for (const row of existing.values())
    if (!gone.has(row.id) && !touched.has(row.id)) holder.set(row.balloon, row.description);
  const faults: TableFault[] = [];
  for (const [row, { input }] of changes.entries()) {
    const other = holder.get(input.balloon);
    const known = reserved.get(input.balloon);
    if (other !== undefined) {
      faults.push({
        row,
        field: 'balloon',
        detail: `Balloon ${input.balloon} stands twice; the other is "${other}".`,
      });
    } else if (known && known.lineageId !== lineages[row]) {
      const was = known.description === null ? 'another characteristic' : `"${known.description}"`;
      faults.push({
        row,
        field: 'balloon',
        detail: `Balloon ${input.balloon} stood for ${was} in a released revision and is not given again. Take a new number.`,
      });
    }
    holder.set(input.balloon, input.description);
  }
  return faults;
}

/** Two rows may exchange their numbers in one block: they are set aside before the new ones are written. */
function freeBalloons(
  manager: EntityManager,
  changes: readonly TableChange[],
  existing: ReadonlyMap<string, Characteristic>,
): void {
  for (const { id, input } of changes) {
    if (id === null || existing.get(id)?.balloon === input.balloon) continue;
    writeStatement(manager, 'UPDATE characteristics SET balloon = ? WHERE id = ?').run(`~${id}`, id);
  }
}

const columns = `sheet, zone, description, kind, tolerance, geometric, unit, decimals, class, method, attribute_allowed,
  pieces, controlled_by, note, nominal, lower_limit, upper_limit, natural_lower, explanation, balloon`;

function writeRow(
  manager: EntityManager,
  revisionId: string,
  { id, input }: TableChange,
  lineageId: string,
  limits: ToleranceLimits,
): void {
  const values = [
    input.sheet,
    input.zone,
    input.description,
    input.kind,
    JSON.stringify(input.tolerance),
    input.geometric === null ? null : JSON.stringify(input.geometric),
    input.unit,
    input.decimals,
    input.class,
    input.method,
    input.attributeAllowed ? 1 : 0,
    input.pieces,
    JSON.stringify(input.controlledBy),
    input.note,
    limits.nominal,
    limits.lower,
    limits.upper,
    limits.naturalLower === true ? 1 : 0,
    limits.explanation,
    input.balloon,
  ];
  if (id === null) {
    writeStatement(
      manager,
      `INSERT INTO characteristics (${columns}, id, revision_id, lineage_id, sequence, version)
       VALUES (${values.map(() => '?').join(', ')}, ?, ?, ?, 0, 1)`,
    ).run(...values, randomUUID(), revisionId, lineageId);
    return;
  }
  const sets = columns.split(',').map((column) => `${column.trim()} = ?`);
  writeStatement(
    manager,
    `UPDATE characteristics SET ${sets.join(', ')}, version = version + 1 WHERE id = ?`,
  ).run(...values, id);
}

/** The order on the drawing; not a change that anyone made to a row, so versions stay. */
function renumber(manager: EntityManager, revisionId: string): void {
  const rows = writeStatement(
    manager,
    'SELECT id, balloon, sequence FROM characteristics WHERE revision_id = ?',
  ).all(revisionId) as {
    id: string;
    balloon: string;
    sequence: number;
  }[];
  rows.sort((a, b) => compareBalloons(a.balloon, b.balloon));
  for (const [index, row] of rows.entries()) {
    if (row.sequence !== index + 1) {
      writeStatement(manager, 'UPDATE characteristics SET sequence = ? WHERE id = ?').run(index + 1, row.id);
    }
  }
}

const summaryOf = (row: Characteristic | undefined): unknown =>
  row && { balloon: row.balloon, description: row.description, limits: row.explanation };
