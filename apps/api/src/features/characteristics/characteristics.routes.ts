import {
  characteristicRequest,
  characteristicResponse,
  characteristicsResponse,
  characteristicTableRequest,
  comparisonResponse,
} from '@trammel/shared/characteristics';
import { id } from '@trammel/shared/primitives';
import { z } from 'zod';
import type { ApiRouter } from '../../http/api-router.ts';
import { NotFound } from '../../http/problems.ts';
import { route } from '../../http/route.ts';
import { findRevisionForActor } from '../parts/parts.queries.ts';
import { presentCharacteristic } from './characteristics.presenter.ts';
import { findCharacteristics } from './characteristics.queries.ts';
import {
  addCharacteristic,
  changeCharacteristic,
  removeCharacteristic,
  saveTable,
} from './characteristics.service.ts';
import { compareRevisions } from './comparison.rules.ts';

const revisionParams = z.strictObject({ revisionId: id });
const characteristicParams = z.strictObject({ characteristicId: id });
const tableBytes = 8 * 1024 * 1024;

export function characteristicsRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/revisions/:revisionId/characteristics',
    permission: ['part:read', 'request:read'],
    summary: 'Characteristics of a drawing revision',
    params: revisionParams,
    response: characteristicsResponse,
    checkAnswer: 'in-tests',
    handler: async ({ deed, params }) => {
      await findRevisionForActor(deed.reader, deed.actor, params.revisionId);
      return {
        items: (await findCharacteristics(deed.reader, params.revisionId)).map(presentCharacteristic),
      };
    },
  });

  route(router, {
    method: 'put',
    path: '/revisions/:revisionId/characteristics',
    permission: 'part:write',
    summary: 'Save rows of the table of characteristics, all or nothing',
    params: revisionParams,
    body: characteristicTableRequest,
    bodyBytes: tableBytes,
    response: characteristicsResponse,
    checkAnswer: 'in-tests',
    handler: ({ deed, params, body }) => saveTable(deed, params.revisionId, body),
  });

  route(router, {
    method: 'post',
    path: '/revisions/:revisionId/characteristics',
    permission: 'part:write',
    summary: 'Add a characteristic',
    params: revisionParams,
    body: characteristicRequest,
    response: characteristicResponse,
    status: 201,
    handler: ({ deed, params, body }) => addCharacteristic(deed, params.revisionId, body),
  });

  route(router, {
    method: 'put',
    path: '/characteristics/:characteristicId',
    permission: 'part:write',
    summary: 'Change a characteristic',
    params: characteristicParams,
    body: characteristicRequest,
    ifMatch: true,
    response: characteristicResponse,
    handler: ({ deed, params, body, version }) =>
      changeCharacteristic(deed, params.characteristicId, version, body),
  });

  route(router, {
    method: 'delete',
    path: '/characteristics/:characteristicId',
    permission: 'part:write',
    summary: 'Remove a characteristic from a draft',
    params: characteristicParams,
    ifMatch: true,
    response: 'nothing',
    handler: ({ deed, params, version }) => removeCharacteristic(deed, params.characteristicId, version),
  });

  route(router, {
    method: 'get',
    path: '/revisions/:revisionId/comparison',
    permission: 'part:read',
    summary: 'Compare two revisions of a part, characteristic by characteristic',
    params: revisionParams,
    query: z.strictObject({ with: id }),
    response: comparisonResponse,
    checkAnswer: 'in-tests',
    handler: async ({ deed, params, query }) => {
      const to = await findRevisionForActor(deed.reader, deed.actor, params.revisionId);
      const from = await findRevisionForActor(deed.reader, deed.actor, query.with);
      if (from.part.id !== to.part.id || from.side !== 'owner' || to.side !== 'owner') throw new NotFound();
      const [before, after] = await Promise.all([
        findCharacteristics(deed.reader, from.revision.id),
        findCharacteristics(deed.reader, to.revision.id),
      ]);
      return {
        from: { id: from.revision.id, code: from.revision.code },
        to: { id: to.revision.id, code: to.revision.code },
        rows: compareRevisions(before, after),
      };
    },
  });
}
