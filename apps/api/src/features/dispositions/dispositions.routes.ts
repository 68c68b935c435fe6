import { z } from 'zod';
import {
  changeConditionRequest,
  dispositionDraftResponse,
  dispositionResponse,
  signDispositionRequest,
} from '@trammel/shared/dispositions';
import { id } from '@trammel/shared/primitives';
import { createSigner } from '../../evidence/signing.ts';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import {
  changeCondition,
  draftDisposition,
  readDisposition,
  signDisposition,
} from './dispositions.service.ts';

const params = z.strictObject({ submissionId: id });

export function dispositionsRoutes(router: ApiRouter): void {
  const signer = createSigner(router.core.config.secrets.signingKeyPem);

  route(router, {
    method: 'get',
    path: '/submissions/:submissionId/disposition-draft',
    permission: 'review:decide',
    summary: 'What stands in the way of each outcome, and the digest to sign',
    params,
    response: dispositionDraftResponse,
    handler: ({ deed, params: { submissionId } }) => draftDisposition(deed, submissionId),
  });

  route(router, {
    method: 'post',
    path: '/submissions/:submissionId/disposition',
    permission: 'disposition:sign',
    summary: 'Sign the disposition',
    params,
    idempotent: true,
    body: signDispositionRequest,
    response: dispositionResponse,
    status: 201,
    limit: { max: 20, seconds: 60 },
    handler: ({ deed, params: { submissionId }, body }) => signDisposition(deed, signer, submissionId, body),
  });

  route(router, {
    method: 'get',
    path: '/submissions/:submissionId/disposition',
    permission: 'submission:read',
    summary: 'The signed disposition',
    params,
    response: dispositionResponse,
    handler: ({ deed, params: { submissionId } }) => readDisposition(deed, submissionId),
  });

  route(router, {
    method: 'put',
    path: '/conditions/:conditionId',
    permission: ['review:decide', 'measurement:write'],
    summary: 'Give evidence for a condition, or verify it',
    params: z.strictObject({ conditionId: id }),
    ifMatch: true,
    body: changeConditionRequest,
    response: dispositionResponse,
    handler: ({ deed, params: { conditionId }, version, body }) =>
      changeCondition(deed, conditionId, version, body),
  });
}
