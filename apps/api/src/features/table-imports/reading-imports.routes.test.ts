import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { buildScene, openPackage, placeRound, type Scene } from '../../testing/package-builders.ts';
import { aCharacteristic } from '../../testing/part-builders.ts';
import { anonymous, onceKey, signInAs, type Client } from '../../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../../testing/test-app.ts';

const rows = [
  aCharacteristic({
    balloon: '1',
    description: 'Length',
    tolerance: { form: 'symmetric', nominal: '142.00', tolerance: '0.20' },
  }),
  aCharacteristic({
    balloon: '2',
    description: 'Seat',
    tolerance: { form: 'symmetric', nominal: '25.4', tolerance: '0.1' },
  }),
  aCharacteristic({
    balloon: '3',
    description: 'Thread',
    kind: 'attribute',
    tolerance: { form: 'none' },
    unit: '1',
    decimals: 0,
    attributeAllowed: true,
  }),
];

let app: TestApp;
let scene: Scene;
let submissionId: string;
let supplier: Client;

beforeAll(async () => {
  app = await createTestApp({ closes: 'caller' });
});
afterAll(() => app.close());
beforeEach(async () => {
  scene = await buildScene(app, rows);
  supplier = scene.supplier;
  ({ submissionId } = await openPackage(scene));
});

const post = (content: string, name = 'readings.csv', client = supplier) =>
  client.post(`/api/submissions/${submissionId}/reading-imports`).attach('file', Buffer.from(content), name);
const confirm = (importId: string, conflicts: unknown = { choice: 'keep' }, key = onceKey()) =>
  supplier.post(`/api/reading-imports/${importId}/confirm`).set(key).send({ conflicts });

interface Sheet {
  readonly pieces: {
    readonly id: string;
    readonly label: string;
    readonly streamId: string;
    readonly sequence: number;
  }[];
  readonly characteristics: { readonly id: string; readonly balloon: string }[];
  readonly rows: {
    readonly characteristicId: string;
    readonly streamId: string;
    readonly readings: (string | null)[];
    readonly verdict: string;
  }[];
}

/** Readings by balloon and label of the piece. */
async function readings(): Promise<Record<string, string>> {
  const { body } = await supplier.get(`/api/submissions/${submissionId}/measurements`).expect(200);
  const sheet = body as Sheet;
  const found: Record<string, string> = {};
  for (const row of sheet.rows) {
    const balloon = sheet.characteristics.find((one) => one.id === row.characteristicId)?.balloon ?? '';
    const inStream = sheet.pieces
      .filter((piece) => piece.streamId === row.streamId)
      .sort((a, b) => a.sequence - b.sequence);
    row.readings.forEach((text, index) => {
      if (text !== null) found[`${balloon}/${inStream[index]?.label ?? ''}`] = text;
    });
  }
  return found;
}

const long = [
  'char;stream;piece;value;unit',
  '1;Spindle 1;1;142,05;mm',
  '1;Spindle 2;1;141,990;mm',
  '2;Spindle 1;1;1,0000;in',
  '3;Spindle 1;1;i.O.;',
  '1;Spindle 9;1;142,0;mm',
  '9;Spindle 1;1;1,0;mm',
  '1;Spindle 1;2;OK;',
  '1;Spindle 1;3;142,0 kg;',
].join('\n');

