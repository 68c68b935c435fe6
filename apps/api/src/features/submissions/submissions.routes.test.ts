import { randomUUID } from 'node:crypto';
import type Database from 'better-sqlite3';
import type { SubmissionResponse } from '@trammel/shared/submissions';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { rawConnection } from '../../database/raw.ts';
import { buildScene, openPackage, placeRound, type Scene } from '../../testing/package-builders.ts';
import { buildPart, releaseWith } from '../../testing/part-builders.ts';
import { anonymous, signInAs, type Client } from '../../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../../testing/test-app.ts';

let app: TestApp;
let scene: Scene;
let stranger: Client;
let otherCustomer: Client;
let purchaser: Client;
let first: { requestId: string; submissionId: string };
const packages: string[] = [];

beforeAll(async () => {
  app = await createTestApp({ closes: 'caller' });
  scene = await buildScene(app);
  stranger = await signInAs(app, scene.cast.otherSupplierQuality);
  otherCustomer = await signInAs(app, scene.cast.otherReviewer);
  purchaser = await signInAs(app, scene.cast.purchaser);
  first = await openPackage(scene);
  packages.push(first.submissionId);
  for (const dueOn of ['2026-03-20', '2026-04-15', '2026-05-01']) {
    const part = await buildPart(scene.reviewer, { name: 'Gear housing cover' });
    const revision = await releaseWith(app, scene.reviewer, scene.cast.reviewer, part.revisions[0]?.id ?? '');
    const opened = await openPackage({ ...scene, revision }, { dueOn, streams: ['Cavity 1'] });
    packages.push(opened.submissionId);
  }
});
afterAll(() => app.close());

const ids = (answer: { body: { items: { id: string }[] } }) => answer.body.items.map((item) => item.id);

/** Statements run on the reading connection while the work lasts. */
async function statementsDuring(work: () => Promise<unknown>): Promise<number> {
  const connection = rawConnection(app.db.reader);
  const prototype = Object.getPrototypeOf(connection.prepare('SELECT 1')) as Database.Statement;
  const all = vi.spyOn(prototype, 'all');
  const get = vi.spyOn(prototype, 'get');
  await work();
  const count = all.mock.calls.length + get.mock.calls.length;
  all.mockRestore();
  get.mockRestore();
  return count;
}

describe('the worklist', () => {
  it('is the supplier’s alone', async () => {
    await anonymous(app).get('/api/worklist').expect(401);
    await scene.reviewer.get('/api/worklist').expect(403);
    await purchaser.get('/api/worklist').expect(403);
    expect(ids(await stranger.get('/api/worklist').expect(200))).toEqual([]);
  });

  it('shows open packages by due date with their next step, and goes on where a page ended', async () => {
    const whole = await scene.supplier.get('/api/worklist').expect(200);
    expect(whole.body.items).toHaveLength(4);
    expect(whole.body.items[0]).toMatchObject({
      dueOn: '2026-03-20',
      nextStep: 'Enter or import the readings',
      holder: scene.cast.supplier.name,
      measured: { done: 0, of: 1 },
    });
    const pages: string[] = [];
    let cursor = '';
    do {
      const page = await scene.supplier.get(`/api/worklist?limit=3${cursor}`).expect(200);
      pages.push(...ids(page));
      cursor = page.body.nextCursor === null ? '' : `&cursor=${page.body.nextCursor as string}`;
    } while (cursor !== '');
    expect(pages).toEqual(ids(whole));
    const backwards = await scene.supplier.get('/api/worklist?sort=-dueOn').expect(200);
    expect(ids(backwards)).toEqual([...pages].reverse());
  });

  it('is searched, filtered, and refuses a wrong filter or place', async () => {
    expect(ids(await scene.supplier.get('/api/worklist?q=housing').expect(200))).toHaveLength(3);
    expect(ids(await scene.supplier.get('/api/worklist?q=%25').expect(200))).toEqual([]);
    expect(ids(await scene.supplier.get('/api/worklist?state=submitted').expect(200))).toEqual([]);
    await scene.supplier.get('/api/worklist?sort=supplier').expect(422);
    await scene.supplier.get('/api/worklist?organisationId=1').expect(422);
    const wrong = await scene.supplier.get('/api/worklist?cursor=abc').expect(422);
    expect(wrong.body.errors[0].pointer).toBe('?cursor');
  });

  it('takes as many statements for one package as for all of them', async () => {
    const one = await statementsDuring(() => scene.supplier.get('/api/worklist?limit=1').expect(200));
    const all = await statementsDuring(() => scene.supplier.get('/api/worklist?limit=200').expect(200));
    expect(all).toBe(one);
    // One for the session, one for the page.
    expect(all).toBe(2);
  });
});

