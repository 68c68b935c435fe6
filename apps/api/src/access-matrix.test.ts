import { randomUUID } from 'node:crypto';
import type { Response } from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildAccessScene, persons, strangers, type AccessScene } from './testing/access-scene.ts';
import { accessTable, type AccessRow } from './testing/fixtures/access-table.ts';
import { anonymous, ifVersion, onceKey, signInAs, type Client } from './testing/sign-in.ts';

let scene: AccessScene;
const declared = (row: AccessRow) => {
  const record = scene.story.app.router.routes.find(({ method, path }) => `${method} ${path}` === row.route);
  if (!record) throw new Error(`${row.route} is not declared`);
  return record;
};

beforeAll(async () => {
  scene = await buildAccessScene();
  scene.ids.spareSession = (await signInAs(scene.story.app, scene.story.cast.reviewer)).sessionId;
}, 120_000);
afterAll(() => scene.story.app.close());

/** Calls a route as the table says; `replaced` puts other ids into the path. */
async function call(
  client: Client,
  row: AccessRow,
  replaced: Record<string, string> = {},
): Promise<Response> {
  const record = declared(row);
  const path = record.path.replace(/:([A-Za-z]+)/g, (_, name: string) => {
    const key = row.ids?.[name];
    return replaced[name] ?? (key === undefined ? randomUUID() : (scene.ids[key] ?? 'missing'));
  });
  const query = typeof row.query === 'function' ? row.query(scene) : (row.query ?? '');
  let sending = client[record.method](`/api${path}${query}`);
  if (record.idempotent) sending = sending.set(onceKey());
  if (record.ifMatch) sending = sending.set(ifVersion(row.version ?? 1));
  if (row.file) return sending.attach('file', row.file, 'table.csv');
  return row.body ? sending.send(row.body(scene) as object) : sending;
}

/** What a stranger can see of an answer, but for the number of the request. */
const seen = (answer: Response) => ({
  status: answer.status,
  body: answer.text.replace(/"instance":"[^"]*"/, '"instance":""'),
  headers: Object.keys(answer.headers).sort(),
  length: answer.headers['content-length'] as string | undefined,
});

const mayCall = (row: AccessRow) =>
  row.may === 'everybody' || row.may === 'anonymous' ? [...persons] : row.may;

// Reports start threads of their own, which takes seconds on a busy machine.
describe('the matrix of routes and people', { timeout: 120_000 }, () => {
  it('has one row for each route and one route for each row', () => {
    const rows = accessTable.map((row) => row.route);
    const routes = scene.story.app.router.routes.map(({ method, path }) => `${method} ${path}`);
    expect([...rows].sort()).toEqual([...routes].sort());
    for (const row of accessTable) {
      const named = [...declared(row).path.matchAll(/:([A-Za-z]+)/g)].map((match) => match[1]);
      expect(Object.keys(row.ids ?? {}), row.route).toEqual(named.filter((name) => name !== 'token'));
      for (const key of Object.values(row.ids ?? {}))
        expect(scene.ids[key], `${row.route} ${key}`).toMatch(/^[0-9a-f-]{36}$/);
    }
  });

  it('refuses anyone who is not signed in, whatever they name', async () => {
    for (const row of accessTable.filter(({ may }) => may !== 'anonymous')) {
      expect((await call(anonymous(scene.story.app), row)).status, row.route).toBe(401);
    }
  });

  it('refuses every desk that the work does not belong to, before it looks at anything', async () => {
    let refused = 0;
    for (const row of accessTable) {
      for (const person of persons.filter((one) => !mayCall(row).includes(one))) {
        const answer = await call(scene.clients[person], row);
        expect(answer.status, `${row.route} as ${person}`).toBe(403);
        expect(seen(answer).body, `${row.route} as ${person}`).toContain('Your role does not include this.');
        refused += 1;
      }
    }
    expect(refused).toBeGreaterThan(200);
  });

  it('tells another supplier and another customer of an object no more than of one that never was', async () => {
    let compared = 0;
    for (const row of accessTable.filter(({ ids }) => ids !== undefined)) {
      for (const stranger of strangers) {
        const client = scene.clients[stranger];
        const foreign = seen(await call(client, row));
        expect(foreign.status, `${row.route} as ${stranger}`).toBe(404);
        for (const name of Object.keys(row.ids ?? {})) {
          const random = seen(await call(client, row, { [name]: randomUUID() }));
          expect(random, `${row.route} as ${stranger}, ${name}`).toEqual(foreign);
          compared += 1;
        }
      }
    }
    expect(compared).toBeGreaterThan(100);
  });

  it('gives strangers their own lists, with nothing of ours in them', async () => {
    const { cast } = scene.story;
    const ours = [
      cast.customer.name,
      cast.supplier.name,
      'TD-1',
      'TD-2',
      'TD-3',
      'TD-4',
      cast.reviewer.email,
    ];
    for (const row of accessTable.filter(({ list, route }) => list && route.startsWith('get '))) {
      const answer = await call(scene.clients.otherCustomer, row);
      expect(answer.status, row.route).toBe(200);
      for (const word of ours) expect(answer.text, `${row.route}: ${word}`).not.toContain(word);
    }
  });

  it('gives the right person the answer the table says, and of an unknown id what strangers get', async () => {
    for (const row of accessTable) {
      const first = row.as ?? mayCall(row)[0];
      const client =
        row.may === 'anonymous' ? anonymous(scene.story.app) : scene.clients[first ?? 'reviewer'];
      for (const name of Object.keys(row.ids ?? {})) {
        const unknown = seen(await call(client, row, { [name]: randomUUID() }));
        expect(unknown.status, `${row.route} with unknown ${name}`).toBe(404);
        expect(unknown.body, `${row.route} with unknown ${name}`).toContain(
          'There is nothing here that you can see.',
        );
      }
      const answer = await call(client, row);
      expect.soft(answer.status, `${row.route}: ${answer.text?.slice(0, 300)}`).toBe(row.right);
    }
  });
});
