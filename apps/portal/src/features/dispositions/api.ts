import { queryOptions } from '@tanstack/react-query';
import {
  dispositionDraftResponse,
  dispositionResponse,
  type SignDispositionRequest,
} from '@trammel/shared/dispositions';
import { reviewResponse } from '@trammel/shared/submission-review';
import { elementsResponse } from '@trammel/shared/submissions';
import { call } from '../../lib/api-client.ts';

export const draftQuery = (submissionId: string) =>
  queryOptions({
    queryKey: ['submission', submissionId, 'disposition-draft'],
    queryFn: ({ signal }) =>
      call('GET', `/api/submissions/${submissionId}/disposition-draft`, dispositionDraftResponse, { signal }),
    staleTime: 0,
  });

export const dispositionQuery = (submissionId: string) =>
  queryOptions({
    queryKey: ['submission', submissionId, 'disposition'],
    queryFn: ({ signal }) =>
      call('GET', `/api/submissions/${submissionId}/disposition`, dispositionResponse, { signal }),
  });

/** What a reason can be tied to: refused and questioned rows first, then elements. */
export const reasonTargetsQuery = (submissionId: string) =>
  queryOptions({
    queryKey: ['submission', submissionId, 'reason-targets'],
    queryFn: async ({ signal }) => {
      const [review, elements] = await Promise.all([
        call('GET', `/api/submissions/${submissionId}/review`, reviewResponse, {
          query: { limit: 200 },
          signal,
        }),
        call('GET', `/api/submissions/${submissionId}/elements`, elementsResponse, { signal }),
      ]);
      return { rows: review.rows, elements: elements.items };
    },
    staleTime: 0,
  });

export function signDisposition(submissionId: string, body: SignDispositionRequest, idempotencyKey: string) {
  return call('POST', `/api/submissions/${submissionId}/disposition`, dispositionResponse, {
    body,
    idempotencyKey,
  });
}

export function changeCondition(
  condition: { id: string; version: number },
  body: { state: 'open' | 'evidence-given' | 'verified'; evidence: string },
) {
  return call('PUT', `/api/conditions/${condition.id}`, dispositionResponse, {
    body,
    version: condition.version,
  });
}
