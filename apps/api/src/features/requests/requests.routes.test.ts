import { randomUUID } from 'node:crypto';
import type { RequestResponse } from '@trammel/shared/requests';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildLink, buildOrganisation, buildUser } from '../../testing/builders.ts';
import {
  buildScene,
  draftRequest,
  issueDraft,
  requestBody,
  type Scene,
} from '../../testing/package-builders.ts';
import { buildPart } from '../../testing/part-builders.ts';
import { anonymous, ifVersion, onceKey, signInAs, type Client } from '../../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../../testing/test-app.ts';

let app: TestApp;
let scene: Scene;
let stranger: Client;
let otherCustomer: Client;
let purchaser: Client;

beforeAll(async () => {
  app = await createTestApp({ closes: 'caller' });
  scene = await buildScene(app);
  stranger = await signInAs(app, scene.cast.otherSupplierQuality);
  otherCustomer = await signInAs(app, scene.cast.otherReviewer);
  purchaser = await signInAs(app, scene.cast.purchaser);
});
afterAll(() => app.close());

const withdraw = (request: RequestResponse) =>
  scene.reviewer
    .post(`/api/requests/${request.id}/withdraw`)
    .set(ifVersion(request.version))
    .send({ reason: 'Superseded by a new drawing.' });

describe('drafting a request', () => {
  it('is refused to anyone without a session and to every other role', async () => {
    await anonymous(app).post('/api/requests').send(requestBody(scene)).expect(401);
    await anonymous(app).get('/api/request-elements').expect(401);
    await scene.supplier.post('/api/requests').send(requestBody(scene)).expect(403);
    await purchaser.get('/api/requests').expect(403);
    await purchaser.post('/api/requests').send(requestBody(scene)).expect(403);
  });

  it('names every wrong entry at its place and takes nothing of others', async () => {
    const foreignPart = await buildPart(otherCustomer);
    const body = requestBody(scene, {
      supplierId: scene.cast.otherCustomer.id,
      siteId: scene.cast.otherSupplier.siteId,
      revisionId: foreignPart.revisions[0]?.id ?? '',
      streams: ['A', 'a'],
      reviewerIds: [scene.cast.purchaser.id],
    });
    const answer = await scene.reviewer.post('/api/requests').send(body).expect(422);
    expect(answer.body.errors.map((error: { pointer: string }) => error.pointer).sort()).toEqual([
      '/reviewerIds/0',
      '/revisionId',
      '/siteId',
      '/streams/1',
      '/supplierId',
    ]);
    const unknown = { ...requestBody(scene), state: 'issued' };
    await scene.reviewer.post('/api/requests').send(unknown).expect(422);
    await scene.reviewer
      .post('/api/requests')
      .send(requestBody(scene, { streams: [] }))
      .expect(422);
  });

  it('keeps it out of the sight of the supplier, of another supplier and of another customer', async () => {
    const draft = await draftRequest(scene);
    expect(draft).toMatchObject({ state: 'draft', side: 'customer', abilities: { edit: true, issue: true } });
    const bytes = async (client: Client, id: string) => {
      const answer = await client.get(`/api/requests/${id}`).expect(404);
      return JSON.stringify({ ...answer.body, instance: '' });
    };
    const never = await bytes(stranger, randomUUID());
    for (const client of [scene.supplier, stranger, otherCustomer]) {
      expect(await bytes(client, draft.id)).toBe(never);
    }
    const seen = await scene.supplier.get('/api/requests').expect(200);
    expect(seen.body.items.map((item: { id: string }) => item.id)).not.toContain(draft.id);
  });

  it('changes only the version that was read, and says what stands there otherwise', async () => {
    const draft = await draftRequest(scene);
    const put = (version: number, message: string) =>
      scene.reviewer
        .put(`/api/requests/${draft.id}`)
        .set(ifVersion(version))
        .send(requestBody(scene, { message }));
    await scene.reviewer.put(`/api/requests/${draft.id}`).send(requestBody(scene)).expect(428);
    const [one, two] = await Promise.all([put(draft.version, 'First'), put(draft.version, 'Second')]);
    expect([one.status, two.status].sort()).toEqual([200, 412]);
    const [winner, loser] = one.status === 200 ? [one, two] : [two, one];
    expect(loser.body.current.message).toBe(winner.body.message);
    expect(winner.headers.etag).toBe(`"${draft.version + 1}"`);
  });

  it('offers the elements of the five levels with their source', async () => {
    const answer = await scene.supplier.get('/api/request-elements').expect(200);
    expect(answer.body.levels).toHaveLength(5);
    expect(answer.body.source).toContain('2006');
  });
});

