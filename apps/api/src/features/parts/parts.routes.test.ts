import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { randomUUID } from 'node:crypto';
import { buildCast, type Cast } from '../../testing/builders.ts';
import { buildPart } from '../../testing/part-builders.ts';
import { anonymous, ifVersion, signInAs, type Client } from '../../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../../testing/test-app.ts';

let app: TestApp;
let cast: Cast;
let reviewer: Client;

beforeAll(async () => {
  app = await createTestApp({ closes: 'caller' });
  cast = await buildCast(app);
  reviewer = await signInAs(app, cast.reviewer);
});
afterAll(() => app.close());

describe('parts', () => {
  it('are refused to anyone without a session, to other roles and to other organisations alike', async () => {
    const part = await buildPart(reviewer);
    const revisionId = part.revisions[0]?.id ?? '';
    await anonymous(app).get('/api/parts').expect(401);
    await anonymous(app).get(`/api/parts/${part.id}`).expect(401);
    for (const person of [cast.purchaser, cast.customerAdministrator, cast.supplierQuality]) {
      const other = await signInAs(app, person);
      await other.get('/api/parts').expect(403);
      await other.post('/api/parts').send({ number: 'X', name: 'X', firstRevision: 'A' }).expect(403);
      await other.get(`/api/parts/${part.id}`).expect(403);
    }
    const stranger = await signInAs(app, cast.otherReviewer);
    for (const path of [
      `/api/parts/${part.id}`,
      `/api/revisions/${revisionId}`,
      `/api/revisions/${revisionId}/characteristics`,
    ]) {
      const foreign = await stranger.get(path).expect(404);
      const random = await stranger.get(path.replace(/[0-9a-f-]{36}/, randomUUID())).expect(404);
      expect({ ...foreign.body, instance: '' }).toEqual({ ...random.body, instance: '' });
    }
    expect((await stranger.get('/api/parts').expect(200)).body.items).toEqual([]);
  });

  it('are created with their first revision, and no number is given twice in one organisation', async () => {
    await reviewer.post('/api/parts').send({ number: '', name: 'Shaft' }).expect(422);
    const wrong = await reviewer
      .post('/api/parts')
      .send({ number: 'A1', name: 'B', firstRevision: 'A', organisationId: randomUUID() })
      .expect(422);
    expect(wrong.body.errors).toContainEqual({
      pointer: '/organisationId',
      detail: 'There is no such field here.',
    });
    const part = await buildPart(reviewer, { number: 'TD-20417' });
    expect(part).toMatchObject({
      number: 'TD-20417',
      revisions: [{ code: 'A', state: 'draft', characteristicCount: 0 }],
    });
    const twice = await reviewer
      .post('/api/parts')
      .send({ number: 'TD-20417', name: 'Other', firstRevision: 'A' })
      .expect(422);
    expect(twice.body.errors).toEqual([
      { pointer: '/number', detail: 'There is already a part with this number.' },
    ]);
    const stranger = await signInAs(app, cast.otherReviewer);
    await stranger
      .post('/api/parts')
      .send({ number: 'TD-20417', name: 'Same number elsewhere', firstRevision: 'A' })
      .expect(201);
  });

  it('change only for the one who saw the newest version', async () => {
    const part = await buildPart(reviewer);
    const facts = {
      number: part.number,
      name: 'Shaft, ground',
      material: '42CrMo4',
      commodity: 'turned',
      unitSystem: 'metric',
      safetyOrRegulatory: true,
    };
    await reviewer.put(`/api/parts/${part.id}`).send(facts).expect(428);
    const both = await Promise.all([
      reviewer.put(`/api/parts/${part.id}`).set(ifVersion(part.version)).send(facts),
      reviewer
        .put(`/api/parts/${part.id}`)
        .set(ifVersion(part.version))
        .send({ ...facts, name: 'Other name' }),
    ]);
    expect(both.map((answer) => answer.status).sort()).toEqual([200, 412]);
    const stale = both.find((answer) => answer.status === 412);
    expect(stale?.body.current).toMatchObject({ id: part.id, version: part.version + 1 });
  });

  it('are listed by page, searched and sorted', async () => {
    const other = await signInAs(app, cast.otherReviewer);
    for (const name of ['Alpha lever', 'Beta lever', 'Gamma 100% lever']) await buildPart(other, { name });
    const first = await other.get('/api/parts?q=lever&sort=-name&limit=2').expect(200);
    expect(first.body.items.map((item: { name: string }) => item.name)).toEqual([
      'Gamma 100% lever',
      'Beta lever',
    ]);
    const second = await other
      .get(`/api/parts?q=lever&sort=-name&limit=2&cursor=${first.body.nextCursor}`)
      .expect(200);
    expect(second.body).toMatchObject({
      items: [{ name: 'Alpha lever', draftRevision: 'A', currentRevision: null }],
      nextCursor: null,
    });
    expect((await other.get('/api/parts?q=100%25').expect(200)).body.items).toHaveLength(1);
    await other.get('/api/parts?sort=secret').expect(422);
  });
});
