import { queryOptions } from '@tanstack/react-query';
import { checkResponse } from '@trammel/shared/checks';
import { call } from '../../lib/api-client.ts';

export const checkQuery = (submissionId: string) =>
  queryOptions({
    queryKey: ['submission', submissionId, 'check'],
    queryFn: ({ signal }) => call('GET', `/api/submissions/${submissionId}/check`, checkResponse, { signal }),
  });

export function runOfficialCheck(submissionId: string) {
  return call('POST', `/api/submissions/${submissionId}/check`, checkResponse);
}
