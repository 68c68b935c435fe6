import { randomUUID } from 'node:crypto';
import type { ElementResponse, SubmissionPiecesResponse } from '@trammel/shared/submissions';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { writeReadings } from '../../evidence/write-readings.ts';
import { buildScene, openPackage, placeRound, type Scene } from '../../testing/package-builders.ts';
import { buildFile } from '../../testing/part-builders.ts';
import { anonymous, ifVersion, signInAs, type Client } from '../../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../../testing/test-app.ts';

let app: TestApp;
let scene: Scene;
let stranger: Client;
let requestId: string;
let submissionId: string;

beforeAll(async () => {
  app = await createTestApp({ closes: 'caller' });
  scene = await buildScene(app);
  stranger = await signInAs(app, scene.cast.otherSupplierQuality);
  ({ requestId, submissionId } = await openPackage(scene));
});
afterAll(() => app.close());
beforeEach(() => placeRound(app, submissionId, { state: 'in-preparation', submittedAt: null }));

const pieces = async (client = scene.supplier) =>
  (await client.get(`/api/submissions/${submissionId}/pieces`).expect(200)).body as SubmissionPiecesResponse;
const elements = async (client = scene.supplier) =>
  (await client.get(`/api/submissions/${submissionId}/elements`).expect(200)).body.items as ElementResponse[];
const element = async (code: string) => {
  const found = (await elements()).find((one) => one.code === code);
  if (!found) throw new Error(`No element ${code}.`);
  return found;
};
const facts = (one: ElementResponse, changes: object) => ({
  state: one.state,
  reason: one.reason,
  statedPart: one.statedPart,
  statedRevision: one.statedRevision,
  dated: one.dated,
  note: one.note,
  ...changes,
});
const put = (one: ElementResponse, changes: object, client = scene.supplier) =>
  client.put(`/api/elements/${one.id}`).set(ifVersion(one.version)).send(facts(one, changes));

describe('elements', () => {
  it('are shut to the other side until submission, to others for good, and to changes once submitted', async () => {
    const path = `/api/submissions/${submissionId}/elements`;
    await anonymous(app).get(path).expect(401);
    await stranger.get(path).expect(404);
    const early = await scene.reviewer.get(path).expect(409);
    expect(early.body.detail).toContain('has not submitted');
    const flow = await element('process-flow');
    await put(flow, { note: 'x' }, stranger).expect(404);
    await put(flow, { note: 'x' }, scene.reviewer).expect(403);
    await placeRound(app, submissionId, { state: 'submitted', submittedAt: app.clock.now() });
    expect(await elements(scene.reviewer)).toHaveLength(18);
    const late = await put(flow, { note: 'x' }).expect(409);
    expect(late.body.detail).toContain('frozen');
  });

  it('start open, but those the package fills itself', async () => {
    const all = await elements();
    expect(all.filter((one) => one.derived).map((one) => [one.code, one.state])).toEqual([
      ['dimensional-results', 'submitted'],
      ['warrant', 'submitted'],
    ]);
    expect(all.filter((one) => !one.derived).every((one) => one.state === 'open')).toBe(true);
  });

  it('change with the version that was read, each fault at its field', async () => {
    const plan = await element('control-plan');
    const wrong = await put(plan, { state: 'not-applicable' }).expect(422);
    expect(wrong.body.errors[0].pointer).toBe('/reason');
    await put(plan, { mark: 'accepted' }).expect(422);
    const answers = await Promise.all([
      put(plan, { state: 'not-applicable', reason: 'Agreed with the customer' }),
      put(plan, { note: 'Other' }),
    ]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 412]);
  });

  it('take files of one’s own organisation only, and follow them', async () => {
    const flow = await element('process-flow');
    const path = `/api/elements/${flow.id}/files`;
    const own = await buildFile(app, scene.cast.supplierQuality);
    const foreign = await buildFile(app, scene.cast.otherSupplierQuality);
    const refusal = async (fileId: string) =>
      JSON.stringify((await scene.supplier.post(path).send({ fileId }).expect(422)).body.errors);
    expect(await refusal(foreign)).toBe(await refusal(randomUUID()));
    await stranger.post(path).send({ fileId: foreign }).expect(404);
    const attached = await scene.supplier.post(path).send({ fileId: own }).expect(201);
    expect(attached.body).toMatchObject({
      state: 'submitted',
      files: [{ id: own }],
      version: flow.version + 1,
    });
    await scene.supplier.post(path).send({ fileId: own }).expect(409);

    await scene.reviewer.get(`/api/files/${own}`).expect(404);
    await placeRound(app, submissionId, { submittedAt: app.clock.now() });
    await scene.reviewer.get(`/api/files/${own}`).expect(200);
    await stranger.get(`/api/files/${own}`).expect(404);

    await stranger.delete(`${path}/${own}`).expect(404);
    await scene.supplier.delete(`${path}/${randomUUID()}`).expect(404);
    const removed = await scene.supplier.delete(`${path}/${own}`).expect(200);
    expect(removed.body).toMatchObject({ state: 'open', files: [] });
  });
});

