import type { Page } from '@trammel/shared/pagination';
import type { PartListItem, partListQuery } from '@trammel/shared/parts';
import type { DataSource, EntityManager } from 'typeorm';
import type { z } from 'zod';
import { PartRevision } from '../../database/entities/part-revision.entity.ts';
import { Part } from '../../database/entities/part.entity.ts';
import { readStatement } from '../../database/raw.ts';
import type { Actor } from '../../http/actor.ts';
import { afterPosition, containing, cutPage, decodeCursor, directionOf } from '../../http/keyset.ts';
import { NotFound } from '../../http/problems.ts';

type Executor = DataSource | EntityManager;

/** A part of the person's own organisation. */
export async function findPartForActor(from: Executor, actor: Actor, id: string): Promise<Part> {
  const part = await from.getRepository(Part).findOneBy({ id, organisationId: actor.organisationId });
  if (!part) throw new NotFound();
  return part;
}

export interface FoundRevision {
  readonly revision: PartRevision;
  readonly part: Part;
  readonly side: 'owner' | 'supplier';
}

/** A revision for those who may read it: its owner, and a supplier that was asked for its approval. */
export async function findRevisionForActor(from: Executor, actor: Actor, id: string): Promise<FoundRevision> {
  const revision = await from
    .getRepository(PartRevision)
    .findOne({ where: { id }, relations: { part: true, drawingFile: true } });
  if (!revision) throw new NotFound();
  if (revision.organisationId === actor.organisationId && actor.permissions.has('part:read')) {
    return { revision, part: revision.part, side: 'owner' };
  }
  const asked: unknown[] = await from.query(
    `SELECT 1 FROM requests WHERE supplier_id = ? AND revision_id = ? AND issued_at IS NOT NULL LIMIT 1`,
    [actor.organisationId, id],
  );
  if (asked.length === 0 || !actor.permissions.has('request:read')) throw new NotFound();
  return { revision, part: revision.part, side: 'supplier' };
}

export interface RevisionRow {
  readonly id: string;
  readonly code: string;
  readonly state: PartRevision['state'];
  readonly releasedAt: string | null;
  readonly characteristicCount: number;
  readonly hasDrawing: number;
}

/** Newest first. */
export function findRevisionsOfPart(from: Executor, partId: string): Promise<RevisionRow[]> {
  return from.query(
    `SELECT r.id, r.code, r.state, r.released_at AS releasedAt, r.drawing_file_id IS NOT NULL AS hasDrawing,
       (SELECT count(*) FROM characteristics c WHERE c.revision_id = r.id) AS characteristicCount
     FROM part_revisions r WHERE r.part_id = ? ORDER BY r.sequence DESC`,
    [partId],
  );
}

export interface RevisionNames {
  readonly releasedBy: string | null;
  readonly copiedFromCode: string | null;
  readonly characteristicCount: number;
}

export async function findNamesOfRevision(from: Executor, revision: PartRevision): Promise<RevisionNames> {
  const [row]: RevisionNames[] = await from.query(
    `SELECT (SELECT name FROM users WHERE id = r.released_by_id) AS releasedBy,
       (SELECT code FROM part_revisions WHERE id = r.copied_from_id) AS copiedFromCode,
       (SELECT count(*) FROM characteristics c WHERE c.revision_id = r.id) AS characteristicCount
     FROM part_revisions r WHERE r.id = ?`,
    [revision.id],
  );
  if (!row) throw new NotFound();
  return row;
}

/**
 * The revision released after this one, if any: an open package of the older revision is flagged by it (R03), and an
 * approval of the older one never speaks for it.
 */
export async function findNewerRelease(
  from: Executor,
  revisionId: string,
): Promise<{ id: string; code: string } | null> {
  const [row]: { id: string; code: string }[] = await from.query(
    `SELECT newer.id, newer.code FROM part_revisions own
     JOIN part_revisions newer ON newer.part_id = own.part_id AND newer.sequence > own.sequence AND newer.state = 'released'
     WHERE own.id = ? ORDER BY newer.sequence DESC LIMIT 1`,
    [revisionId],
  );
  return row ?? null;
}

const sortColumns: Record<string, string> = { number: 'p.number', name: 'p.name', createdAt: 'p.created_at' };

interface PartRow extends Omit<PartListItem, 'safetyOrRegulatory'> {
  readonly safetyOrRegulatory: number;
}

export function listParts(
  reader: DataSource,
  actor: Actor,
  query: z.output<typeof partListQuery>,
): Page<PartListItem> {
  const { key, descending } = directionOf(query.sort);
  const column = sortColumns[key] ?? 'p.number';
  const after = afterPosition(column, 'p.id', descending, decodeCursor(query.cursor, query.sort));
  const search = query.q ? ` AND (p.number LIKE ? ESCAPE '\\' OR p.name LIKE ? ESCAPE '\\')` : '';
  const pattern = query.q ? [containing(query.q), containing(query.q)] : [];
  const direction = descending ? 'DESC' : 'ASC';
  const rows = readStatement(
    reader,
    `SELECT p.id, p.number, p.name, p.safety_or_regulatory AS safetyOrRegulatory, p.created_at AS createdAt,
       (SELECT code FROM part_revisions r WHERE r.part_id = p.id AND r.state = 'released' ORDER BY r.sequence DESC LIMIT 1) AS currentRevision,
       (SELECT code FROM part_revisions r WHERE r.part_id = p.id AND r.state = 'draft' ORDER BY r.sequence DESC LIMIT 1) AS draftRevision,
       (SELECT count(*) FROM part_revisions r JOIN submissions s ON s.revision_id = r.id
        WHERE r.part_id = p.id AND s.is_open = 1) AS openPackages
     FROM parts p WHERE p.organisation_id = ?${search}${after.sql}
     ORDER BY ${column} ${direction}, p.id ${direction} LIMIT ?`,
  ).all(actor.organisationId, ...pattern, ...after.values, query.limit + 1) as PartRow[];
  return cutPage(
    rows,
    query.limit,
    query.sort,
    (row) => ({ value: row[key as 'number' | 'name' | 'createdAt'], id: row.id }),
    (row) => ({ ...row, safetyOrRegulatory: row.safetyOrRegulatory === 1 }),
  );
}
