import { id } from '@trammel/shared/primitives';
import {
  elementTemplateResponse,
  requestListQuery,
  requestListResponse,
  requestResponse,
  requestThreadResponse,
  saveRequestRequest,
  withdrawRequestRequest,
  writeMessageRequest,
} from '@trammel/shared/requests';
import { z } from 'zod';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import { elementsOfLevel, elementTemplateSource, submissionLevels } from './element-template.ts';
import { issueRequest } from './issue-request.service.ts';
import { readThread, writeMessage } from './request-messages.service.ts';
import { findRequests } from './request-list.queries.ts';
import { acknowledgeRequest, withdrawRequest } from './request-steps.service.ts';
import { presentRequest } from './requests.presenter.ts';
import { startNextRound } from './resubmit.service.ts';
import { changeRequest, createRequest } from './save-request.service.ts';

const params = z.strictObject({ requestId: id });

export function requestsRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/request-elements',
    permission: 'request:read',
    summary: 'Elements that each submission level implies',
    response: elementTemplateResponse,
    handler: () => ({
      source: elementTemplateSource,
      levels: submissionLevels.map((level) => ({ level, elements: elementsOfLevel(level) })),
    }),
  });

  route(router, {
    method: 'get',
    path: '/requests',
    permission: 'request:read',
    summary: 'Requests sent and received',
    query: requestListQuery,
    response: requestListResponse,
    handler: ({ deed, query }) => findRequests(deed.reader, deed.actor, query),
  });

  route(router, {
    method: 'post',
    path: '/requests',
    permission: 'request:write',
    summary: 'Draft a request',
    body: saveRequestRequest,
    response: requestResponse,
    status: 201,
    handler: ({ deed, body }) => createRequest(deed, body),
  });

  route(router, {
    method: 'get',
    path: '/requests/:requestId',
    permission: 'request:read',
    summary: 'One request',
    params,
    response: requestResponse,
    handler: ({ deed, params }) => presentRequest(deed.reader.manager, deed.actor, params.requestId),
  });

  route(router, {
    method: 'put',
    path: '/requests/:requestId',
    permission: 'request:write',
    summary: 'Change a draft',
    params,
    body: saveRequestRequest,
    ifMatch: true,
    response: requestResponse,
    handler: ({ deed, params, body, version }) => changeRequest(deed, params.requestId, version, body),
  });

  route(router, {
    method: 'post',
    path: '/requests/:requestId/issue',
    permission: 'request:write',
    summary: 'Send a draft to the supplier',
    params,
    idempotent: true,
    ifMatch: true,
    response: requestResponse,
    handler: ({ deed, params, version }) => issueRequest(deed, params.requestId, version),
  });

  route(router, {
    method: 'post',
    path: '/requests/:requestId/withdraw',
    permission: 'request:write',
    summary: 'Call a request off',
    params,
    body: withdrawRequestRequest,
    ifMatch: true,
    response: requestResponse,
    handler: ({ deed, params, body, version }) =>
      withdrawRequest(deed, params.requestId, version, body.reason),
  });

  route(router, {
    method: 'post',
    path: '/requests/:requestId/acknowledge',
    permission: 'request:answer',
    summary: 'Take a request on',
    params,
    response: requestResponse,
    handler: ({ deed, params }) => acknowledgeRequest(deed, params.requestId),
  });

  route(router, {
    method: 'get',
    path: '/requests/:requestId/messages',
    permission: 'request:read',
    summary: 'The thread on a request',
    params,
    response: requestThreadResponse,
    handler: ({ deed, params }) => readThread(deed.reader.manager, deed.actor, params.requestId),
  });

  route(router, {
    method: 'post',
    path: '/requests/:requestId/messages',
    permission: 'request:read',
    summary: 'Ask, answer or note something on a request',
    params,
    body: writeMessageRequest,
    response: requestThreadResponse,
    status: 201,
    handler: ({ deed, params, body }) => writeMessage(deed, params.requestId, body),
  });

  route(router, {
    method: 'post',
    path: '/requests/:requestId/resubmission',
    permission: 'request:answer',
    summary: 'Start the next round of a package',
    params,
    idempotent: true,
    response: requestResponse,
    status: 201,
    handler: ({ deed, params }) => startNextRound(deed, params.requestId),
  });
}
