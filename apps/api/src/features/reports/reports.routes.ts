import { id } from '@trammel/shared/primitives';
import type { Response } from 'express';
import { z } from 'zod';
import type { ApiRouter } from '../../http/api-router.ts';
import type { Deed } from '../../http/deed.ts';
import { route } from '../../http/route.ts';
import { makeReport, type ReportKind } from './report-threads.ts';
import { loadReportScene } from './reports.service.ts';

const params = z.strictObject({ submissionId: id });
const response = 'stream';
const permission = 'submission:read';
/** A document costs far more than a look at a list. */
const limit = { max: 30, seconds: 60 };

const pdf = 'application/pdf';
const csv = 'text/csv; charset=utf-8';
const spreadsheet = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

export function reportsRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/submissions/:submissionId/warrant.pdf',
    permission,
    summary: 'The warrant as PDF, with both signatures',
    params,
    response,
    limit,
    handler: ({ deed, params: { submissionId }, res }) =>
      sendReport(deed, submissionId, res, { kind: 'warrant-pdf', name: 'warrant.pdf', type: pdf }),
  });

  route(router, {
    method: 'get',
    path: '/submissions/:submissionId/dimensional-results.pdf',
    permission,
    summary: 'The dimensional results as PDF, with both signatures',
    params,
    response,
    limit,
    handler: ({ deed, params: { submissionId }, res }) =>
      sendReport(deed, submissionId, res, {
        kind: 'results-pdf',
        name: 'dimensional-results.pdf',
        type: pdf,
      }),
  });

  route(router, {
    method: 'get',
    path: '/submissions/:submissionId/dimensional-results.csv',
    permission,
    summary: 'Every reading as it was typed, one line each',
    params,
    response,
    limit,
    handler: ({ deed, params: { submissionId }, res }) =>
      sendReport(deed, submissionId, res, {
        kind: 'results-csv',
        name: 'dimensional-results.csv',
        type: csv,
      }),
  });

  route(router, {
    method: 'get',
    path: '/submissions/:submissionId/dimensional-results.xlsx',
    permission,
    summary: 'Every reading, and every row with its figures, as a workbook',
    params,
    response,
    limit,
    handler: ({ deed, params: { submissionId }, res }) =>
      sendReport(deed, submissionId, res, {
        kind: 'results-xlsx',
        name: 'dimensional-results.xlsx',
        type: spreadsheet,
      }),
  });
}

async function sendReport(
  deed: Deed,
  submissionId: string,
  res: Response,
  document: { kind: ReportKind; name: string; type: string },
): Promise<void> {
  const scene = await loadReportScene(deed, submissionId);
  const body = Buffer.from(await makeReport(document.kind, scene));
  const { partNumber, revision, round } = scene.title;
  const plain = `${partNumber}-${revision}-round-${round}-${document.name}`.replace(/[^\w.-]+/g, '_');
  res.setHeader('Content-Type', document.type);
  res.setHeader('Content-Disposition', `attachment; filename="${plain}"`);
  res.setHeader('Content-Length', body.length);
  res.setHeader('Cache-Control', 'private, no-store');
  res.end(body);
}