describe('sample pieces', () => {
  it('start as the request asks, labelled by stream', async () => {
    const { streams, pieces: all, editable } = await pieces();
    expect(editable).toBe(true);
    expect(streams.map((stream) => stream.name)).toEqual(['Spindle 1', 'Spindle 2']);
    expect(all.map((piece) => piece.label)).toEqual(['1-1', '1-2', '1-3', '2-1', '2-2', '2-3']);
  });

  it('are added and changed with labels used once, by the supplier alone', async () => {
    const { streams, pieces: before } = await pieces();
    const [stream] = streams;
    const path = `/api/submissions/${submissionId}/pieces`;
    const body = {
      pieces: [
        { label: '1-4', streamId: stream?.id },
        { label: '1-1', streamId: randomUUID() },
      ],
    };
    await anonymous(app).post(path).send(body).expect(401);
    await scene.reviewer.post(path).send(body).expect(403);
    await stranger.post(path).send(body).expect(404);
    await scene.supplier.post(path).send(body).expect(422);
    expect((await pieces()).pieces).toHaveLength(before.length);
    const one = { pieces: [{ label: '1-4', streamId: stream?.id, lot: 'H 4471' }] };
    const race = await Promise.all([
      scene.supplier.post(path).send(one),
      scene.supplier.post(path).send(one),
    ]);
    expect(race.map((answer) => answer.status).sort()).toEqual([201, 422]);

    const added = (await pieces()).pieces.find((piece) => piece.label === '1-4');
    const change = (fields: object, version = added?.version ?? 0) =>
      scene.supplier
        .put(`/api/pieces/${added?.id}`)
        .set(ifVersion(version))
        .send({ label: '1-4', streamId: stream?.id, madeOn: null, lot: '', ...fields });
    await change({ label: '2-1' }).expect(422);
    await change({ streamId: streams[1]?.id }).expect(422);
    await change({ madeOn: '2026-02-30' }).expect(422);
    const changed = await change({ label: '1-4a', madeOn: '2026-02-20' }).expect(200);
    expect(changed.body).toMatchObject({ label: '1-4a', madeOn: '2026-02-20' });
    await change({ label: '1-5' }).expect(412);
  });

  it('are removed with their readings only when that is confirmed', async () => {
    const { pieces: all } = await pieces();
    const target = all.find((piece) => piece.label === '2-3');
    const rows = await app.db.reader.query<{ id: string }[]>(
      'SELECT id FROM characteristics WHERE revision_id = ? ORDER BY sequence',
      [scene.revision.id],
    );
    await app.db.writeTransaction((manager) => {
      const scope = {
        submissionId,
        requestId,
        revisionId: scene.revision.id,
        userId: scene.cast.supplierQuality.id,
        now: app.clock.now(),
      };
      const change = { characteristicId: rows[0]?.id ?? '', pieceId: target?.id ?? '', text: '25.01' };
      return Promise.resolve(writeReadings(manager, scope, [change], false));
    });
    const path = `/api/pieces/${target?.id}`;
    await stranger.delete(path).expect(404);
    const asked = await scene.supplier.delete(path).expect(409);
    expect(asked.body.detail).toContain('bears a reading');
    expect((await pieces()).pieces).toHaveLength(all.length);
    await scene.supplier.delete(`${path}?confirm=yes`).expect(422);
    await scene.supplier.delete(`${path}?confirm=readings`).expect(204);
    expect((await pieces()).pieces).toHaveLength(all.length - 1);
    const left = await app.db.reader.query<{ readings: string }[]>(
      'SELECT readings FROM characteristic_results WHERE submission_id = ?',
      [submissionId],
    );
    expect(left.every((row) => row.readings === '')).toBe(true);
  });
});

describe('streams', () => {
  it('are blocked with a reason, never the last, and drop out of the count', async () => {
    const { streams } = await pieces();
    const [one, two] = streams;
    const block = (stream: typeof one, body: object, client = scene.supplier) =>
      client
        .put(`/api/submissions/${submissionId}/streams/${stream?.id}`)
        .set(ifVersion(stream?.version ?? 0))
        .send(body);
    await block(two, { blocked: true, reason: 'x' }, scene.reviewer).expect(403);
    await block(two, { blocked: true, reason: 'x' }, stranger).expect(404);
    await block(two, { blocked: true, reason: '' }).expect(422);
    await block(two, { blocked: true, reason: 'Spindle bearing worn' }).expect(200);
    const head = await scene.supplier.get(`/api/submissions/${submissionId}`).expect(200);
    expect(head.body.counts.rows).toBe(2);
    const last = await block(one, { blocked: true, reason: 'Also' }).expect(409);
    expect(last.body.detail).toContain('One stream must stay');
    await block(two, { blocked: false, reason: '' }).expect(412);
  });
});

describe('a failing write', () => {
  it('leaves nothing of an act that broke half-way', async () => {
    const before = await app.db.reader.query('SELECT count(*) AS n FROM audit_events');
    const { streams, pieces: all } = await pieces();
    const many = Array.from({ length: 299 }, (_, index) => ({
      label: `x${index}`,
      streamId: streams[0]?.id,
    }));
    await scene.supplier.post(`/api/submissions/${submissionId}/pieces`).send({ pieces: many }).expect(422);
    expect((await pieces()).pieces).toHaveLength(all.length);
    expect(await app.db.reader.query('SELECT count(*) AS n FROM audit_events')).toEqual(before);
  });
});