describe('the review desk', () => {
  it('is the customer’s reviewers’ alone', async () => {
    await anonymous(app).get('/api/review-desk').expect(401);
    await scene.supplier.get('/api/review-desk').expect(403);
    await purchaser.get('/api/review-desk').expect(403);
    expect(ids(await otherCustomer.get('/api/review-desk?show=all').expect(200))).toEqual([]);
  });

  it('shows what waits by age, and what came out only from submission on', async () => {
    const [, second = '', third = ''] = packages;
    await placeRound(app, second, { outCount: 5 });
    await placeRound(app, third, {
      state: 'submitted',
      desk: 'customer',
      submittedAt: '2026-02-26T10:00:00.000Z',
      outCount: 2,
    });
    const waiting = await scene.reviewer.get('/api/review-desk').expect(200);
    expect(waiting.body.items).toMatchObject([
      { id: third, waitingDays: 4, out: 2, reviewers: [scene.cast.reviewer.name] },
    ]);
    for (const sort of ['submittedAt', '-submittedAt']) {
      const pages: string[] = [];
      let cursor = '';
      do {
        const page = await scene.reviewer
          .get(`/api/review-desk?show=all&limit=1&sort=${sort}${cursor}`)
          .expect(200);
        pages.push(...ids(page));
        cursor = page.body.nextCursor === null ? '' : `&cursor=${page.body.nextCursor as string}`;
      } while (cursor !== '');
      expect([...pages].sort()).toEqual([...packages].sort());
    }
    const all = await scene.reviewer.get('/api/review-desk?show=all&sort=dueOn').expect(200);
    expect(all.body.items.find((item: { id: string }) => item.id === second)).toMatchObject({ out: 0 });
    const statements = await statementsDuring(() =>
      scene.reviewer.get('/api/review-desk?show=all').expect(200),
    );
    expect(statements).toBe(2);
  });
});

describe('the head of a package', () => {
  const read = async (client: Client) =>
    (await client.get(`/api/submissions/${first.submissionId}`).expect(200)).body as SubmissionResponse;

  it('is nothing to strangers, with the bytes of an id that never was', async () => {
    await anonymous(app).get(`/api/submissions/${first.submissionId}`).expect(401);
    await purchaser.get(`/api/submissions/${first.submissionId}`).expect(403);
    const bytes = async (client: Client, id: string) => {
      const answer = await client.get(`/api/submissions/${id}`).expect(404);
      return JSON.stringify({ ...answer.body, instance: '' });
    };
    const never = await bytes(stranger, randomUUID());
    expect(await bytes(stranger, first.submissionId)).toBe(never);
    expect(await bytes(otherCustomer, first.submissionId)).toBe(never);
    expect(await bytes(stranger, 'not-an-id')).toBe(never);
  });

  it('tells each side where it stands and what may be done there', async () => {
    const own = await read(scene.supplier);
    expect(own).toMatchObject({
      side: 'supplier',
      state: 'in-preparation',
      counts: { characteristics: 3, rows: 4, unmeasured: 4, special: 1 },
      abilities: { measure: true, review: false, sign: false },
      warrantSignature: null,
    });
    expect(own.revision.drawing?.name).toBe('drawing.pdf');
    // Counted when the request was acknowledged: nothing is measured, and nothing that was asked for is there.
    expect(own.findings.stops).toBeGreaterThan(0);
    expect(own.routeCard[0]?.stations.find((line) => line.state === 'in-hand')).toMatchObject({
      station: 'measurements',
      who: scene.cast.supplier.name,
    });
    const theirs = await read(scene.reviewer);
    expect(theirs).toMatchObject({ side: 'customer', abilities: { measure: false, review: false } });
    const signer = await signInAs(app, scene.cast.supplierSigner);
    expect((await read(signer)).abilities.sign).toBe(true);
  });

  it('hides from the customer what came out before it is submitted', async () => {
    await placeRound(app, first.submissionId, { outCount: 1, undecidedCount: 2, stops: 3, measuredRows: 4 });
    expect(await read(scene.reviewer)).toMatchObject({
      counts: { out: 0, undecided: 0, unmeasured: 0 },
      findings: { stops: 0 },
    });
    expect(await read(scene.supplier)).toMatchObject({ counts: { out: 1 }, findings: { stops: 3 } });
    await placeRound(app, first.submissionId, { outCount: 0, undecidedCount: 0, stops: 0, measuredRows: 0 });
  });
});
