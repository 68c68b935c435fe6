import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { permissions } from '@trammel/shared/roles';
import { z } from 'zod';
import type { RouteRecord } from './http/route.ts';
import { anonymous } from './testing/sign-in.ts';
import { createTestApp, type TestApp } from './testing/test-app.ts';

let app: TestApp;
beforeAll(async () => {
  app = await createTestApp({ closes: 'caller' });
});
afterAll(() => app.close());

/** The only addresses that answer without a session. */
const open = [
  'get /account-tokens/:token',
  'get /demo/people',
  'post /account-tokens/:token/password',
  'post /password-resets',
  'post /session',
];

const nameOf = (record: RouteRecord) => `${record.method} ${record.path}`;

function isStrict(schema: z.ZodType): boolean {
  if (schema instanceof z.ZodObject) return schema.def.catchall instanceof z.ZodNever;
  if (schema instanceof z.ZodUnion) return schema.options.every((option) => isStrict(option as z.ZodType));
  if (schema instanceof z.ZodPipe) return isStrict(schema.in as z.ZodType);
  return false;
}

describe('the inventory of routes', () => {
  it('names a known permission for each, and only the listed ones are open to everybody', () => {
    const known = new Set<string>([...permissions, 'signed-in', 'public']);
    for (const record of app.router.routes) {
      const named = [record.permission].flat();
      expect(named.length, nameOf(record)).toBeGreaterThan(0);
      for (const one of named) expect(known, nameOf(record)).toContain(one);
    }
    const unguarded = app.router.routes.filter((record) => record.permission === 'public').map(nameOf);
    expect(unguarded.sort()).toEqual(open);
  });

  it('refuses fields and parameters nobody named', () => {
    for (const record of app.router.routes) {
      for (const schema of [record.body, record.query, record.params]) {
        if (schema) expect(isStrict(schema), nameOf(record)).toBe(true);
      }
    }
  });

  it('gives nothing to anyone who is not signed in', async () => {
    for (const record of app.router.routes.filter(({ permission }) => permission !== 'public')) {
      const path = `/api${record.path.replace(/:[A-Za-z]+/g, '00000000-0000-4000-8000-000000000000')}`;
      const answer = await anonymous(app)[record.method](path);
      expect(answer.status, nameOf(record)).toBe(401);
      expect(answer.body.type, nameOf(record)).toMatch(/unauthenticated$/);
    }
  });

  it('is described as a whole', () => {
    const description = app.router.routes.map((record) => record.summary);
    expect(description.every((summary) => /^[A-Z].{4,100}[^.]$/.test(summary))).toBe(true);
  });
});
