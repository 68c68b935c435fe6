import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { reviewerOptionsResponse, suppliersResponse } from '@trammel/shared/organisations';
import { partListResponse, partResponse } from '@trammel/shared/parts';
import {
  elementTemplateResponse,
  requestListResponse,
  requestResponse,
  requestThreadResponse,
  type RequestResponse,
  type SaveRequestRequest,
  type WriteMessageRequest,
} from '@trammel/shared/requests';
import { call } from '../../lib/api-client.ts';

export interface RequestListView {
  q: string;
  state: string;
  sort: string;
  cursor: string;
}

export const requestListQuery = (view: RequestListView) =>
  queryOptions({
    queryKey: ['requests', 'list', view],
    queryFn: ({ signal }) =>
      call('GET', '/api/requests', requestListResponse, { query: { ...view }, signal }),
    placeholderData: keepPreviousData,
  });

export const requestQuery = (id: string) =>
  queryOptions({
    queryKey: ['requests', 'one', id],
    queryFn: ({ signal }) => call('GET', `/api/requests/${id}`, requestResponse, { signal }),
  });

export const threadQuery = (id: string) =>
  queryOptions({
    queryKey: ['requests', 'thread', id],
    queryFn: ({ signal }) => call('GET', `/api/requests/${id}/messages`, requestThreadResponse, { signal }),
  });

export const elementTemplateQuery = queryOptions({
  queryKey: ['request-elements'],
  queryFn: ({ signal }) => call('GET', '/api/request-elements', elementTemplateResponse, { signal }),
  staleTime: Infinity,
});

export const supplierOptionsQuery = queryOptions({
  queryKey: ['suppliers', 'options'],
  queryFn: ({ signal }) => call('GET', '/api/suppliers', suppliersResponse, { signal }),
});

export const reviewerOptionsQuery = queryOptions({
  queryKey: ['reviewers'],
  queryFn: ({ signal }) => call('GET', '/api/organisation/reviewers', reviewerOptionsResponse, { signal }),
});

export const partOptionsQuery = (q: string) =>
  queryOptions({
    queryKey: ['parts', 'options', q],
    queryFn: ({ signal }) => call('GET', '/api/parts', partListResponse, { query: { q, limit: 50 }, signal }),
    placeholderData: keepPreviousData,
  });

export const partOptionQuery = (id: string) =>
  queryOptions({
    queryKey: ['parts', 'one', id],
    queryFn: ({ signal }) => call('GET', `/api/parts/${id}`, partResponse, { signal }),
    enabled: id !== '',
  });

export function createRequest(body: SaveRequestRequest) {
  return call('POST', '/api/requests', requestResponse, { body });
}

export function saveRequest(id: string, version: number, body: SaveRequestRequest, keepalive = false) {
  return call('PUT', `/api/requests/${id}`, requestResponse, { body, version, keepalive });
}

export function issueRequest(request: Pick<RequestResponse, 'id' | 'version'>, idempotencyKey: string) {
  return call('POST', `/api/requests/${request.id}/issue`, requestResponse, {
    version: request.version,
    idempotencyKey,
  });
}

export function withdrawRequest(request: Pick<RequestResponse, 'id' | 'version'>, reason: string) {
  return call('POST', `/api/requests/${request.id}/withdraw`, requestResponse, {
    body: { reason },
    version: request.version,
  });
}

export function acknowledgeRequest(id: string) {
  return call('POST', `/api/requests/${id}/acknowledge`, requestResponse);
}

export function startNextRound(id: string, idempotencyKey: string) {
  return call('POST', `/api/requests/${id}/resubmission`, requestResponse, { idempotencyKey });
}

export function writeMessage(id: string, body: WriteMessageRequest) {
  return call('POST', `/api/requests/${id}/messages`, requestThreadResponse, { body });
}
