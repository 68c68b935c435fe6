import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { randomUUID } from 'node:crypto';
import { Disposition } from '../../database/entities/disposition.entity.ts';
import { writeReadings } from '../../evidence/write-readings.ts';
import { buildScene, openPackage, placeRound, type Scene } from '../../testing/package-builders.ts';
import { buildFile } from '../../testing/part-builders.ts';
import { anonymous, onceKey, signInAs } from '../../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../../testing/test-app.ts';

let app: TestApp;
let scene: Scene;

beforeAll(async () => {
  app = await createTestApp({ closes: 'caller' });
  scene = await buildScene(app);
});
afterAll(() => app.close());

/** A package with one reading and one file, sealed and rejected. */
async function rejectedPackage() {
  const opened = await openPackage(scene);
  const { submissionId } = opened;
  const elements = await scene.supplier.get(`/api/submissions/${submissionId}/elements`).expect(200);
  const flow = elements.body.items.find((one: { code: string }) => one.code === 'process-flow') as {
    id: string;
  };
  const fileId = await buildFile(app, scene.cast.supplierQuality);
  await scene.supplier.post(`/api/elements/${flow.id}/files`).send({ fileId }).expect(201);
  const pieces = await scene.supplier.get(`/api/submissions/${submissionId}/pieces`).expect(200);
  const [row] = await app.db.reader.query<{ id: string }[]>(
    'SELECT id FROM characteristics WHERE revision_id = ? ORDER BY sequence LIMIT 1',
    [scene.revision.id],
  );
  await app.db.writeTransaction(async (manager) => {
    const scope = {
      submissionId,
      requestId: opened.requestId,
      revisionId: scene.revision.id,
      userId: scene.cast.supplierQuality.id,
      now: app.clock.now(),
    };
    const pieceId = pieces.body.pieces[0].id as string;
    writeReadings(manager, scope, [{ characteristicId: row?.id ?? '', pieceId, text: '25.010' }], false);
    await manager.insert(Disposition, {
      id: randomUUID(),
      submissionId,
      outcome: 'rejected',
      reasons: [],
      streamsCovered: [],
      resubmitBy: '2026-06-30',
      decidedById: scene.cast.reviewer.id,
      decidedByName: scene.cast.reviewer.name,
      decidedAt: app.clock.now(),
    });
  });
  const now = app.clock.now();
  await placeRound(app, submissionId, {
    state: 'rejected',
    submittedAt: now,
    sealedAt: now,
    decidedAt: now,
    desk: 'supplier',
  });
  return { ...opened, fileId };
}

describe('the next round', () => {
  it('is refused to others, without a key, and while there is nothing to do again', async () => {
    const { requestId, submissionId } = await openPackage(scene);
    const path = `/api/requests/${requestId}/resubmission`;
    const stranger = await signInAs(app, scene.cast.otherSupplierQuality);
    await anonymous(app).post(path).expect(401);
    await scene.reviewer.post(path).set(onceKey()).expect(403);
    await stranger.post(path).set(onceKey()).expect(404);
    await scene.supplier.post(path).expect(400);
    await scene.supplier.post(path).set(onceKey()).expect(409);
    await placeRound(app, submissionId, { state: 'approved', desk: 'closed', isOpen: false });
    await scene.supplier.post(path).set(onceKey()).expect(409);
  });

  it('copies streams, pieces, readings, elements and files, and closes the old round untouched', async () => {
    const { requestId, submissionId, fileId } = await rejectedPackage();
    const key = onceKey();
    const start = () => scene.supplier.post(`/api/requests/${requestId}/resubmission`).set(key);
    const answer = await start().expect(201);
    expect((await start().expect(201)).text).toBe(answer.text);
    const [old, next] = answer.body.rounds as { id: string; state: string; round: number }[];
    expect(old).toMatchObject({ id: submissionId, state: 'rejected' });
    expect(next).toMatchObject({ round: 2, state: 'in-preparation' });

    const head = await scene.supplier.get(`/api/submissions/${next?.id}`).expect(200);
    expect(head.body).toMatchObject({ dueOn: '2026-06-30', round: 2 });
    expect(head.body.routeCard).toHaveLength(2);
    expect(head.body.abilities.measure).toBe(true);
    const pieces = async (id?: string) =>
      (await scene.supplier.get(`/api/submissions/${id}/pieces`).expect(200)).body as {
        pieces: { id: string; label: string }[];
      };
    const labels = (set: { pieces: { label: string }[] }) => set.pieces.map((piece) => piece.label);
    expect(labels(await pieces(next?.id))).toEqual(labels(await pieces(old?.id)));
    expect((await pieces(next?.id)).pieces[0]?.id).not.toBe((await pieces(old?.id)).pieces[0]?.id);
    const elements = await scene.supplier.get(`/api/submissions/${next?.id}/elements`).expect(200);
    expect(elements.body.items.flatMap((one: { files: { id: string }[] }) => one.files)).toMatchObject([
      { id: fileId },
    ]);
    const readings = await app.db.reader.query<
      { submissionId: string; readings: string; streamId: string }[]
    >(
      `SELECT submission_id AS submissionId, readings, stream_id AS streamId FROM characteristic_results
       WHERE submission_id IN (?, ?)`,
      [submissionId, next?.id],
    );
    expect(readings.map((row) => row.readings)).toEqual(['25.010', '25.010']);
    expect(new Set(readings.map((row) => row.streamId)).size).toBe(2);

    const work = await scene.supplier.get('/api/worklist?limit=200').expect(200);
    const mine = work.body.items.filter((item: { requestId: string }) => item.requestId === requestId);
    expect(mine.map((item: { id: string }) => item.id)).toEqual([next?.id]);
    const sides = await app.db.reader.query<{ open: string }[]>(
      'SELECT open_submission_id AS open FROM supply_lines WHERE supplier_id = ?',
      [scene.cast.supplier.id],
    );
    expect(sides).toEqual([{ open: next?.id }]);
    expect(await app.db.reader.query('PRAGMA foreign_key_check')).toEqual([]);
  });

  it('is started once by two who ask at the same time', async () => {
    scene = await buildScene(app);
    const { requestId } = await rejectedPackage();
    const path = `/api/requests/${requestId}/resubmission`;
    const answers = await Promise.all([
      scene.supplier.post(path).set(onceKey()),
      scene.supplier.post(path).set(onceKey()),
    ]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([201, 409]);
  });
});
