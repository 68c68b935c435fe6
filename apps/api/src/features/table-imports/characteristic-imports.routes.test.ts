import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { buildCast, type Cast } from '../../testing/builders.ts';
import { buildPart } from '../../testing/part-builders.ts';
import { anonymous, onceKey, signInAs, type Client } from '../../testing/sign-in.ts';
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

const sheet = [
  'Balloon;Description;Nominal;Tolerance;Unit;Class',
  '1;Länge;142,0;±0,2;mm;',
  '2;Sitz A;25 k6;;mm;kritisch',
  '3;Rauheit;;≤ 0,8 µm;;',
  '4;Bohrung;10;0,1;mm;',
  '5;Ebenheit;;0,20;mm;wichtig',
  ';Summe;1;2;;',
].join('\r\n');

const post = (content: string | Buffer, name = 'sheet.csv', client = reviewer) =>
  client
    .post(`/api/revisions/${revisionId}/characteristic-imports`)
    .attach('file', Buffer.from(content), name);
const confirm = (importId: string, key = onceKey(), client = reviewer) =>
  client.post(`/api/characteristic-imports/${importId}/confirm`).set(key);
const read = async () =>
  (await reviewer.get(`/api/revisions/${revisionId}/characteristics`).expect(200)).body.items;

describe('an import of characteristics', () => {
  it('is refused to strangers at every step', async () => {
    await post(sheet, 'a.csv', anonymous(app)).expect(401);
    const stranger = await signInAs(app, cast.otherReviewer);
    await post(sheet, 'a.csv', stranger).expect(404);
    await post(sheet, 'a.csv', await signInAs(app, cast.supplierQuality)).expect(403);
    const { importId, settings, mapping } = (await post(sheet).expect(201)).body;
    await stranger
      .post(`/api/characteristic-imports/${importId}/preview`)
      .send({ settings, mapping })
      .expect(404);
    await confirm(importId, onceKey(), stranger).expect(404);
    await reviewer
      .post(`/api/reading-imports/${importId}/confirm`)
      .set(onceKey())
      .send({ conflicts: { choice: 'keep' } })
      .expect(403);
    expect(await read()).toEqual([]);
  });

  it('shows what it understood and every refused row, and writes nothing before it is confirmed', async () => {
    const { body } = await post(sheet).expect(201);
    expect(body.settings).toMatchObject({
      encoding: 'utf-8',
      delimiter: ';',
      decimalSign: ',',
      headerLine: 1,
    });
    expect(body.counts).toEqual({ add: 3, replace: 0, same: 0, refused: 3 });
    expect(
      body.rows.map((row: Record<string, unknown>) => [
        row.line,
        row.balloon,
        row.lowerLimit,
        row.upperLimit,
        row.unit,
      ]),
    ).toEqual([
      [2, '1', '141.8', '142.2', 'mm'],
      [3, '2', '25.002', '25.015', 'mm'],
      [4, '3', null, '0.8', 'µm'],
    ]);
    expect(body.refused.map((issue: Record<string, unknown>) => [issue.line, issue.column])).toEqual([
      [5, 'Tolerance'],
      [6, 'Class'],
      [7, 'Balloon'],
    ]);
    for (const issue of body.refused) expect(issue.remedy).not.toBe('');
    expect(await read()).toEqual([]);
  });

  it('reads the same file under other settings and columns when the person says so', async () => {
    const ambiguous = ['No,Feature,Size,Upper,Lower', '1,Bore,12.5,0.1,-0.1', '2,Slot,8,0.05,0'].join('\n');
    const first = (await post(ambiguous).expect(201)).body;
    expect(first.refused[0].remedy).toContain('deviation');
    const mapping = { balloon: 0, description: 1, nominal: 2, upperDeviation: 3, lowerDeviation: 4 };
    const preview = `/api/characteristic-imports/${first.importId}/preview`;
    const second = (await reviewer.post(preview).send({ settings: first.settings, mapping }).expect(200))
      .body;
    expect(second.counts).toEqual({ add: 2, replace: 0, same: 0, refused: 0 });
    expect(second.rows[0]).toMatchObject({ lowerLimit: '12.4', upperLimit: '12.6' });
    await reviewer
      .post(preview)
      .send({ settings: { ...first.settings, delimiter: '#' }, mapping })
      .expect(422);
    await confirm(first.importId).expect(200);
    expect((await read()).map((row: { tolerance: { form: string } }) => row.tolerance.form)).toEqual([
      'deviations',
      'deviations',
    ]);
  });

  it.each([
    ['UTF-16 LE', Buffer.concat([Buffer.from([0xff, 0xfe]), Buffer.from(sheet, 'utf16le')]), 'utf-16le'],
    [
      'UTF-16 BE',
      Buffer.concat([Buffer.from([0xfe, 0xff]), Buffer.from(sheet, 'utf16le').swap16()]),
      'utf-16be',
    ],
    ['UTF-8 with a mark', Buffer.from(`\uFEFF${sheet}`, 'utf8'), 'utf-8'],
    ['Windows-1252', Buffer.from(sheet.replace('≤ 0,8 µm', 'max 0,8 µm'), 'latin1'), 'windows-1252'],
  ])('reads %s and says which encoding it took', async (_name, bytes, encoding) => {
    const { body } = await post(bytes).expect(201);
    expect(body.settings.encoding).toBe(encoding);
    expect(body.counts).toMatchObject({ add: 3, refused: 3 });
    expect(body.rows[0].description).toBe('Länge');
  });

  it('is confirmed once, and says what it wrote, left and skipped', async () => {
    const { importId } = (await post(sheet).expect(201)).body;
    await reviewer.post(`/api/characteristic-imports/${importId}/confirm`).expect(400);
    const key = onceKey();
    expect((await confirm(importId, key).expect(200)).body).toEqual({ written: 3, unchanged: 0, skipped: 3 });
    expect((await confirm(importId, key).expect(200)).body).toEqual({ written: 3, unchanged: 0, skipped: 3 });
    await confirm(importId).expect(409);
    expect(await read()).toHaveLength(3);
    const again = (await post(sheet.replace('±0,2', '±0,3')).expect(201)).body;
    expect(again.counts).toEqual({ add: 0, replace: 1, same: 2, refused: 3 });
    expect((await confirm(again.importId).expect(200)).body).toEqual({
      written: 1,
      unchanged: 2,
      skipped: 3,
    });
    expect((await read())[0]).toMatchObject({ balloon: '1', upperLimit: '142.3', version: 2 });
  });

  it('lets a file go after a day', async () => {
    const { importId, settings, mapping } = (await post(sheet).expect(201)).body;
    app.clock.advance(25 * 3_600_000);
    const later = await signInAs(app, cast.reviewer);
    await later
      .post(`/api/characteristic-imports/${importId}/preview`)
      .send({ settings, mapping })
      .expect(404);
    reviewer = later;
  });

  it('refuses what is empty, unreadable or no table', async () => {
    await post('').expect(422);
    await post('a;"b\n1;2').expect(422);
    const page = await post('<!doctype html><table><tr><td>1</td></tr></table>').expect(422);
    expect(page.body.errors[0].detail).toContain('web page');
    await reviewer.post(`/api/revisions/${revisionId}/characteristic-imports`).expect(422);
    await post(Buffer.alloc(11 * 1024 * 1024, 0x31)).expect(413);
  });
});
