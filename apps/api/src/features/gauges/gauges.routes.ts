import { gaugeListQuery, gaugeListResponse, gaugeRequest, gaugeResponse } from '@trammel/shared/gauges';
import { id } from '@trammel/shared/primitives';
import { z } from 'zod';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import { findGauges } from './gauges.queries.ts';
import { addGauge, changeGauge } from './gauges.service.ts';

export function gaugesRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/gauges',
    permission: 'gauge:write',
    summary: 'Gauges of your organisation',
    query: gaugeListQuery,
    response: gaugeListResponse,
    handler: ({ deed, query }) => findGauges(deed.reader, deed.actor.organisationId, query),
  });

  route(router, {
    method: 'post',
    path: '/gauges',
    permission: 'gauge:write',
    summary: 'Add a gauge',
    body: gaugeRequest,
    response: gaugeResponse,
    status: 201,
    handler: ({ deed, body }) => addGauge(deed, body),
  });

  route(router, {
    method: 'put',
    path: '/gauges/:gaugeId',
    permission: 'gauge:write',
    summary: 'Change a gauge',
    params: z.strictObject({ gaugeId: id }),
    body: gaugeRequest,
    ifMatch: true,
    response: gaugeResponse,
    handler: ({ deed, params, body, version }) => changeGauge(deed, params.gaugeId, version, body),
  });
}
