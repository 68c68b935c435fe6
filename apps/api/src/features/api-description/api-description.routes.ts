import { z } from 'zod';
import type { ApiRouter } from '../../http/api-router.ts';
import { describeApi } from '../../http/open-api.ts';
import { route } from '../../http/route.ts';

export function apiDescriptionRoutes(router: ApiRouter): void {
  let made: object | undefined;
  route(router, {
    method: 'get',
    path: '/openapi.json',
    permission: 'signed-in',
    summary: 'Description of this API',
    response: z.looseObject({ openapi: z.string() }),
    handler: () => (made ??= describeApi(router.routes)) as { openapi: string },
  });
}
