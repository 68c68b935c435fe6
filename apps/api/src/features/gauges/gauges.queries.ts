import type { GaugeResponse, gaugeListQuery } from '@trammel/shared/gauges';
import type { Page } from '@trammel/shared/pagination';
import type { DataSource } from 'typeorm';
import type { z } from 'zod';
import { readStatement } from '../../database/raw.ts';
import { afterPosition, containing, cutPage, decodeCursor, directionOf } from '../../http/keyset.ts';

type Query = z.infer<typeof gaugeListQuery>;

const columnOf = { code: 'code', dueOn: 'due_on' } as const;
type SortKey = keyof typeof columnOf;

/** Gauges of one organisation; those without a due date sort before all others. */
export function findGauges(reader: DataSource, organisationId: string, query: Query): Page<GaugeResponse> {
  const { key, descending } = directionOf(query.sort);
  const column = columnOf[key as SortKey];
  const way = descending ? 'DESC' : 'ASC';
  const position = decodeCursor(query.cursor, query.sort);
  const after = afterPosition(column, 'id', descending, position, key === 'dueOn');
  const search = query.q ? ` AND (code LIKE ? ESCAPE '\\' OR kind LIKE ? ESCAPE '\\')` : '';
  const like = query.q ? [containing(query.q), containing(query.q)] : [];
  const rows = readStatement(
    reader,
    `SELECT id, code, kind, resolution, unit, calibrated_on AS calibratedOn, due_on AS dueOn, certificate, version
     FROM gauges WHERE organisation_id = ?${search}${after.sql} ORDER BY ${column} ${way}, id ${way} LIMIT ?`,
  ).all(organisationId, ...like, ...after.values, query.limit + 1) as GaugeResponse[];
  return cutPage(
    rows,
    query.limit,
    query.sort,
    (row) => ({ value: row[key as SortKey], id: row.id }),
    (row) => row,
  );
}
