import { id } from '@trammel/shared/primitives';
import type { Response } from 'express';
import { z } from 'zod';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import { writeCsv } from '../../tables/export-text.ts';
import { findCharacteristics } from '../characteristics/characteristics.queries.ts';
import { findRevisionForActor } from '../parts/parts.queries.ts';
import { exportHeader, exportRow, exportWidths, templateLegend, templateRows } from './export-rows.ts';
import { inThread } from './table-threads.ts';

const format = z.strictObject({ format: z.enum(['csv', 'xlsx']).default('csv') });
const spreadsheet = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

export function tableExportsRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/characteristic-template',
    permission: 'part:read',
    summary: 'An empty table of characteristics to fill in',
    query: format,
    response: 'stream',
    handler: ({ query, res }) =>
      sendTable(res, 'characteristics-template', query.format, templateRows, templateLegend),
  });

  route(router, {
    method: 'get',
    path: '/revisions/:revisionId/characteristics/export',
    permission: ['part:read', 'request:read'],
    summary: 'The characteristics as a table that imports again unchanged',
    params: z.strictObject({ revisionId: id }),
    query: format,
    response: 'stream',
    limit: { max: 60, seconds: 60 },
    handler: async ({ deed, params, query, res }) => {
      const { revision, part } = await findRevisionForActor(deed.reader, deed.actor, params.revisionId);
      const rows = (await findCharacteristics(deed.reader, revision.id)).map(exportRow);
      await sendTable(res, `${part.number}-${revision.code}-characteristics`, query.format, rows);
    },
  });
}

async function sendTable(
  res: Response,
  name: string,
  kind: 'csv' | 'xlsx',
  rows: readonly (readonly string[])[],
  legend?: readonly (readonly string[])[],
): Promise<void> {
  const plain = name.replace(/[^\w.-]+/g, '_').slice(0, 100);
  const body =
    kind === 'csv'
      ? Buffer.from(writeCsv([exportHeader, ...rows]), 'utf8')
      : Buffer.from(
          await inThread.workbook({
            plan: {
              sheet: 'Characteristics',
              header: exportHeader,
              widths: exportWidths,
              rows,
              ...(legend && { legend }),
            },
          }),
        );
  res.setHeader('Content-Type', kind === 'csv' ? 'text/csv; charset=utf-8' : spreadsheet);
  res.setHeader('Content-Disposition', `attachment; filename="${plain}.${kind}"`);
  res.setHeader('Content-Length', body.length);
  res.end(body);
}
