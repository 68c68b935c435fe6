import { z } from 'zod';
import {
  buyingLineResponse,
  buyingStatusQuery,
  buyingStatusResponse,
  deliveryRecorded,
  recordDeliveryRequest,
} from '@trammel/shared/buying-status';
import { id } from '@trammel/shared/primitives';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import { buyingStatusCsv } from './buying-status.csv.ts';
import { eachBuyingStatus, findBuyingStatus } from './buying-status.queries.ts';
import { readLine, recordDelivery } from './buying-status.service.ts';

const lineParams = z.strictObject({ lineId: id });

export function buyingStatusRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/buying-status',
    permission: 'buying:read',
    summary: 'What may be bought, how many, until when',
    query: buyingStatusQuery,
    response: buyingStatusResponse,
    handler: ({ deed, query }) => findBuyingStatus(deed.reader, deed.actor.organisationId, query, deed.now),
  });

  route(router, {
    method: 'get',
    path: '/buying-status.csv',
    permission: 'buying:read',
    summary: 'The filtered list as CSV',
    query: buyingStatusQuery,
    response: 'stream',
    handler: ({ deed, query, res }) => {
      res.setHeader('Content-Type', 'text/csv; charset=utf-8');
      res.setHeader(
        'Content-Disposition',
        `attachment; filename="buying-status-${deed.now.slice(0, 10)}.csv"`,
      );
      res.end(
        buyingStatusCsv(eachBuyingStatus(deed.reader, deed.actor.organisationId, query, deed.now), deed.now),
      );
    },
  });

  route(router, {
    method: 'get',
    path: '/buying-status/:lineId',
    permission: 'buying:read',
    summary: 'One part from one supplier: conditions, deliveries, decisions',
    params: lineParams,
    response: buyingLineResponse,
    handler: ({ deed, params }) => readLine(deed, params.lineId),
  });

  route(router, {
    method: 'post',
    path: '/buying-status/:lineId/deliveries',
    permission: 'delivery:record',
    summary: 'Count pieces received',
    params: lineParams,
    idempotent: true,
    body: recordDeliveryRequest,
    response: deliveryRecorded,
    status: 201,
    handler: ({ deed, params, body }) => recordDelivery(deed, params.lineId, body),
  });
}
