import { infiniteQueryOptions, queryOptions } from '@tanstack/react-query';
import {
  decisionsResponse,
  elementDecisionResponse,
  reviewResponse,
  type DecideCharacteristicRequest,
  type DecideElementRequest,
} from '@trammel/shared/submission-review';
import { elementsResponse } from '@trammel/shared/submissions';
import { call } from '../../lib/api-client.ts';

export interface ReviewView {
  show: string;
  order: string;
}

const pageSize = 100;

export const reviewQuery = (submissionId: string, view: ReviewView) =>
  infiniteQueryOptions({
    queryKey: ['submission', submissionId, 'review', view],
    initialPageParam: 0,
    queryFn: ({ pageParam, signal }) =>
      call('GET', `/api/submissions/${submissionId}/review`, reviewResponse, {
        query: { ...view, offset: pageParam, limit: pageSize },
        signal,
      }),
    getNextPageParam: (last, _pages, offset) =>
      offset + last.rows.length < last.total && last.rows.length > 0 ? offset + last.rows.length : null,
  });

export const reviewElementsQuery = (submissionId: string) =>
  queryOptions({
    queryKey: ['submission', submissionId, 'review-elements'],
    queryFn: ({ signal }) =>
      call('GET', `/api/submissions/${submissionId}/elements`, elementsResponse, { signal }),
  });

export function decideCharacteristic(
  submissionId: string,
  characteristicId: string,
  version: number,
  body: DecideCharacteristicRequest,
) {
  return call(
    'PUT',
    `/api/submissions/${submissionId}/characteristics/${characteristicId}/decision`,
    decisionsResponse,
    { body, version },
  );
}

export function acceptCleanRows(submissionId: string, characteristicIds: string[]) {
  return call('POST', `/api/submissions/${submissionId}/clean-rows`, decisionsResponse, {
    body: { characteristicIds },
  });
}

export function decideElement(
  submissionId: string,
  elementId: string,
  version: number,
  body: DecideElementRequest,
) {
  return call(
    'PUT',
    `/api/submissions/${submissionId}/elements/${elementId}/decision`,
    elementDecisionResponse,
    { body, version },
  );
}
