import { z } from 'zod';
import { id } from '@trammel/shared/primitives';
import { saveWarrantRequest, signWarrantRequest, warrantResponse } from '@trammel/shared/warrants';
import { createSigner } from '../../evidence/signing.ts';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import { readWarrant, saveWarrant, signWarrant } from './warrants.service.ts';

const params = z.strictObject({ submissionId: id });

export function warrantsRoutes(router: ApiRouter): void {
  const signer = createSigner(router.core.config.secrets.signingKeyPem);

  route(router, {
    method: 'get',
    path: '/submissions/:submissionId/warrant',
    permission: 'submission:read',
    summary: 'The warrant: facts, declaration, what it covers, and the digest to sign',
    params,
    response: warrantResponse,
    handler: ({ deed, params: { submissionId } }) => readWarrant(deed, submissionId),
  });

  route(router, {
    method: 'put',
    path: '/submissions/:submissionId/warrant',
    permission: 'measurement:write',
    summary: 'State run, mass, tool and exceptions',
    params,
    ifMatch: true,
    body: saveWarrantRequest,
    response: warrantResponse,
    handler: ({ deed, params: { submissionId }, version, body }) =>
      saveWarrant(deed, submissionId, version, body),
  });

  route(router, {
    method: 'post',
    path: '/submissions/:submissionId/warrant/signature',
    permission: 'warrant:sign',
    summary: 'Sign the warrant and submit the package',
    params,
    idempotent: true,
    body: signWarrantRequest,
    response: warrantResponse,
    status: 201,
    limit: { max: 20, seconds: 60 },
    handler: ({ deed, params: { submissionId }, body }) => signWarrant(deed, signer, submissionId, body),
  });
}
