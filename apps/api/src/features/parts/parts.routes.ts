import {
  changePartRequest,
  changeRevisionRequest,
  createPartRequest,
  createRevisionRequest,
  partListQuery,
  partListResponse,
  partResponse,
  revisionResponse,
} from '@trammel/shared/parts';
import { id } from '@trammel/shared/primitives';
import { z } from 'zod';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import { presentPart } from './parts.presenter.ts';
import { findPartForActor, findRevisionsOfPart, listParts } from './parts.queries.ts';
import { changePart, createPart } from './parts.service.ts';
import { answerRevision, changeRevision, createRevision, releaseRevision } from './revisions.service.ts';

const partParams = z.strictObject({ partId: id });
const revisionParams = z.strictObject({ revisionId: id });

export function partsRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/parts',
    permission: 'part:read',
    summary: 'Parts of your organisation',
    query: partListQuery,
    response: partListResponse,
    handler: ({ deed, query }) => listParts(deed.reader, deed.actor, query),
  });

  route(router, {
    method: 'post',
    path: '/parts',
    permission: 'part:write',
    summary: 'Create a part with its first revision',
    body: createPartRequest,
    response: partResponse,
    status: 201,
    handler: ({ deed, body }) => createPart(deed, body),
  });

  route(router, {
    method: 'get',
    path: '/parts/:partId',
    permission: 'part:read',
    summary: 'A part and its revisions',
    params: partParams,
    response: partResponse,
    handler: async ({ deed, params }) => {
      const part = await findPartForActor(deed.reader, deed.actor, params.partId);
      return presentPart(part, await findRevisionsOfPart(deed.reader, part.id));
    },
  });

  route(router, {
    method: 'put',
    path: '/parts/:partId',
    permission: 'part:write',
    summary: 'Change a part',
    params: partParams,
    body: changePartRequest,
    ifMatch: true,
    response: partResponse,
    handler: ({ deed, params, body, version }) => changePart(deed, params.partId, version, body),
  });

  route(router, {
    method: 'post',
    path: '/parts/:partId/revisions',
    permission: 'part:write',
    summary: 'Create the next revision, empty or as a copy',
    params: partParams,
    body: createRevisionRequest,
    response: revisionResponse,
    status: 201,
    handler: ({ deed, params, body }) => createRevision(deed, params.partId, body),
  });

  route(router, {
    method: 'get',
    path: '/revisions/:revisionId',
    permission: ['part:read', 'request:read'],
    summary: 'A drawing revision',
    params: revisionParams,
    response: revisionResponse,
    handler: ({ deed, params }) => answerRevision(deed.reader, deed.actor, params.revisionId),
  });

  route(router, {
    method: 'put',
    path: '/revisions/:revisionId',
    permission: 'part:write',
    summary: 'Change a draft revision or attach its drawing',
    params: revisionParams,
    body: changeRevisionRequest,
    ifMatch: true,
    response: revisionResponse,
    handler: ({ deed, params, body, version }) => changeRevision(deed, params.revisionId, version, body),
  });

  route(router, {
    method: 'post',
    path: '/revisions/:revisionId/release',
    permission: 'part:write',
    summary: 'Release a revision: it is frozen and supersedes the one before',
    params: revisionParams,
    ifMatch: true,
    idempotent: true,
    response: revisionResponse,
    handler: ({ deed, params, version }) => releaseRevision(deed, params.revisionId, version),
  });
}
