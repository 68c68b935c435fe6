import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import {
  gaugeListResponse,
  gaugeResponse,
  type GaugeRequest,
  type GaugeResponse,
} from '@trammel/shared/gauges';
import { call } from '../../lib/api-client.ts';

export interface GaugeListView {
  q: string;
  sort: string;
  cursor: string;
}

export const gaugeListQuery = (view: GaugeListView) =>
  queryOptions({
    queryKey: ['gauges', view],
    queryFn: ({ signal }) => call('GET', '/api/gauges', gaugeListResponse, { query: { ...view }, signal }),
    placeholderData: keepPreviousData,
  });

export function addGauge(body: GaugeRequest) {
  return call('POST', '/api/gauges', gaugeResponse, { body });
}

export function changeGauge(gauge: GaugeResponse, body: GaugeRequest) {
  return call('PUT', `/api/gauges/${gauge.id}`, gaugeResponse, { body, version: gauge.version });
}
