import { expect, it } from 'vitest';
import { buildOrganisation, buildUser } from '../../testing/builders.ts';
import { anonymous, signInAs } from '../../testing/sign-in.ts';
import { createTestApp } from '../../testing/test-app.ts';

it('describes every route, to people who are signed in', async () => {
  const app = await createTestApp();
  await anonymous(app).get('/api/openapi.json').expect(401);
  const person = await signInAs(app, await buildUser(app, await buildOrganisation(app), ['purchasing']));
  const { body } = await person.get('/api/openapi.json').expect(200);
  const described = Object.entries(body.paths as Record<string, object>).flatMap(([path, methods]) =>
    Object.keys(methods).map((method) => `${method} ${path}`),
  );
  const declared = app.router.routes.map(
    ({ method, path }) => `${method} /api${path.replace(/:(\w+)/g, '{$1}')}`,
  );
  expect(described.sort()).toEqual(declared.sort());
  expect(body.components.schemas).toHaveProperty('Session');
});
