import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { DAY } from '../clock.ts';
import { Organisation } from '../database/entities/organisation.entity.ts';
import { buildOrganisation, buildUser } from '../testing/builders.ts';
import { anonymous, ifVersion, onceKey, signInAs, type Client } from '../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../testing/test-app.ts';
import { route } from './route.ts';
import { updateVersioned } from './versions.ts';

let app: TestApp;
let person: Client;
let colleague: Client;
let organisationId: string;
let runs = 0;

beforeAll(async () => {
  app = await createTestApp({ closes: 'caller' });
  const organisation = await buildOrganisation(app);
  organisationId = organisation.id;
  person = await signInAs(app, await buildUser(app, organisation, ['quality-reviewer']));
  colleague = await signInAs(app, await buildUser(app, organisation, ['quality-reviewer']));
  declareTrialRoutes();
});
afterAll(() => app.close());

const named = z.strictObject({ name: z.string().min(1).max(50) });
const versioned = z.object({ name: z.string(), version: z.int() });

function declareTrialRoutes(): void {
  route(app.router, {
    method: 'post',
    path: '/trial/acts',
    permission: 'signed-in',
    summary: 'An act that must not happen twice',
    body: named,
    response: z.object({ name: z.string(), run: z.int() }),
    status: 201,
    idempotent: true,
    handler: ({ deed, body }) =>
      deed.transact(async (manager) => {
        runs += 1;
        await new Promise((resolve) => setTimeout(resolve, 50));
        await manager.insert(Organisation, { id: `act-${runs}`, name: body.name, createdAt: deed.now });
        if (body.name === 'fails') throw new Error('half-way');
        return { name: body.name, run: runs, secret: 'is dropped' };
      }),
  });
  route(app.router, {
    method: 'put',
    path: '/trial/name',
    permission: 'part:write',
    summary: 'A change based on a version',
    body: named,
    response: versioned,
    ifMatch: true,
    handler: async ({ deed, body, version }) => {
      const next = await deed.transact((manager) =>
        updateVersioned(manager, Organisation, { id: organisationId, version }, body),
      );
      return { name: body.name, version: next };
    },
  });
  route(app.router, {
    method: 'get',
    path: '/trial/fault',
    permission: 'signed-in',
    summary: 'A fault of ours',
    response: 'nothing',
    handler: () => Promise.reject(new Error('SELECT secret FROM /home/somebody')),
  });
}

describe('an act with a key', () => {
  const act = (client: Client, key: Record<string, string>, name = 'once') =>
    client.post('/api/trial/acts').set(key).send({ name });

  it('happens once for any number of presses, and answers the same bytes', async () => {
    const key = onceKey();
    const presses = await Promise.all(Array.from({ length: 20 }, () => act(person, key)));
    const done = presses.filter((press) => press.status === 201);
    expect(done.length).toBeGreaterThan(0);
    expect(presses.filter((press) => press.status === 409)).toHaveLength(20 - done.length);
    const again = await act(person, key).expect(201);
    expect(new Set([...done, again].map((press) => press.text)).size).toBe(1);
    expect(again.body).not.toHaveProperty('secret');
    expect(await acts('once')).toBe(1);
  });

  it('needs the key, refuses other content under it, and keeps it for the person and a day', async () => {
    const key = onceKey();
    const missing = await person.post('/api/trial/acts').send({ name: 'x' }).expect(400);
    expect(missing.body.type).toMatch(/idempotency-key-required$/);
    const mine = await act(person, key, 'mine').expect(201);
    await act(person, key, 'other').expect(422);
    const theirs = await act(colleague, key, 'mine').expect(201);
    expect(theirs.body.run).not.toBe(mine.body.run);
    await app.db.writeTransaction((manager) =>
      manager.query('UPDATE idempotency_keys SET created_at = ?', [
        new Date(app.clock.millis() - DAY).toISOString(),
      ]),
    );
    const later = await act(person, key, 'mine').expect(201);
    expect(later.body.run).not.toBe(mine.body.run);
  });

  it('leaves nothing when it fails half-way, and can be tried again', async () => {
    const key = onceKey();
    await act(person, key, 'fails').expect(500);
    expect(await acts('fails')).toBe(0);
    await act(person, key, 'fails').expect(500);
    await act(person, key, 'works now').expect(201);
  });
});

describe('a change based on a version', () => {
  const put = (name: string) => person.put('/api/trial/name').send({ name });

  it('is made by the first of two, and the second is shown what stands now', async () => {
    await put('A').expect(428);
    await put('A').set('If-Match', 'W/"1"').expect(400);
    await put('A').set('If-Match', '*').expect(400);
    const both = await Promise.all([put('A').set(ifVersion(1)), put('B').set(ifVersion(1))]);
    expect(both.map((answer) => answer.status).sort()).toEqual([200, 412]);
    const won = both.find((answer) => answer.status === 200);
    expect(won?.headers.etag).toBe('"2"');
    expect(both.find((answer) => answer.status === 412)?.body.current).toEqual({ version: 2 });
  });
});

