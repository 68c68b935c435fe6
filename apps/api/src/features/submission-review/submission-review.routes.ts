import { z } from 'zod';
import { id } from '@trammel/shared/primitives';
import {
  acceptCleanRowsRequest,
  decideCharacteristicRequest,
  decideElementRequest,
  decisionsResponse,
  elementDecisionResponse,
  reviewQuery,
  reviewResponse,
} from '@trammel/shared/submission-review';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import { findReview } from './submission-review.queries.ts';
import { decideElement } from './element-decisions.service.ts';
import { acceptCleanRows, decideCharacteristic } from './submission-review.service.ts';

const params = z.strictObject({ submissionId: id });

export function submissionReviewRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/submissions/:submissionId/review',
    permission: 'submission:read',
    summary: 'Rows with verdict, findings, deviations and decisions, what needs a person first',
    params,
    query: reviewQuery,
    response: reviewResponse,
    checkAnswer: 'in-tests',
    handler: ({ deed, params: { submissionId }, query }) => findReview(deed, submissionId, query),
  });

  route(router, {
    method: 'put',
    path: '/submissions/:submissionId/characteristics/:characteristicId/decision',
    permission: 'review:decide',
    summary: 'Accept, refuse or question one characteristic',
    params: z.strictObject({ submissionId: id, characteristicId: id }),
    ifMatch: true,
    body: decideCharacteristicRequest,
    response: decisionsResponse,
    handler: ({ deed, params: key, version, body }) => decideCharacteristic(deed, key, version, body),
  });

  route(router, {
    method: 'post',
    path: '/submissions/:submissionId/clean-rows',
    permission: 'review:decide',
    summary: 'Accept clean rows together',
    params,
    body: acceptCleanRowsRequest,
    response: decisionsResponse,
    handler: ({ deed, params: { submissionId }, body }) =>
      acceptCleanRows(deed, submissionId, body.characteristicIds),
  });

  route(router, {
    method: 'put',
    path: '/submissions/:submissionId/elements/:elementId/decision',
    permission: 'review:decide',
    summary: 'Accept, refuse or question one element',
    params: z.strictObject({ submissionId: id, elementId: id }),
    ifMatch: true,
    body: decideElementRequest,
    response: elementDecisionResponse,
    handler: ({ deed, params: key, version, body }) => decideElement(deed, key, version, body),
  });
}
