import { z } from 'zod';
import { id } from '@trammel/shared/primitives';
import {
  changeRowRequest,
  fillRowsRequest,
  measurementSheetQuery,
  measurementSheetResponse,
  rowResult,
  rowsResponse,
  saveReadingsRequest,
  saveReadingsResponse,
} from '@trammel/shared/measurements';
import { openForSupplier } from '@trammel/shared/status';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import { findSubmissionForActor, requireEvidence } from '../submissions/submissions.queries.ts';
import { findSheet } from './measurements.queries.ts';
import { changeRow, fillRows, saveReadings } from './measurements.service.ts';

const submissionParams = z.strictObject({ submissionId: id });
const rowParams = z.strictObject({ submissionId: id, characteristicId: id, streamId: id });
/** A block of readings is long; single ones are short. */
const blockBytes = 32 * 1024 * 1024;

export function measurementsRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/submissions/:submissionId/measurements',
    permission: 'submission:read',
    summary: 'Streams, pieces, characteristics and readings of a package, page by page',
    params: submissionParams,
    query: measurementSheetQuery,
    response: measurementSheetResponse,
    checkAnswer: 'in-tests',
    handler: async ({ deed, params, query }) => {
      const found = await findSubmissionForActor(deed.reader.manager, deed.actor, params.submissionId);
      requireEvidence(found);
      const editable = found.side === 'supplier' && openForSupplier.includes(found.submission.state);
      return findSheet(deed.reader, found.submission, query, editable);
    },
  });

  route(router, {
    method: 'put',
    path: '/submissions/:submissionId/readings',
    permission: 'measurement:write',
    summary: 'Save readings; each change names what it replaces',
    params: submissionParams,
    body: saveReadingsRequest,
    bodyBytes: blockBytes,
    response: saveReadingsResponse,
    checkAnswer: 'in-tests',
    handler: ({ deed, params, body }) => saveReadings(deed, params.submissionId, body),
  });

  route(router, {
    method: 'put',
    path: '/submissions/:submissionId/rows/:characteristicId/:streamId',
    permission: 'measurement:write',
    summary: 'Gauge, date, note and counted results of one row',
    params: rowParams,
    ifMatch: true,
    body: changeRowRequest,
    response: rowResult,
    handler: ({ deed, params, body, version }) => changeRow(deed, params, version, body),
  });

  route(router, {
    method: 'post',
    path: '/submissions/:submissionId/rows',
    permission: 'measurement:write',
    summary: 'Set gauge or date of many rows at once',
    params: submissionParams,
    body: fillRowsRequest,
    response: rowsResponse,
    handler: ({ deed, params, body }) => fillRows(deed, params.submissionId, body),
  });
}
