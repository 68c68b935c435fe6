import { z } from 'zod';
import { checkResponse } from '@trammel/shared/checks';
import { id } from '@trammel/shared/primitives';
import type { ApiRouter } from '../../http/api-router.ts';
import { Conflict } from '../../http/problems.ts';
import { route } from '../../http/route.ts';
import { findSubmissionForActor, requireEvidence } from '../submissions/submissions.queries.ts';
import { presentStoredCheck } from './checks.presenter.ts';
import { findOfficialCheck } from './checks.queries.ts';
import { liveCheck, officialCheck } from './checks.service.ts';

const params = z.strictObject({ submissionId: id });

export function checksRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/submissions/:submissionId/check',
    permission: 'submission:read',
    summary: 'Findings: as they stand while the package is prepared, the official ones once it is submitted',
    params,
    response: checkResponse,
    handler: async ({ deed, params: { submissionId } }) => {
      const found = await findSubmissionForActor(deed.reader.manager, deed.actor, submissionId);
      requireEvidence(found);
      if (found.submission.sealedAt === null) return liveCheck(deed, found.submission);
      const official = await findOfficialCheck(deed.reader.manager, found.submission);
      if (!official) throw new Conflict('This round carries no official check.');
      return presentStoredCheck(official);
    },
  });

  route(router, {
    method: 'post',
    path: '/submissions/:submissionId/check',
    permission: 'measurement:write',
    summary: 'Run the official check now and keep it',
    params,
    response: checkResponse,
    status: 201,
    handler: ({ deed, params: { submissionId } }) => officialCheck(deed, submissionId),
  });
}
