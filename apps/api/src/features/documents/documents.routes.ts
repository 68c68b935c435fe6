import { join } from 'node:path';
import { fileResponse, maximumFileBytes } from '@trammel/shared/documents';
import { id } from '@trammel/shared/primitives';
import { z } from 'zod';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import type { FileStore } from '../../storage/file-store.ts';
import { receivedUpload, receiveFile } from '../../storage/receive-file.ts';
import { presentFile } from './documents.queries.ts';
import { assertWhole, findFileFor, keepFile } from './documents.service.ts';
import { sendFile } from './send-file.ts';

const fileParams = z.strictObject({ fileId: id });

export function documentsRoutes(router: ApiRouter, store: FileStore): void {
  const { config, db, clock } = router.core;

  route(router, {
    method: 'post',
    path: '/files',
    permission: 'file:write',
    summary: 'Send a file: one part named file',
    query: z.strictObject({ purpose: z.enum(['drawing', 'evidence']).default('evidence') }),
    response: fileResponse,
    status: 201,
    limit: { max: 120, seconds: 60 },
    upload: receiveFile({
      folder: join(config.dataDir, 'uploads'),
      maxBytes: maximumFileBytes,
      purposeOf: (req) => (req.query.purpose === 'drawing' ? 'drawing' : 'evidence'),
    }),
    handler: ({ deed, req }) => keepFile(deed, store, receivedUpload(req)),
  });

  route(router, {
    method: 'get',
    path: '/files/:fileId',
    permission: 'file:read',
    summary: 'Name, size and digest of a file',
    params: fileParams,
    response: fileResponse,
    handler: ({ deed, params }) => presentFile(findFileFor(deed, params.fileId)),
  });

  route(router, {
    method: 'get',
    path: '/files/:fileId/content',
    permission: 'file:read',
    summary: 'The file itself, or a range of it',
    params: fileParams,
    response: 'stream',
    handler: async ({ deed, params, req, res }) => {
      const file = findFileFor(deed, params.fileId);
      await assertWhole(db, clock, store, file);
      await sendFile(req, res, store, file);
    },
  });
}