describe('an import of readings', () => {
  it('is refused to everyone but the supplier of the package, and once it is submitted to the supplier too', async () => {
    await post(long, 'a.csv', anonymous(app)).expect(401);
    await post(long, 'a.csv', scene.reviewer).expect(403);
    await post(long, 'a.csv', await signInAs(app, scene.cast.otherSupplierQuality)).expect(404);
    const { importId } = (await post(long).expect(201)).body;
    const colleague = await signInAs(app, scene.cast.supplierSigner);
    await colleague
      .post(`/api/reading-imports/${importId}/confirm`)
      .set(onceKey())
      .send({ conflicts: { choice: 'keep' } })
      .expect(404);
    await placeRound(app, submissionId, { state: 'submitted' });
    await post(long).expect(409);
    await confirm(importId).expect(409);
  });

  it('places a long table by stream and number, keeps another unit as written, and names each refused line', async () => {
    const { body } = await post(long).expect(201);
    expect(body.mapping).toMatchObject({
      layout: 'long',
      balloon: 0,
      stream: 1,
      piece: 2,
      value: 3,
      unit: 4,
    });
    expect(body.counts).toEqual({ readings: 4, same: 0, conflicts: 0, refused: 4, newPieces: 0 });
    expect(body.sample[2]).toMatchObject({
      balloon: '2',
      piece: '1-1',
      text: '1.0000 in',
      converted: '25.4000',
    });
    expect(body.refused.map((issue: Record<string, unknown>) => issue.line)).toEqual([6, 7, 8, 9]);
    expect(body.refused[2].detail).toContain('needs a measured value');
    expect(await readings()).toEqual({});
    const key = onceKey();
    expect((await confirm(body.importId, { choice: 'keep' }, key).expect(200)).body).toEqual({
      written: 4,
      unchanged: 0,
      skipped: 4,
    });
    expect((await confirm(body.importId, { choice: 'keep' }, key).expect(200)).body).toEqual({
      written: 4,
      unchanged: 0,
      skipped: 4,
    });
    expect(await readings()).toEqual({
      '1/1-1': '142.05',
      '1/2-1': '141.990',
      '2/1-1': '1.0000 in',
      '3/1-1': 'pass',
    });
  });

  it('reads wide tables both ways', async () => {
    const byCharacteristic =
      'Balloon,Description,1-1,1-2,2-1\n1,Length,142.01,142.02,142.03\n2,Seat,25.41,,25.42\n';
    const first = (await post(byCharacteristic).expect(201)).body;
    expect(first.mapping).toMatchObject({
      layout: 'wide',
      rowsAre: 'characteristics',
      key: 0,
      columns: { 2: '1-1', 3: '1-2', 4: '2-1' },
    });
    await confirm(first.importId).expect(200);
    const byPiece = 'Piece;1 [mm];#2\n1-3;142,04;25,43\n2-2;142,05;\n';
    const second = (await post(byPiece).expect(201)).body;
    expect(second.mapping).toMatchObject({
      layout: 'wide',
      rowsAre: 'pieces',
      key: 0,
      columns: { 1: '1', 2: '2' },
    });
    await confirm(second.importId).expect(200);
    expect(await readings()).toEqual({
      '1/1-1': '142.01',
      '1/1-2': '142.02',
      '1/1-3': '142.04',
      '1/2-1': '142.03',
      '1/2-2': '142.05',
      '2/1-1': '25.41',
      '2/1-3': '25.43',
      '2/2-1': '25.42',
    });
  });

  it('shows values that stand there already and writes over those that were chosen', async () => {
    await confirm(
      (await post('Balloon,1-1,1-2,1-3\n1,142.01,142.02,142.03\n').expect(201)).body.importId,
    ).expect(200);
    const { body } = await post('Balloon,1-1,1-2,1-3\n1,142.010,142.08,142.09\n2,25.4,,\n').expect(201);
    expect(body.counts).toMatchObject({ readings: 1, same: 1, conflicts: 2 });
    expect(body.conflicts[0]).toMatchObject({ key: '1|1-2', now: '142.02', inFile: '142.08' });
    expect((await confirm(body.importId, { choice: 'some', replace: ['1|1-2'] }).expect(200)).body).toEqual({
      written: 2,
      unchanged: 1,
      skipped: 1,
    });
    expect(await readings()).toEqual({
      '1/1-1': '142.01',
      '1/1-2': '142.08',
      '1/1-3': '142.03',
      '2/1-1': '25.4',
    });
  });

  it('leaves a value that came in between preview and confirmation', async () => {
    const { importId } = (await post('Balloon,1-1\n1,142.01\n').expect(201)).body;
    await confirm((await post('Balloon,1-1\n1,142.19\n').expect(201)).body.importId).expect(200);
    expect((await confirm(importId, { choice: 'replace' }).expect(200)).body).toEqual({
      written: 0,
      unchanged: 0,
      skipped: 1,
    });
    expect(await readings()).toEqual({ '1/1-1': '142.19' });
  });

  it('adds pieces that are not in the package to the stream that was chosen', async () => {
    const first = (await post('Balloon,SN-77,SN-78\n1,142.01,142.02\n').expect(201)).body;
    expect(first.counts).toMatchObject({ readings: 0, refused: 2 });
    expect(first.refused[0].remedy).toContain('Choose the stream');
    const { settings, mapping } = first;
    const { body } = await supplier.get(`/api/submissions/${submissionId}/measurements`).expect(200);
    const preview = (
      await supplier
        .post(`/api/reading-imports/${first.importId}/preview`)
        .send({ settings, mapping, newPiecesStreamId: body.streams[1].id })
        .expect(200)
    ).body;
    expect(preview).toMatchObject({ counts: { readings: 2, newPieces: 2 }, newPieces: ['SN-77', 'SN-78'] });
    await confirm(first.importId).expect(200);
    expect(await readings()).toEqual({ '1/SN-77': '142.01', '1/SN-78': '142.02' });
  });

  it('takes 20,000 readings in one file', async () => {
    const pieces = Array.from({ length: 200 }, (_, i) => `P${i + 1}`);
    const many = Array.from({ length: 100 }, (_, i) =>
      aCharacteristic({ balloon: String(i + 1), description: `Feature ${i + 1}` }),
    );
    scene = await buildScene(app, many);
    supplier = scene.supplier;
    ({ submissionId } = await openPackage(scene, { streams: ['Line'], streamKind: 'line' }));
    const content = [
      `Balloon,${pieces.join(',')}`,
      ...many.map((row) => `${row.balloon},${pieces.map((_, i) => `25.0${i % 10}`).join(',')}`),
    ].join('\n');
    const { body } = await post(content).expect(201);
    expect(body.counts).toMatchObject({ readings: 20_000, refused: 0, newPieces: 200 });
    expect((await confirm(body.importId).expect(200)).body).toEqual({
      written: 20_000,
      unchanged: 0,
      skipped: 0,
    });
  });
});