describe('the border', () => {
  const post = (body: string, type = 'application/json') =>
    person.post('/api/trial/acts').set(onceKey()).set('Content-Type', type).send(body);

  it('says every fault at its place', async () => {
    const answer = await post('{"name":7,"more":1,"__x":2}').expect(422);
    expect(answer.headers['content-type']).toBe('application/problem+json');
    expect(answer.body).toMatchObject({
      status: 422,
      instance: expect.stringMatching(/^urn:uuid:/) as string,
    });
    expect(answer.body.errors.map((error: { pointer: string }) => error.pointer)).toEqual([
      '/name',
      '/more',
      '/__x',
    ]);
  });

  it.each([
    ['not json', '{"name":', 'application/json', 400],
    ['nothing', '', 'application/json', 422],
    ['a bare value', '"name"', 'application/json', 400],
    ['a form', 'name=x', 'application/x-www-form-urlencoded', 415],
    ['text', '{"name":"x"}', 'text/plain', 415],
    ['another charset', '{"name":"x"}', 'application/json; charset=utf-16', 415],
    ['a key into prototypes', '{"name":"x","__proto__":{"a":1}}', 'application/json', 400],
    ['deep nesting', `${'['.repeat(30)}${']'.repeat(30)}`, 'application/json', 400],
    ['more than 1 MB', JSON.stringify({ name: 'x'.repeat(1_100_000) }), 'application/json', 413],
  ])('refuses %s', async (_name, body, type, status) => {
    const answer = await post(body, type).expect(status);
    expect(answer.body).toMatchObject({
      status,
      title: expect.any(String) as string,
      detail: expect.any(String) as string,
    });
  });

  it('answers unknown addresses, other methods, unknown parameters', async () => {
    await person.get('/api/nowhere').expect(404);
    await person.get('/api/session/').expect(404);
    await person.get('/api/session?x=1').expect(422);
    const method = await person.patch('/api/session').send({}).expect(405);
    expect(method.headers.allow).toBe('POST, GET, DELETE, HEAD');
    await request(app.server).trace('/api/session').expect(405);
    await person.delete('/api/sessions/%zz').expect(400);
  });

  it('tells nothing of its inside when it fails', async () => {
    const answer = await person.get('/api/trial/fault').expect(500);
    expect(answer.text).not.toMatch(/SELECT|home|Error/);
    const line = app.logLines.find((one) => one.includes('SELECT secret'));
    expect(line).toContain(String(answer.body.instance).replace('urn:uuid:', ''));
  });

  it('sends the same protecting headers with every answer', async () => {
    for (const path of ['/api/session', '/api/nowhere', '/health/live', '/somewhere']) {
      const { headers } = await anonymous(app).get(path);
      expect(headers['content-security-policy'], path).toContain("default-src 'none'");
      expect(headers['content-security-policy'], path).not.toContain('unsafe');
      expect(headers, path).toMatchObject({
        'x-content-type-options': 'nosniff',
        'referrer-policy': 'no-referrer',
        'cross-origin-opener-policy': 'same-origin',
        'cross-origin-resource-policy': 'same-origin',
      });
      expect(headers, path).not.toHaveProperty('x-powered-by');
    }
  });

  it('never writes a cookie, token or password into the log', async () => {
    await anonymous(app)
      .post('/api/session')
      .send({ email: 'a@b.example', password: 'canary-in-a-coal-mine' });
    await person.get('/api/session').expect(200);
    const log = app.logLines.join('\n');
    expect(log).toContain('"route":"post /session"');
    expect(log).not.toMatch(/canary-in-a-coal-mine|trammel=|eyJ/);
  });
});

describe('limits', () => {
  it('are counted by person: one who floods does not stop another', async () => {
    const flooded = await createTestApp({ limits: { enabled: true, perPerson: 5 } });
    const organisation = await buildOrganisation(flooded);
    const one = await signInAs(flooded, await buildUser(flooded, organisation, ['purchasing']));
    const two = await signInAs(flooded, await buildUser(flooded, organisation, ['purchasing']));
    for (let call = 0; call < 5; call += 1) await one.get('/api/session').expect(200);
    const refused = await one.get('/api/session').expect(429);
    expect(Number(refused.headers['retry-after'])).toBeGreaterThan(0);
    await two.get('/api/session').expect(200);
  });
});

async function acts(name: string): Promise<number> {
  return app.db.reader.getRepository(Organisation).countBy({ name });
}
