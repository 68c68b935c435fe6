import { id } from '@trammel/shared/primitives';
import {
  characteristicImportPreview,
  confirmReadingImportRequest,
  importConfirmed,
  importParams,
  readingImportPreview,
  remapCharacteristicsRequest,
  remapReadingsRequest,
} from '@trammel/shared/table-import';
import { z } from 'zod';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import {
  confirmCharacteristics,
  previewRemapped,
  previewSentCharacteristics,
} from './characteristic-imports.service.ts';
import { receiveTable } from './hold-file.ts';
import { confirmReadings, previewRemappedReadings, previewSentReadings } from './reading-imports.service.ts';

const sending = { max: 30, seconds: 60 };

export function tableImportsRoutes(router: ApiRouter): void {
  route(router, {
    method: 'post',
    path: '/revisions/:revisionId/characteristic-imports',
    permission: 'part:write',
    summary: 'Send a table of characteristics and see what it would change',
    params: z.strictObject({ revisionId: id }),
    upload: receiveTable,
    limit: sending,
    response: characteristicImportPreview,
    checkAnswer: 'in-tests',
    status: 201,
    handler: ({ deed, params, req }) => previewSentCharacteristics(deed, params.revisionId, req),
  });

  route(router, {
    method: 'post',
    path: '/characteristic-imports/:importId/preview',
    permission: 'part:write',
    summary: 'See a sent table under other settings or columns',
    params: importParams,
    body: remapCharacteristicsRequest,
    response: characteristicImportPreview,
    checkAnswer: 'in-tests',
    handler: ({ deed, params, body }) => previewRemapped(deed, params.importId, body),
  });

  route(router, {
    method: 'post',
    path: '/characteristic-imports/:importId/confirm',
    permission: 'part:write',
    summary: 'Import the rows that were shown',
    params: importParams,
    idempotent: true,
    response: importConfirmed,
    handler: ({ deed, params }) => confirmCharacteristics(deed, params.importId),
  });

  route(router, {
    method: 'post',
    path: '/submissions/:submissionId/reading-imports',
    permission: 'measurement:write',
    summary: 'Send a table of readings and see what it would change',
    params: z.strictObject({ submissionId: id }),
    upload: receiveTable,
    limit: sending,
    response: readingImportPreview,
    checkAnswer: 'in-tests',
    status: 201,
    handler: ({ deed, params, req }) => previewSentReadings(deed, params.submissionId, req),
  });

  route(router, {
    method: 'post',
    path: '/reading-imports/:importId/preview',
    permission: 'measurement:write',
    summary: 'See a sent table of readings under other settings or columns',
    params: importParams,
    body: remapReadingsRequest,
    response: readingImportPreview,
    checkAnswer: 'in-tests',
    handler: ({ deed, params, body }) => previewRemappedReadings(deed, params.importId, body),
  });

  route(router, {
    method: 'post',
    path: '/reading-imports/:importId/confirm',
    permission: 'measurement:write',
    summary: 'Write the readings that were shown',
    params: importParams,
    body: confirmReadingImportRequest,
    idempotent: true,
    response: importConfirmed,
    handler: ({ deed, params, body }) => confirmReadings(deed, params.importId, body),
  });
}
