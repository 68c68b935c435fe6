import type { Response } from 'supertest';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { buildCast } from '../../testing/builders.ts';
import { aCharacteristic, buildPart } from '../../testing/part-builders.ts';
import { onceKey, signInAs, type Client } from '../../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../../testing/test-app.ts';

let app: TestApp;
let reviewer: Client;
let revisionId: string;

beforeAll(async () => {
  app = await createTestApp({ closes: 'caller' });
  reviewer = await signInAs(app, (await buildCast(app)).reviewer);
});
afterAll(() => app.close());
beforeEach(async () => {
  revisionId = (await buildPart(reviewer)).revisions[0]?.id ?? '';
});

const post = (content: string | Buffer, name = 'sheet.csv', client = reviewer) =>
  client
    .post(`/api/revisions/${revisionId}/characteristic-imports`)
    .attach('file', Buffer.from(content), name);
const confirm = (importId: string, key = onceKey(), client = reviewer) =>
  client.post(`/api/characteristic-imports/${importId}/confirm`).set(key);
const read = async () =>
  (await reviewer.get(`/api/revisions/${revisionId}/characteristics`).expect(200)).body.items;

describe('what was exported', () => {
  const rows = [
    aCharacteristic({
      balloon: '1',
      description: '=cmd|"/c calc"!A1',
      note: '-2+3; a, "b"',
      zone: 'B4',
      sheet: '1',
      method: '@SUM(1,1)',
    }),
    aCharacteristic({
      balloon: '2',
      tolerance: { form: 'deviations', nominal: '2.50', upper: '-0.10', lower: '-0.20' },
      class: 'safety-regulatory',
    }),
    aCharacteristic({
      balloon: '3',
      tolerance: { form: 'limits', lower: '-9.95', upper: '10.050' },
      pieces: 30,
    }),
    aCharacteristic({
      balloon: '3a',
      tolerance: { form: 'limits', lower: '9.95', upper: '10.05', nominal: '10.0' },
    }),
    aCharacteristic({ balloon: '4', tolerance: { form: 'max', upper: '0.80' }, unit: 'µm' }),
    aCharacteristic({ balloon: '5', tolerance: { form: 'max', upper: '0.80', zeroBound: true } }),
    aCharacteristic({
      balloon: '6',
      tolerance: { form: 'min', lower: '45' },
      unit: 'N',
      kind: 'material-performance',
    }),
    aCharacteristic({
      balloon: '7',
      tolerance: { form: 'fit', nominal: '25', fitClass: 'H7' },
      decimals: 3,
      class: 'critical',
    }),
    aCharacteristic({ balloon: '8', tolerance: { form: 'general', nominal: '30', generalClass: 'm' } }),
    aCharacteristic({
      balloon: '9',
      tolerance: { form: 'general', nominal: '45', generalClass: 'm', feature: 'angular', shorterLeg: '50' },
      unit: 'deg',
    }),
    aCharacteristic({
      balloon: '10',
      kind: 'geometric',
      description: 'Hole pattern',
      tolerance: { form: 'max', upper: '0.15', zeroBound: true },
      geometric: {
        type: 'position',
        diametral: true,
        modifier: 'MMC',
        datums: 'A|B|C',
        feature: 'external',
        sizeBalloon: '7',
      },
    }),
    aCharacteristic({
      balloon: '11',
      kind: 'basic',
      tolerance: { form: 'none', nominal: '52.0' },
      controlledBy: ['10'],
    }),
    aCharacteristic({ balloon: '12', kind: 'reference', tolerance: { form: 'none', nominal: '27.00' } }),
    aCharacteristic({
      balloon: '13',
      kind: 'attribute',
      description: 'Thread',
      tolerance: { form: 'none' },
      unit: '1',
      decimals: 0,
      attributeAllowed: true,
    }),
  ];

  it.each(['csv', 'xlsx'] as const)('as %s imports again unchanged', async (format) => {
    await reviewer
      .put(`/api/revisions/${revisionId}/characteristics`)
      .send({ rows: rows.map((row) => ({ id: null, version: null, ...row })) })
      .expect(200);
    const before = await read();
    const exported = await reviewer
      .get(`/api/revisions/${revisionId}/characteristics/export?format=${format}`)
      .buffer()
      .parse(bytes)
      .expect(200);
    expect(exported.headers['content-disposition']).toMatch(
      new RegExp(`attachment; filename="[\\w.-]+\\.${format}"`),
    );
    const preview = (await post(exported.body, `again.${format}`).expect(201)).body;
    expect(preview.refused).toEqual([]);
    expect(preview.counts).toEqual({ add: 0, replace: 0, same: rows.length, refused: 0 });

    const twin = (await buildPart(reviewer)).revisions[0]?.id ?? '';
    revisionId = twin;
    const other = (await post(exported.body, `again.${format}`).expect(201)).body;
    await confirm(other.importId).expect(200);
    const fields = (items: Record<string, unknown>[]) =>
      items.map(({ id: _i, revisionId: _r, version: _v, ...rest }) => rest);
    expect(fields(await read())).toEqual(fields(before));
  });

  it('carries no cell that a spreadsheet program would run', async () => {
    await reviewer
      .put(`/api/revisions/${revisionId}/characteristics`)
      .send({ rows: rows.map((row) => ({ id: null, version: null, ...row })) })
      .expect(200);
    const { text } = await reviewer
      .get(`/api/revisions/${revisionId}/characteristics/export`)
      .buffer()
      .expect(200);
    const cells = text
      .replace(/^\uFEFF/, '')
      .split('\r\n')
      .flatMap((line: string) => line.split(/,(?=(?:[^"]*"[^"]*")*[^"]*$)/))
      .map((cell: string) => cell.replace(/^"/, ''));
    expect(
      cells.filter((cell: string) => /^[=+@\t\r]/.test(cell) || /^-(?!\d+(\.\d+)?"?$)/.test(cell)),
    ).toEqual([]);
    expect(cells).toContain('-0.10');
  });

  it('has a template that imports without a refused row', async () => {
    for (const format of ['csv', 'xlsx']) {
      const template = await reviewer
        .get(`/api/characteristic-template?format=${format}`)
        .buffer()
        .parse(bytes)
        .expect(200);
      const preview = (await post(template.body, `template.${format}`).expect(201)).body;
      expect(preview.counts).toEqual({ add: 2, replace: 0, same: 0, refused: 0 });
    }
  });
});

function bytes(answer: Response, done: (error: Error | null, body: unknown) => void): void {
  const chunks: Buffer[] = [];
  const stream = answer as unknown as NodeJS.ReadableStream;
  stream.on('data', (chunk: Buffer) => chunks.push(Buffer.from(chunk)));
  stream.on('end', () => done(null, Buffer.concat(chunks)));
}
