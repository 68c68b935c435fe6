import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { bore, bossPosition, marking, PackageStory, wall } from './testing/package-story.ts';
import { ifVersion, type Client } from './testing/sign-in.ts';

/** Words that stand nowhere else: where one turns up, its field was let out. */
const canary = {
  rowRemark: 'kestrel remark to the supplier',
  rowInternal: 'osprey internal word on the row',
  elementInternal: 'harrier internal word on the element',
  rowNote: 'merlin note on the row',
  comment: 'falcon comment on the warrant',
};

let story: PackageStory;
let boreId = '';

beforeAll(async () => {
  story = await PackageStory.begin({ closes: 'caller' });
  await story.releasePart([bore, bossPosition, wall, marking]);
  await story.issue();
  await story.acknowledge();
  await story.prepareClean();
  const sheet = await story.sheet();
  boreId = sheet.characteristics[0]?.id ?? '';
  const streamId = sheet.streams[0]?.id ?? '';
  const row = sheet.rows.find((one) => one.characteristicId === boreId && one.streamId === streamId);
  await story.supplier
    .put(`/api/submissions/${story.submissionId}/rows/${boreId}/${streamId}`)
    .set(ifVersion(row?.version ?? 0))
    .send({
      gaugeId: row?.gaugeId ?? null,
      measuredOn: row?.measuredOn ?? null,
      note: canary.rowNote,
      attribute: null,
    })
    .expect(200);
  await story.supplier
    .put(`/api/submissions/${story.submissionId}/warrant`)
    .set(ifVersion((await story.head()).version))
    .send({
      runOn: story.inDays(-1),
      runHours: '4',
      runQuantity: 1200,
      partMassKg: '0.0613',
      productionTool: 'M-0733',
      materialReport: '',
      exceptions: '',
      comment: canary.comment,
    })
    .expect(200);
  expect((await story.sign()).status).toBe(201);
}, 120_000);
afterAll(() => story.app.close());

/** Every address that answers with 200 for this person, of all that the product has, and what it answers. */
async function everything(client: Client): Promise<Map<string, string>> {
  const lists = await client.get('/api/buying-status');
  const { items } = (await story.reviewer.get(`/api/submissions/${story.submissionId}/elements`).expect(200))
    .body;
  const plan = items.find((item: { code: string }) => item.code === 'control-plan');
  const ids: Record<string, string> = {
    submissionId: story.submissionId,
    requestId: story.requestId,
    revisionId: story.revisionId,
    partId: story.partId,
    fileId: plan.files[0].id as string,
    lineId: (lists.body.items?.[0]?.id as string | undefined) ?? story.partId,
  };
  const answers = new Map<string, string>();
  for (const { method, path } of story.app.router.routes) {
    if (method !== 'get' || path.includes('.xlsx') || path.includes('.pdf')) continue;
    const query = path.endsWith('/comparison') ? `?with=${story.revisionId}` : '';
    const filled = path.replace(/:([A-Za-z]+)/g, (_, name: string) => ids[name] ?? story.partId);
    const answer = await client.get(`/api${filled}${query}`);
    if (answer.status === 200) answers.set(path, answer.text ?? answer.body.toString());
  }
  return answers;
}

const withoutDescription = (answers: Map<string, string>) =>
  [...answers].filter(([path]) => path !== '/openapi.json');

async function reviewAs(client: Client, show = 'all') {
  return (await client.get(`/api/submissions/${story.submissionId}/review?show=${show}`).expect(200)).body;
}

