import { queryOptions } from '@tanstack/react-query';
import {
  warrantResponse,
  type SignWarrantRequest,
  type WarrantFacts,
  type WarrantResponse,
} from '@trammel/shared/warrants';
import { call } from '../../lib/api-client.ts';

export const warrantQuery = (submissionId: string) =>
  queryOptions({
    queryKey: ['submission', submissionId, 'warrant'],
    queryFn: ({ signal }) =>
      call('GET', `/api/submissions/${submissionId}/warrant`, warrantResponse, { signal }),
  });

export function saveWarrant(warrant: WarrantResponse, body: WarrantFacts) {
  return call('PUT', `/api/submissions/${warrant.submissionId}/warrant`, warrantResponse, {
    body,
    version: warrant.version,
  });
}

export function signWarrant(submissionId: string, body: SignWarrantRequest, idempotencyKey: string) {
  return call('POST', `/api/submissions/${submissionId}/warrant/signature`, warrantResponse, {
    body,
    idempotencyKey,
  });
}
