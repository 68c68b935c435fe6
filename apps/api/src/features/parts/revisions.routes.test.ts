import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildCast, type Cast } from '../../testing/builders.ts';
import {
  aCharacteristic,
  buildFile,
  buildIssuedRequest,
  buildPart,
  readRevision,
  releaseWith,
  revisionFacts,
} from '../../testing/part-builders.ts';
import { ifVersion, onceKey, signInAs, type Client } from '../../testing/sign-in.ts';
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

describe('a drawing revision', () => {
  it('takes a drawing of its own organisation only', async () => {
    const part = await buildPart(reviewer);
    const draft = await readRevision(reviewer, part.revisions[0]?.id ?? '');
    const put = (drawingFileId: string) =>
      reviewer
        .put(`/api/revisions/${draft.id}`)
        .set(ifVersion(draft.version))
        .send(revisionFacts(draft, { drawingFileId }));
    const foreign = await put(await buildFile(app, cast.supplierQuality)).expect(422);
    expect(foreign.body.errors[0].pointer).toBe('/drawingFileId');
    await put(await buildFile(app, cast.reviewer, 'text/csv')).expect(422);
    const file = await buildFile(app, cast.reviewer);
    const changed = await put(file).expect(200);
    expect(changed.body).toMatchObject({
      drawing: { id: file, name: 'drawing.pdf' },
      version: draft.version + 1,
    });
  });

  it('names everything that stands between it and its release', async () => {
    const part = await buildPart(reviewer);
    const id = part.revisions[0]?.id ?? '';
    expect((await readRevision(reviewer, id)).releaseBlockers).toEqual([
      'No drawing is attached.',
      'No characteristic has been entered.',
    ]);
    const rows = [
      aCharacteristic({ balloon: '4', tolerance: { form: 'none', nominal: '19.0' } }),
      aCharacteristic({
        balloon: '5',
        kind: 'geometric',
        description: 'Position',
        tolerance: { form: 'max', upper: '0.15', zeroBound: true },
        geometric: { type: 'position', modifier: 'MMC', sizeBalloon: '4' },
      }),
      aCharacteristic({
        balloon: '6',
        kind: 'geometric',
        description: 'Position',
        tolerance: { form: 'max', upper: '0.15', zeroBound: true },
        geometric: { type: 'position', modifier: 'MMC', sizeBalloon: '99' },
      }),
      aCharacteristic({
        balloon: '7',
        kind: 'basic',
        description: 'Distance',
        tolerance: { form: 'none', nominal: '52.0' },
      }),
      aCharacteristic({ balloon: '8', kind: 'reference', tolerance: { form: 'none', nominal: '27' } }),
    ].map((row) => ({ id: null, version: null, ...row }));
    await reviewer.put(`/api/revisions/${id}/characteristics`).send({ rows }).expect(200);
    const revision = await readRevision(reviewer, id);
    expect(revision.releaseBlockers).toEqual([
      'No drawing is attached.',
      'Balloon 4 has no tolerance: give its limits, or make it a reference or basic dimension.',
      'Balloon 5 at MMC takes its bonus from balloon 4, which needs a lower and an upper limit.',
      'Balloon 6 at MMC takes its bonus from balloon 99, which is not on the drawing.',
      'Balloon 7 is basic but no row controls it: name the geometric row.',
    ]);
    expect(revision.abilities).toEqual({ edit: true, release: false });
    const refused = await reviewer
      .post(`/api/revisions/${id}/release`)
      .set(ifVersion(revision.version))
      .set(onceKey())
      .expect(409);
    expect(refused.body.detail).toContain('Balloon 7 is basic');
  });

  it('is frozen by its release, once, and then changes no more', async () => {
    const part = await buildPart(reviewer);
    const id = part.revisions[0]?.id ?? '';
    await reviewer.post(`/api/revisions/${id}/release`).set(ifVersion(1)).expect(400);
    const released = await releaseWith(app, reviewer, cast.reviewer, id);
    expect(released).toMatchObject({
      state: 'released',
      releasedBy: cast.reviewer.name,
      abilities: { edit: false, release: false },
    });
    await reviewer
      .put(`/api/revisions/${id}`)
      .set(ifVersion(released.version))
      .send(revisionFacts(released))
      .expect(409);
    await reviewer
      .post(`/api/revisions/${id}/characteristics`)
      .send(aCharacteristic({ balloon: '2' }))
      .expect(409);
    await reviewer
      .post(`/api/revisions/${id}/release`)
      .set(ifVersion(released.version))
      .set(onceKey())
      .expect(409);
  });

  it('is released once for one key, and not on a version that someone has moved on from', async () => {
    const part = await buildPart(reviewer);
    const id = part.revisions[0]?.id ?? '';
    const draft = await readRevision(reviewer, id);
    await reviewer
      .put(`/api/revisions/${id}`)
      .set(ifVersion(draft.version))
      .send(revisionFacts(draft, { drawingFileId: await buildFile(app, cast.reviewer) }))
      .expect(200);
    await reviewer.post(`/api/revisions/${id}/characteristics`).send(aCharacteristic()).expect(201);
    const seen = await readRevision(reviewer, id);
    await reviewer
      .post(`/api/revisions/${id}/characteristics`)
      .send(aCharacteristic({ balloon: '2' }))
      .expect(201);
    await reviewer
      .post(`/api/revisions/${id}/release`)
      .set(ifVersion(seen.version))
      .set(onceKey())
      .expect(412);
    const now = await readRevision(reviewer, id);
    const key = onceKey();
    const first = await reviewer
      .post(`/api/revisions/${id}/release`)
      .set(ifVersion(now.version))
      .set(key)
      .expect(200);
    const again = await reviewer
      .post(`/api/revisions/${id}/release`)
      .set(ifVersion(now.version))
      .set(key)
      .expect(200);
    expect(again.body).toEqual(first.body);
  });

  it('is superseded by the next one, which starts as a copy and never gives a number again', async () => {
    const part = await buildPart(reviewer);
    const first = part.revisions[0]?.id ?? '';
    await releaseWith(app, reviewer, cast.reviewer, first, [
      aCharacteristic(),
      aCharacteristic({ balloon: '2', description: 'Length' }),
      aCharacteristic({ balloon: '3', description: 'Width' }),
    ]);
    await reviewer
      .post(`/api/parts/${part.id}/revisions`)
      .send({ code: 'A', copyFromRevisionId: first })
      .expect(422);
    const next = (
      await reviewer
        .post(`/api/parts/${part.id}/revisions`)
        .send({ code: 'B', copyFromRevisionId: first })
        .expect(201)
    ).body;
    expect(next).toMatchObject({
      state: 'draft',
      characteristicCount: 3,
      copiedFrom: { id: first, code: 'A' },
    });
    await reviewer.post(`/api/parts/${part.id}/revisions`).send({ code: 'C' }).expect(409);

    const { items } = (await reviewer.get(`/api/revisions/${next.id}/characteristics`).expect(200)).body;
    const [one, two, three] = items;
    await reviewer.delete(`/api/characteristics/${two.id}`).set(ifVersion(two.version)).expect(204);
    const taken = await reviewer
      .post(`/api/revisions/${next.id}/characteristics`)
      .send(aCharacteristic({ balloon: '2', description: 'Depth' }))
      .expect(422);
    expect(taken.body.errors[0]).toMatchObject({ pointer: '/balloon' });
    const { id: _one, ...oneFields } = asRequest(one);
    await reviewer
      .put(`/api/characteristics/${one.id}`)
      .set(ifVersion(one.version))
      .send({ ...oneFields, tolerance: { form: 'symmetric', nominal: '25.00', tolerance: '0.04' } })
      .expect(200);
    const { id: _three, ...threeFields } = asRequest(three);
    await reviewer
      .put(`/api/characteristics/${three.id}`)
      .set(ifVersion(three.version))
      .send({
        ...threeFields,
        tolerance: { form: 'limits', lower: '24.95', upper: '25.05', nominal: '25.00' },
      })
      .expect(200);
    await reviewer
      .post(`/api/revisions/${next.id}/characteristics`)
      .send(aCharacteristic({ balloon: '4', description: 'Depth' }))
      .expect(201);

    const comparison = (await reviewer.get(`/api/revisions/${next.id}/comparison?with=${first}`).expect(200))
      .body;
    expect(
      comparison.rows.map((row: { balloon: string; change: string }) => [row.balloon, row.change]),
    ).toEqual([
      ['1', 'changed'],
      ['2', 'removed'],
      ['3', 'text-only'],
      ['4', 'added'],
    ]);
    await releaseWith(app, reviewer, cast.reviewer, next.id, []);
    expect((await readRevision(reviewer, first)).state).toBe('superseded');
    const list = (await reviewer.get(`/api/parts?q=${part.number}`).expect(200)).body.items;
    expect(list).toMatchObject([{ currentRevision: 'B', draftRevision: null }]);
  });

  it('is read by a supplier only after a request for it was issued to that supplier', async () => {
    const part = await buildPart(reviewer);
    const id = part.revisions[0]?.id ?? '';
    const released = await releaseWith(app, reviewer, cast.reviewer, id);
    const supplier = await signInAs(app, cast.supplierQuality);
    const rival = await signInAs(app, cast.otherSupplierQuality);
    await supplier.get(`/api/revisions/${id}`).expect(404);
    await buildIssuedRequest(app, cast.reviewer, cast.supplier, released);
    const seen = await supplier.get(`/api/revisions/${id}`).expect(200);
    expect(seen.body).toMatchObject({
      code: 'A',
      abilities: { edit: false, release: false },
      releaseBlockers: [],
      copiedFrom: null,
    });
    expect((await supplier.get(`/api/revisions/${id}/characteristics`).expect(200)).body.items).toHaveLength(
      1,
    );
    await rival.get(`/api/revisions/${id}`).expect(404);
    await supplier.put(`/api/revisions/${id}/characteristics`).send({ rows: [] }).expect(403);
    await supplier.get(`/api/revisions/${id}/comparison?with=${id}`).expect(403);
  });
});

function asRequest(row: Record<string, unknown>): Record<string, unknown> {
  const {
    revisionId: _r,
    sequence: _s,
    nominal: _n,
    lowerLimit: _l,
    upperLimit: _u,
    naturalLower: _z,
    explanation: _e,
    version: _v,
    ...rest
  } = row;
  return rest;
}
