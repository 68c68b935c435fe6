import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { buildCast, type Cast } from '../../testing/builders.ts';
import { aCharacteristic, buildPart, readRevision } from '../../testing/part-builders.ts';
import { anonymous, ifVersion, signInAs, type Client } from '../../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../../testing/test-app.ts';

let app: TestApp;
let cast: Cast;
let reviewer: Client;
let revisionId: string;

beforeAll(async () => {
  app = await createTestApp({ closes: 'caller' });
  cast = await buildCast(app);
  reviewer = await signInAs(app, cast.reviewer);
});
afterAll(() => app.close());
beforeEach(async () => {
  revisionId = (await buildPart(reviewer)).revisions[0]?.id ?? '';
});

const row = (overrides: Parameters<typeof aCharacteristic>[0]) => ({
  id: null,
  version: null,
  ...aCharacteristic(overrides),
});
const save = (rows: unknown[], removed: unknown[] = []) =>
  reviewer.put(`/api/revisions/${revisionId}/characteristics`).send({ rows, removed });
const read = async () =>
  (await reviewer.get(`/api/revisions/${revisionId}/characteristics`).expect(200)).body.items;

describe('the table of characteristics', () => {
  it('is refused to strangers and to those who may not write', async () => {
    const path = `/api/revisions/${revisionId}/characteristics`;
    await anonymous(app).get(path).expect(401);
    await (await signInAs(app, cast.purchaser)).get(path).expect(403);
    await (await signInAs(app, cast.supplierQuality)).get(path).expect(404);
    await (
      await signInAs(app, cast.otherReviewer)
    )
      .put(path)
      .send({ rows: [row({})] })
      .expect(404);
    await (await signInAs(app, cast.otherReviewer)).post(path).send(aCharacteristic()).expect(404);
    expect(await read()).toEqual([]);
  });

  it('works out exact limits for every way a drawing gives them, and keeps the text as typed', async () => {
    const rows = [
      row({ balloon: '10', tolerance: { form: 'symmetric', nominal: '2.50', tolerance: '0.1' } }),
      row({ balloon: '2', tolerance: { form: 'deviations', nominal: '12.5', upper: '0.2', lower: '-0.10' } }),
      row({ balloon: '3', tolerance: { form: 'limits', lower: '9.95', upper: '10.05' } }),
      row({ balloon: '4', tolerance: { form: 'max', upper: '0.8' } }),
      row({ balloon: '4a', tolerance: { form: 'max', upper: '0.80', zeroBound: true } }),
      row({ balloon: '5', tolerance: { form: 'min', lower: '45' }, unit: 'N', decimals: 0 }),
      row({ balloon: '6', tolerance: { form: 'fit', nominal: '25', fitClass: 'k6' }, decimals: 3 }),
      row({ balloon: '7', tolerance: { form: 'general', nominal: '30', generalClass: 'm' } }),
      row({ balloon: '8', kind: 'reference', tolerance: { form: 'none', nominal: '27.0' } }),
    ];
    const { items } = (await save(rows).expect(200)).body;
    expect(
      items.map((item: Record<string, unknown>) => [
        item.balloon,
        item.nominal,
        item.lowerLimit,
        item.upperLimit,
        item.naturalLower,
      ]),
    ).toEqual([
      ['2', '12.5', '12.40', '12.70', false],
      ['3', null, '9.95', '10.05', false],
      ['4', null, null, '0.8', false],
      ['4a', null, '0', '0.80', true],
      ['5', null, '45', null, false],
      // 25 k6 per ISO 286: +15/+2 µm (JOB demo scenario, from memory).
      ['6', '25', '25.002', '25.015', false],
      // ISO 2768-m, 30 mm: ± 0.2 (from memory).
      ['7', '30', '29.8', '30.2', false],
      ['8', '27.0', null, null, false],
      ['10', '2.50', '2.40', '2.60', false],
    ]);
    expect(items.map((item: { sequence: number }) => item.sequence)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9]);
  });

  it('writes nothing when one row is wrong, and points at each wrong row', async () => {
    const answer = await save([
      row({ balloon: '1' }),
      row({ balloon: '2', tolerance: { form: 'limits', lower: '10', upper: '9' } }),
      row({ balloon: '1', description: 'Twice' }),
      row({ balloon: '4', kind: 'geometric' }),
      row({ balloon: '5', tolerance: { form: 'fit', nominal: '1', fitClass: 'H7' }, unit: 'in' }),
    ]).expect(422);
    expect(answer.body.errors.map((error: { pointer: string }) => error.pointer)).toEqual([
      '/rows/1/tolerance',
      '/rows/3/geometric',
      '/rows/4/tolerance',
      '/rows/2/balloon',
    ]);
    const shapes = await save([
      row({ balloon: '1' }),
      row({ balloon: 'twelve' }),
      row({ tolerance: { form: 'max', upper: '1,5' } }),
    ]).expect(422);
    expect(shapes.body.errors.map((error: { pointer: string }) => error.pointer)).toEqual([
      '/rows/1/balloon',
      '/rows/2/tolerance/upper',
    ]);
    expect(await read()).toEqual([]);
  });

  it('adds, changes, exchanges numbers and removes in one block', async () => {
    const { items } = (
      await save([
        row({ balloon: '1' }),
        row({ balloon: '2', description: 'Length' }),
        row({ balloon: '3', description: 'Depth' }),
      ]).expect(200)
    ).body;
    const [one, two, three] = items;
    const edited = (
      item: { id: string; version: number },
      overrides: Parameters<typeof aCharacteristic>[0],
    ) => ({ ...aCharacteristic(overrides), id: item.id, version: item.version });
    const answer = await save(
      [
        edited(one, { balloon: '2' }),
        edited(two, { balloon: '1', description: 'Length' }),
        row({ balloon: '4', description: 'Width' }),
      ],
      [{ id: three.id, version: three.version }],
    ).expect(200);
    expect(
      answer.body.items.map((item: Record<string, unknown>) => [
        item.balloon,
        item.description,
        item.version,
      ]),
    ).toEqual([
      ['1', 'Length', 2],
      ['2', 'Seat diameter', 2],
      ['4', 'Width', 1],
    ]);
  });

  it('refuses to write over what someone else has changed, and shows it as it stands', async () => {
    const [item] = (await save([row({ balloon: '1' })]).expect(200)).body.items;
    const change = (description: string) =>
      save([{ ...aCharacteristic({ description }), id: item.id, version: item.version }]);
    const both = await Promise.all([change('Mine'), change('Theirs')]);
    expect(both.map((answer) => answer.status).sort()).toEqual([200, 412]);
    const stale = both.find((answer) => answer.status === 412);
    expect(stale?.body.current.items).toHaveLength(1);
    await reviewer.put(`/api/characteristics/${item.id}`).send(aCharacteristic()).expect(428);
    await reviewer
      .put(`/api/characteristics/${item.id}`)
      .set(ifVersion(1))
      .send(aCharacteristic())
      .expect(412);
    await reviewer.delete(`/api/characteristics/${item.id}`).set(ifVersion(1)).expect(412);
    expect(await read()).toHaveLength(1);
  });

  it('raises the version of the revision and leaves one line in the trail for a block', async () => {
    const before = await readRevision(reviewer, revisionId);
    await save([row({ balloon: '1' }), row({ balloon: '2', description: 'Length' })]).expect(200);
    expect((await readRevision(reviewer, revisionId)).version).toBe(before.version + 1);
    const trail: { summary: string }[] = await app.db.reader.query(
      `SELECT summary FROM audit_events WHERE object_id = ?`,
      [revisionId],
    );
    expect(trail.map((event) => event.summary)).toEqual([
      'Characteristics of revision A: 2 added, 0 changed, 0 removed',
    ]);
  });

  it('saves 2,000 rows as one block', async () => {
    const rows = Array.from({ length: 2000 }, (_, index) =>
      row({ balloon: String(index + 1), description: `Feature ${index + 1}` }),
    );
    expect((await save(rows).expect(200)).body.items).toHaveLength(2000);
    await save([...rows, row({ balloon: '2001' })]).expect(422);
  });
});
