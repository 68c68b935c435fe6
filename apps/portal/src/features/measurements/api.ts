import { queryOptions } from '@tanstack/react-query';
import {
  measurementSheetResponse,
  rowResult,
  rowsResponse,
  saveReadingsResponse,
  type ChangeRowRequest,
  type FillRowsRequest,
  type MeasurementSheetResponse,
  type SaveReadingsRequest,
} from '@trammel/shared/measurements';
import { gaugeListResponse } from '@trammel/shared/gauges';
import { call } from '../../lib/api-client.ts';

const pageSize = 500;

/** The whole sheet, page after page; a package of 500 characteristics takes one page. */
export const sheetQuery = (submissionId: string) =>
  queryOptions({
    queryKey: ['submission', submissionId, 'sheet'],
    // The grid holds the sheet while it is open and applies every answer itself.
    staleTime: Infinity,
    gcTime: 0,
    queryFn: async ({ signal }): Promise<MeasurementSheetResponse> => {
      const path = `/api/submissions/${submissionId}/measurements`;
      let page = await call('GET', path, measurementSheetResponse, { query: { limit: pageSize }, signal });
      const whole = page;
      while (page.next !== null) {
        page = await call('GET', path, measurementSheetResponse, {
          query: { after: page.next, limit: pageSize },
          signal,
        });
        whole.characteristics.push(...page.characteristics);
        whole.rows.push(...page.rows);
      }
      return whole;
    },
  });

export const gaugeChoicesQuery = queryOptions({
  queryKey: ['gauges', 'choices'],
  queryFn: ({ signal }) => call('GET', '/api/gauges', gaugeListResponse, { query: { limit: 200 }, signal }),
});

export function saveReadings(submissionId: string, body: SaveReadingsRequest, keepalive = false) {
  return call('PUT', `/api/submissions/${submissionId}/readings`, saveReadingsResponse, { body, keepalive });
}

export function changeRow(
  submissionId: string,
  key: { characteristicId: string; streamId: string },
  version: number,
  body: ChangeRowRequest,
) {
  const path = `/api/submissions/${submissionId}/rows/${key.characteristicId}/${key.streamId}`;
  return call('PUT', path, rowResult, { body, version });
}

export function fillRows(submissionId: string, body: FillRowsRequest) {
  return call('POST', `/api/submissions/${submissionId}/rows`, rowsResponse, { body });
}
