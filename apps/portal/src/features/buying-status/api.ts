import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { buyingLineResponse, buyingStatusResponse, deliveryRecorded } from '@trammel/shared/buying-status';
import { call } from '../../lib/api-client.ts';

export interface BuyingView {
  q: string;
  verdict: string;
  sort: string;
  cursor: string;
}

export const buyingStatusQuery = (view: BuyingView) =>
  queryOptions({
    queryKey: ['buying-status', view],
    queryFn: ({ signal }) =>
      call('GET', '/api/buying-status', buyingStatusResponse, { query: { ...view }, signal }),
    placeholderData: keepPreviousData,
    refetchOnWindowFocus: true,
  });

export const buyingLineQuery = (lineId: string) =>
  queryOptions({
    queryKey: ['buying-line', lineId],
    queryFn: ({ signal }) => call('GET', `/api/buying-status/${lineId}`, buyingLineResponse, { signal }),
  });

export function recordDelivery(
  lineId: string,
  body: { quantity: number; note: string },
  idempotencyKey: string,
) {
  return call('POST', `/api/buying-status/${lineId}/deliveries`, deliveryRecorded, { body, idempotencyKey });
}
