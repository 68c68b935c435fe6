import { OpenAPIRegistry, OpenApiGeneratorV31 } from '@asteasolutions/zod-to-openapi';
import { problem } from '@trammel/shared/problem';
import { z } from 'zod';
import type { RouteRecord } from './route.ts';

/** The API description, made from the same records that serve the requests. */
export function describeApi(routes: readonly RouteRecord[]): object {
  const registry = new OpenAPIRegistry();
  for (const route of routes) {
    registry.registerPath({
      method: route.method,
      path: `/api${route.path.replace(/:([A-Za-z]+)/g, '{$1}')}`,
      summary: route.summary,
      description: `For: ${[route.permission].flat().join(', ')}.`,
      request: {
        ...(route.params instanceof z.ZodObject && { params: route.params }),
        ...(route.query instanceof z.ZodObject && { query: route.query }),
        ...(route.body && {
          body: { content: { 'application/json': { schema: route.body } }, required: true },
        }),
        ...(route.upload && { body: { content: { 'multipart/form-data': { schema: multipart } } } }),
        headers: z.object(headersOf(route)),
      },
      responses: {
        [route.status]: answerOf(route),
        default: { description: 'A problem', content: { 'application/problem+json': { schema: problem } } },
      },
    });
  }
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: { title: 'Trammel', version: '1' },
  });
}

const multipart = z.object({ file: z.string().meta({ format: 'binary' }) });

function headersOf(route: RouteRecord): Record<string, z.ZodType> {
  return {
    ...(route.method !== 'get' && route.permission !== 'public' && { 'X-CSRF-Token': z.string() }),
    ...(route.ifMatch && { 'If-Match': z.string() }),
    ...(route.idempotent && { 'Idempotency-Key': z.string() }),
  };
}

function answerOf(route: RouteRecord) {
  if (route.response === 'nothing') return { description: 'Done' };
  if (route.response === 'stream') return { description: 'The content' };
  return { description: 'The answer', content: { 'application/json': { schema: route.response } } };
}
