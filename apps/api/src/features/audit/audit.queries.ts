import type { DataSource } from 'typeorm';
import { readStatement } from '../../database/raw.ts';

export interface AuditEventRow {
  readonly organisationSequence: number;
  readonly at: string;
  readonly actorName: string;
  readonly organisationName: string;
  readonly action: string;
  readonly objectType: string;
  readonly objectId: string;
  readonly summary: string;
  readonly before: string | null;
  readonly after: string | null;
  readonly hash: string;
}

export interface AuditFilter {
  readonly q?: string | undefined;
  readonly objectType?: string | undefined;
  readonly objectId?: string | undefined;
  /** Number in the organisation's own view of the last row already held. */
  readonly before: number;
  readonly limit: number;
}

/** Newest first, of one organisation only. */
export function findAuditEvents(
  reader: DataSource,
  organisationId: string,
  filter: AuditFilter,
): AuditEventRow[] {
  const wanted = [
    filter.objectType === undefined ? '' : 'AND object_type = @objectType',
    filter.objectId === undefined ? '' : 'AND object_id = @objectId',
    filter.q === undefined || filter.q === ''
      ? ''
      : `AND (summary || ' ' || actor_name || ' ' || action) LIKE @q ESCAPE '\\'`,
  ].join(' ');
  return readStatement(
    reader,
    `SELECT organisation_sequence AS organisationSequence, at, actor_name AS actorName,
       organisation_name AS organisationName, action, object_type AS objectType, object_id AS objectId, summary,
       before, after, hash
     FROM audit_events WHERE organisation_id = @organisationId AND organisation_sequence < @before ${wanted}
     ORDER BY organisation_sequence DESC LIMIT @limit`,
  ).all({
    organisationId,
    before: filter.before,
    limit: filter.limit,
    ...(filter.objectType !== undefined && { objectType: filter.objectType }),
    ...(filter.objectId !== undefined && { objectId: filter.objectId }),
    ...(filter.q && { q: `%${filter.q.replace(/[\\%_]/g, '\\$&')}%` }),
  }) as AuditEventRow[];
}
