import { queryOptions } from '@tanstack/react-query';
import {
  deviationResponse,
  deviationsResponse,
  type AskDeviationRequest,
  type DeviationResponse,
} from '@trammel/shared/deviations';
import { checkResponse } from '@trammel/shared/checks';
import { measurementSheetResponse } from '@trammel/shared/measurements';
import { call } from '../../lib/api-client.ts';

export const deviationsQuery = (submissionId: string) =>
  queryOptions({
    queryKey: ['submission', submissionId, 'deviations'],
    queryFn: ({ signal }) =>
      call('GET', `/api/submissions/${submissionId}/deviations`, deviationsResponse, { signal }),
  });

/** Characteristics that can be asked for, those out of tolerance first. */
export const askableQuery = (submissionId: string) =>
  queryOptions({
    queryKey: ['submission', submissionId, 'askable'],
    queryFn: async ({ signal }) => {
      const [sheet, check] = await Promise.all([
        call('GET', `/api/submissions/${submissionId}/measurements`, measurementSheetResponse, {
          query: { limit: 500 },
          signal,
        }),
        call('GET', `/api/submissions/${submissionId}/check`, checkResponse, { signal }),
      ]);
      const out = new Set(
        check.findings
          .filter((finding) => finding.rule === 'R20')
          .map((finding) => finding.place.characteristicId),
      );
      const characteristics = [...sheet.characteristics].sort(
        (a, b) => Number(out.has(b.id)) - Number(out.has(a.id)) || a.sequence - b.sequence,
      );
      return { characteristics, streams: sheet.streams, out };
    },
  });

export function askDeviation(submissionId: string, body: AskDeviationRequest, idempotencyKey: string) {
  return call('POST', `/api/submissions/${submissionId}/deviations`, deviationResponse, {
    body,
    idempotencyKey,
  });
}

export function changeDeviation(deviation: DeviationResponse, body: AskDeviationRequest) {
  return call('PUT', `/api/deviations/${deviation.id}`, deviationResponse, {
    body,
    version: deviation.version,
  });
}

export function withdrawDeviation(deviation: DeviationResponse) {
  return call('POST', `/api/deviations/${deviation.id}/withdrawal`, deviationResponse, {
    version: deviation.version,
  });
}

export function decideDeviation(
  deviation: DeviationResponse,
  body: { decision: 'granted' | 'refused'; note: string },
) {
  return call('POST', `/api/deviations/${deviation.id}/decision`, deviationResponse, {
    body,
    version: deviation.version,
  });
}
