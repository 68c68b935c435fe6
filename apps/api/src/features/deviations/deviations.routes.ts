import { z } from 'zod';
import {
  askDeviationRequest,
  decideDeviationRequest,
  deviationResponse,
  deviationsResponse,
} from '@trammel/shared/deviations';
import { id } from '@trammel/shared/primitives';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import {
  askDeviation,
  changeDeviation,
  decideDeviation,
  listDeviations,
  withdrawDeviation,
} from './deviations.service.ts';

const submissionParams = z.strictObject({ submissionId: id });
const deviationParams = z.strictObject({ deviationId: id });

export function deviationsRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/submissions/:submissionId/deviations',
    permission: 'submission:read',
    summary: 'Deviation requests of a round',
    params: submissionParams,
    response: deviationsResponse,
    handler: async ({ deed, params }) => ({ items: await listDeviations(deed, params.submissionId) }),
  });

  route(router, {
    method: 'post',
    path: '/submissions/:submissionId/deviations',
    permission: 'deviation:ask',
    summary: 'Ask for a deviation',
    params: submissionParams,
    body: askDeviationRequest,
    idempotent: true,
    response: deviationResponse,
    status: 201,
    handler: ({ deed, params, body }) => askDeviation(deed, params.submissionId, body),
  });

  route(router, {
    method: 'put',
    path: '/deviations/:deviationId',
    permission: 'deviation:ask',
    summary: 'Change a deviation request that is not decided',
    params: deviationParams,
    ifMatch: true,
    body: askDeviationRequest,
    response: deviationResponse,
    handler: ({ deed, params, body, version }) => changeDeviation(deed, params.deviationId, version, body),
  });

  route(router, {
    method: 'post',
    path: '/deviations/:deviationId/withdrawal',
    permission: 'deviation:ask',
    summary: 'Withdraw a deviation request that is not decided',
    params: deviationParams,
    ifMatch: true,
    response: deviationResponse,
    handler: ({ deed, params, version }) => withdrawDeviation(deed, params.deviationId, version),
  });

  route(router, {
    method: 'post',
    path: '/deviations/:deviationId/decision',
    permission: 'deviation:decide',
    summary: 'Grant or refuse a deviation',
    params: deviationParams,
    ifMatch: true,
    body: decideDeviationRequest,
    response: deviationResponse,
    handler: ({ deed, params, body, version }) => decideDeviation(deed, params.deviationId, version, body),
  });
}
