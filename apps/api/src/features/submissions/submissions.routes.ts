import { id } from '@trammel/shared/primitives';
import {
  reviewDeskQuery,
  reviewDeskResponse,
  submissionResponse,
  worklistQuery,
  worklistResponse,
} from '@trammel/shared/submissions';
import { z } from 'zod';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import { findReviewDesk } from './review-desk.queries.ts';
import { presentSubmission } from './submissions.presenter.ts';
import { findWorklist } from './worklist.queries.ts';

export function submissionsRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/worklist',
    permission: 'request:answer',
    summary: 'Packages a supplier owes, by due date',
    query: worklistQuery,
    response: worklistResponse,
    handler: ({ deed, query }) => {
      const { organisationId, organisationName } = deed.actor;
      return findWorklist(deed.reader, { id: organisationId, name: organisationName }, query);
    },
  });

  route(router, {
    method: 'get',
    path: '/review-desk',
    permission: 'review:decide',
    summary: 'Packages waiting for the customer, by age',
    query: reviewDeskQuery,
    response: reviewDeskResponse,
    handler: ({ deed, query }) => findReviewDesk(deed.reader, deed.actor.organisationId, query, deed.now),
  });

  route(router, {
    method: 'get',
    path: '/submissions/:submissionId',
    permission: 'submission:read',
    summary: 'The head of one package: identity, route card, counts, signatures',
    params: z.strictObject({ submissionId: id }),
    response: submissionResponse,
    handler: ({ deed, params }) => presentSubmission(deed.reader.manager, deed.actor, params.submissionId),
  });
}