describe('fields of each role', () => {
  it('tells the supplier nothing of the marks while the customer is still at work', async () => {
    await story
      .mark(boreId, 0, { mark: 'refused', remark: canary.rowRemark, internalRemark: canary.rowInternal })
      .expect(200);
    const elements = await story.reviewer.get(`/api/submissions/${story.submissionId}/elements`).expect(200);
    const element = elements.body.items[0];
    await story.reviewer
      .put(`/api/submissions/${story.submissionId}/elements/${element.id}/decision`)
      .set(ifVersion(0))
      .send({ mark: 'refused', remark: canary.rowRemark, internalRemark: canary.elementInternal })
      .expect(200);

    const review = await reviewAs(story.supplier);
    expect(review.rows).toHaveLength(4);
    for (const row of review.rows) {
      expect(row.decision).toEqual({
        mark: null,
        remark: '',
        deviationId: null,
        by: null,
        at: null,
        version: 0,
      });
    }
    expect(review.counts).toMatchObject({ open: 4, refused: 0, questioned: 0 });
    for (const show of ['refused', 'questioned'])
      expect((await reviewAs(story.supplier, show)).rows).toEqual([]);
    expect((await reviewAs(story.supplier, 'open')).rows).toHaveLength(4);
    expect((await reviewAs(story.reviewer)).counts).toMatchObject({ open: 3, refused: 1 });

    const answers = await everything(story.supplier);
    expect(answers.size).toBeGreaterThan(18);
    for (const [path, text] of withoutDescription(answers)) {
      for (const word of ['internalRemark', canary.rowRemark, canary.rowInternal, canary.elementInternal]) {
        expect(text, `${path}: ${word}`).not.toContain(word);
      }
    }
  });

  it('keeps the internal remarks from the supplier after the disposition, and gives it the others', async () => {
    const { rows } = await reviewAs(story.reviewer);
    for (const row of rows.filter((one: { decision: { mark: unknown } }) => one.decision.mark === null)) {
      await story
        .mark(row.characteristic.id, 0, { mark: 'accepted', internalRemark: canary.rowInternal })
        .expect(200);
    }
    const signed = await story.dispose({
      outcome: 'rejected',
      reasons: [{ code: 'out-of-tolerance', characteristicId: boreId, text: 'Bore' }],
    });
    expect(signed.status, signed.text).toBe(201);
    const answers = await everything(story.supplier);
    expect(answers.get('/submissions/:submissionId/review')).toContain(canary.rowRemark);
    for (const [path, text] of withoutDescription(answers)) {
      for (const word of ['internalRemark', canary.rowInternal, canary.elementInternal]) {
        expect(text, `${path}: ${word}`).not.toContain(word);
      }
    }
    for (const mail of await story.app.mails()) {
      expect(JSON.stringify(mail)).not.toContain(canary.rowInternal);
      expect(JSON.stringify(mail)).not.toContain(canary.elementInternal);
    }
    expect((await reviewAs(story.reviewer)).rows[0].decision.internalRemark).toBe(canary.rowInternal);
  });

  it('gives purchasing status and nothing that was measured, drawn or remarked', async () => {
    const answers = await everything(story.purchaser);
    expect([...answers.keys()].sort()).toEqual([
      '/buying-status',
      '/buying-status.csv',
      '/buying-status/:lineId',
      '/demo/people',
      '/openapi.json',
      '/organisation',
      '/session',
      '/sessions',
    ]);
    const measured = ['19.02', '0.066', '2.50', '2.52'];
    const drawn = ['19.05', 'Position of the bore', 'drawing.pdf', 'control-plan.pdf'];
    for (const [path, text] of withoutDescription(answers)) {
      for (const word of [...measured, ...drawn, ...Object.values(canary)]) {
        expect(text, `${path}: ${word}`).not.toContain(word);
      }
    }
    const { items } = (await story.purchaser.get('/api/buying-status').expect(200)).body;
    expect(Object.keys(items[0]).sort()).toEqual([
      'approvedRevision',
      'blocker',
      'currentRevision',
      'dueOn',
      'holder',
      'id',
      'openPackageState',
      'partName',
      'partNumber',
      'piecesLeft',
      'streamsCovered',
      'supplierId',
      'supplierName',
      'toolingRelease',
      'until',
      'verdict',
      'waitingDays',
    ]);
  });
});