describe('issuing a request', () => {
  it('is refused to others, without a key, without a version, and in any state but draft', async () => {
    const draft = await draftRequest(scene, { siteId: scene.cast.supplier.siteId });
    const issue = (client: Client) => client.post(`/api/requests/${draft.id}/issue`);
    await issue(anonymous(app)).expect(401);
    await issue(scene.supplier).set(onceKey()).set(ifVersion(1)).expect(403);
    await issue(otherCustomer).set(onceKey()).set(ifVersion(1)).expect(404);
    await issue(scene.reviewer).set(ifVersion(draft.version)).expect(400);
    await issue(scene.reviewer).set(onceKey()).expect(428);
    const issued = await issueDraft(scene.reviewer, draft);
    const again = await issue(scene.reviewer).set(onceKey()).set(ifVersion(issued.version)).expect(409);
    expect(again.body.detail).toBe('This request has been issued already.');
    await scene.reviewer
      .put(`/api/requests/${draft.id}`)
      .set(ifVersion(issued.version))
      .send(requestBody(scene))
      .expect(409);
    await withdraw(issued).expect(200);
  });

  it('opens one package however often it is sent, and answers the same', async () => {
    const draft = await draftRequest(scene);
    const key = onceKey();
    const issue = () =>
      scene.reviewer.post(`/api/requests/${draft.id}/issue`).set(key).set(ifVersion(draft.version));
    const before = (await app.mails()).length;
    const first = await issue().expect(200);
    const replay = await issue().expect(200);
    expect(replay.text).toBe(first.text);
    const [{ rounds }] = await app.db.reader.query<[{ rounds: number }]>(
      'SELECT count(*) AS rounds FROM submissions WHERE request_id = ?',
      [draft.id],
    );
    expect(rounds).toBe(1);
    const mails = (await app.mails()).slice(before);
    expect(mails.map((mail) => [mail.kind, mail.recipient]).sort()).toEqual(
      [
        ['request-issued', scene.cast.supplierQuality.email],
        ['request-issued', scene.cast.supplierSigner.email],
      ].sort(),
    );
    expect(mails[0]?.text).toContain(`/requests/${draft.id}`);
    await withdraw(first.body as RequestResponse).expect(200);
  });

  it('is refused while the revision is a draft, the date has passed or the same is in work', async () => {
    const part = await buildPart(scene.reviewer);
    const unreleased = await draftRequest(scene, { revisionId: part.revisions[0]?.id ?? '' });
    const issue = (draft: RequestResponse) =>
      scene.reviewer.post(`/api/requests/${draft.id}/issue`).set(onceKey()).set(ifVersion(draft.version));
    expect((await issue(unreleased).expect(409)).body.detail).toContain('Release revision A first.');
    const late = await draftRequest(scene, { dueOn: '2026-03-01' });
    expect((await issue(late).expect(409)).body.detail).toContain('lies in the past');
    const issued = await issueDraft(scene.reviewer, await draftRequest(scene));
    const second = await draftRequest(scene);
    expect((await issue(second).expect(409)).body.detail).toContain(`Request ${issued.number}`);
    await withdraw(issued).expect(200);
    const [{ open }] = await app.db.reader.query<[{ open: number }]>(
      'SELECT count(*) AS open FROM submissions WHERE request_id = ?',
      [second.id],
    );
    expect(open).toBe(0);
  });

  it('numbers requests within one pair of customer and supplier', async () => {
    const draft = await draftRequest(scene);
    const other = await draftRequest(scene, {
      supplierId: scene.cast.otherSupplier.id,
      siteId: scene.cast.otherSupplier.siteId,
    });
    expect(draft.number).toBeGreaterThan(1);
    expect(other.number).toBe(1);
  });
});

describe('acknowledging and withdrawing', () => {
  it('each belong to one side, happen once, and tell the other side', async () => {
    const issued = await issueDraft(scene.reviewer, await draftRequest(scene));
    const path = `/api/requests/${issued.id}/acknowledge`;
    await anonymous(app).post(path).expect(401);
    await scene.reviewer.post(path).expect(403);
    await stranger.post(path).expect(404);
    const answers = await Promise.all([scene.supplier.post(path), scene.supplier.post(path)]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
    const read = await scene.reviewer.get(`/api/requests/${issued.id}`).expect(200);
    expect(read.body).toMatchObject({
      acknowledgedBy: scene.cast.supplierQuality.name,
      rounds: [{ round: 1, state: 'in-preparation' }],
    });
    const told = (await app.mails()).filter((mail) => mail.kind === 'request-acknowledged');
    expect(told.at(-1)?.recipient).toBe(scene.cast.reviewer.email);

    const current = read.body as RequestResponse;
    await scene.supplier
      .post(`/api/requests/${issued.id}/withdraw`)
      .set(ifVersion(current.version))
      .send({ reason: 'No' })
      .expect(403);
    await scene.reviewer
      .post(`/api/requests/${issued.id}/withdraw`)
      .set(ifVersion(current.version))
      .send({ reason: ' ' })
      .expect(422);
    await withdraw({ ...current, version: 1 }).expect(412);
    const withdrawn = await withdraw(current).expect(200);
    expect(withdrawn.body).toMatchObject({ state: 'withdrawn', rounds: [{ state: 'withdrawn' }] });
    await withdraw(withdrawn.body as RequestResponse).expect(409);
    const work = await scene.supplier.get('/api/worklist').expect(200);
    expect(work.body.items.map((item: { requestId: string }) => item.requestId)).not.toContain(issued.id);
    const [line] = await app.db.reader.query<{ open: string | null }[]>(
      'SELECT open_submission_id AS open FROM supply_lines WHERE part_id = ?',
      [issued.part.id],
    );
    expect(line?.open).toBeNull();
  });
});

describe('the thread of a request', () => {
  it('is shared by the two sides and by nobody else', async () => {
    const issued = await issueDraft(scene.reviewer, await draftRequest(scene));
    const path = `/api/requests/${issued.id}/messages`;
    const question = { kind: 'question', text: 'Is row 2 measured before or after coating?' };
    await anonymous(app).get(path).expect(401);
    await purchaser.get(path).expect(403);
    await stranger.get(path).expect(404);
    await otherCustomer.post(path).send(question).expect(404);
    await scene.supplier.post(path).send({ kind: 'answer', text: 'x' }).expect(409);
    const asked = await scene.supplier.post(path).send(question).expect(201);
    expect(asked.body.items).toMatchObject([{ kind: 'question', own: true }]);
    const list = await scene.reviewer.get('/api/requests?state=issued').expect(200);
    expect(list.body.items.find((item: { id: string }) => item.id === issued.id)).toMatchObject({
      questionOpen: true,
    });
    await scene.reviewer.post(path).send({ kind: 'answer', text: 'After coating.' }).expect(201);
    const read = await scene.supplier.get(path).expect(200);
    expect(read.body.items.map((item: { own: boolean }) => item.own)).toEqual([true, false]);
    expect((await scene.supplier.get(`/api/requests/${issued.id}`)).body.questionOpen).toBe(false);
    const mails = (await app.mails()).filter((mail) => mail.kind === 'request-question');
    expect(mails.map((mail) => mail.recipient)).toEqual([scene.cast.reviewer.email]);
  });
});

describe('an organisation that is customer and supplier', () => {
  it('asks its own sub-supplier in the same way, and each sees its own side only', async () => {
    const sub = await buildOrganisation(app);
    await buildLink(app, scene.cast.supplier, sub);
    const both = await signInAs(
      app,
      await buildUser(app, scene.cast.supplier, ['quality-reviewer', 'supplier-quality']),
    );
    const subSupplier = await signInAs(app, await buildUser(app, sub, ['supplier-quality']));
    const me = (await both.get('/api/session').expect(200)).body.user.id as string;
    const part = await buildPart(both);
    const draft = await both
      .post('/api/requests')
      .send(
        requestBody(scene, {
          supplierId: sub.id,
          siteId: sub.siteId,
          revisionId: part.revisions[0]?.id ?? '',
          reviewerIds: [me],
        }),
      )
      .expect(201);
    expect(draft.body.side).toBe('customer');
    const list = await both.get('/api/requests').expect(200);
    const sides = list.body.items.map((item: { side: string }) => item.side) as string[];
    expect(new Set(sides)).toEqual(new Set(['customer', 'supplier']));
    expect((await subSupplier.get('/api/requests').expect(200)).body.items).toEqual([]);
    // A colleague on the supplying side has no part in what the organisation buys.
    await scene.supplier.get(`/api/requests/${draft.body.id}`).expect(404);
  });
});
