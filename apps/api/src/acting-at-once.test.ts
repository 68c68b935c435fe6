import type { Response } from 'supertest';
import { afterAll, beforeEach, describe, expect, it } from 'vitest';
import { buildUser, testPassword } from './testing/builders.ts';
import { bore, bossPosition, marking, PackageStory, wall } from './testing/package-story.ts';
import { ifVersion, onceKey, signInAs } from './testing/sign-in.ts';

const stories: PackageStory[] = [];
async function prepared(): Promise<PackageStory> {
  const story = await PackageStory.begin({ closes: 'caller' });
  stories.push(story);
  await story.releasePart([bore, bossPosition, wall, marking]);
  await story.issue();
  await story.acknowledge();
  await story.prepareClean();
  return story;
}
async function submitted(): Promise<PackageStory> {
  const story = await prepared();
  expect((await story.sign()).status).toBe(201);
  return story;
}
afterAll(async () => {
  for (const story of stories) await story.app.close();
});

const countOf = (answers: readonly Response[], status: number) =>
  answers.filter((answer) => answer.status === status).length;
const rowsOf = async (story: PackageStory, table: string): Promise<number> => {
  const [row] = await story.app.db.reader.query<{ n: number }[]>(`SELECT count(*) AS n FROM ${table}`);
  return row?.n ?? -1;
};

describe('people who act at the same time', { timeout: 120_000 }, () => {
  it('lets two reviewers mark different rows, and shows the later one what the earlier did to the same row', async () => {
    const story = await submitted();
    const { app, cast, submissionId } = story;
    const other = await signInAs(app, await buildUser(app, cast.customer, ['quality-reviewer']));
    const { rows } = await story.review();
    const [first, second] = rows.map((row: { characteristic: { id: string } }) => row.characteristic.id);
    const byOther = (id: string, version: number) =>
      other
        .put(`/api/submissions/${submissionId}/characteristics/${id}/decision`)
        .set(ifVersion(version))
        .send({ mark: 'questioned', remark: 'Which datum?', internalRemark: '', deviationId: null });

    const apart = await Promise.all([story.mark(first, 0, { mark: 'accepted' }), byOther(second, 0)]);
    expect(apart.map((answer) => answer.status)).toEqual([200, 200]);

    const together = await Promise.all([
      story.mark(first, 1, { mark: 'refused', remark: 'Scratched' }),
      byOther(first, 1),
    ]);
    expect(together.map((answer) => answer.status).sort()).toEqual([200, 412]);
    const won = together.find((answer) => answer.status === 200)?.body.decisions[0].decision;
    const lost = together.find((answer) => answer.status === 412)?.body;
    expect(lost.current).toEqual(won);
    expect(lost.current).toMatchObject({ version: 2 });
    expect(['refused', 'questioned']).toContain(lost.current.mark);
    const after = await story.review();
    const row = after.rows.find((one: { characteristic: { id: string } }) => one.characteristic.id === first);
    expect(row.decision).toEqual(won);
  });

  it('submits once, however many signatures arrive together', async () => {
    const story = await prepared();
    const path = `/api/submissions/${story.submissionId}/warrant`;
    const { digest } = (await story.signer.get(path).expect(200)).body;
    const answers = await Promise.all(
      Array.from({ length: 20 }, () =>
        story.signer.post(`${path}/signature`).set(onceKey()).send({ password: testPassword, digest }),
      ),
    );
    expect(countOf(answers, 201)).toBe(1);
    expect(countOf(answers, 409) + countOf(answers, 412)).toBe(19);
    expect(answers.find((answer) => answer.status === 409)?.body.detail).toMatch(/submitted and is frozen/);
    for (const table of ['signatures', 'sealed_packages', 'checks'])
      expect(await rowsOf(story, table), table).toBe(1);
    const mails = (await story.app.mails()).filter((mail) => mail.kind === 'package-submitted');
    expect(new Set(mails.map((mail) => mail.recipient)).size).toBe(mails.length);
  });

  it('decides once, however many dispositions arrive together', async () => {
    const story = await submitted();
    await story.acceptAll();
    const path = `/api/submissions/${story.submissionId}`;
    const { digest } = (await story.reviewer.get(`${path}/disposition-draft`).expect(200)).body;
    const answers = await Promise.all(
      Array.from({ length: 20 }, (_, index) =>
        story.reviewer
          .post(`${path}/disposition`)
          .set(onceKey())
          .send({
            password: testPassword,
            digest,
            ...(index % 2 === 0
              ? { outcome: 'approved' }
              : { outcome: 'sent-back', reasons: [{ code: 'other', text: 'Cover sheet missing' }] }),
          }),
      ),
    );
    expect(countOf(answers, 201)).toBe(1);
    expect(countOf(answers, 409) + countOf(answers, 412)).toBe(19);
    expect(await rowsOf(story, 'dispositions')).toBe(1);
    expect(await rowsOf(story, 'signatures')).toBe(2);
    const outcome = answers.find((answer) => answer.status === 201)?.body.outcome as string;
    expect((await story.head()).state).toBe(outcome);
  });

  it('reports the reading another person changed meanwhile, and keeps everything else of both', async () => {
    const story = await prepared();
    const sheet = await story.sheet();
    const [characteristic] = sheet.characteristics;
    const pieces = sheet.pieces.filter((piece) => piece.streamId === sheet.streams[0]?.id);
    const cell = (piece: number, text: string | null, was: string | null) => ({
      characteristicId: characteristic?.id ?? '',
      pieceId: pieces[piece]?.id ?? '',
      text,
      was,
    });
    const save = (client: typeof story.supplier, changes: ReturnType<typeof cell>[]) =>
      client.put(`/api/submissions/${story.submissionId}/readings`).send({ changes });
    const [one, two] = await Promise.all([
      save(story.supplier, [cell(0, '19.010', '19.02'), cell(1, '19.011', '19.03')]),
      save(story.signer, [cell(0, '19.020', '19.02'), cell(2, '19.022', '19.04')]),
    ]);
    expect([one.status, two.status]).toEqual([200, 200]);
    const conflicts = [...one.body.conflicts, ...two.body.conflicts];
    expect(conflicts).toHaveLength(1);
    const stands = one.body.conflicts.length === 0 ? '19.010' : '19.020';
    const wanted = stands === '19.010' ? '19.020' : '19.010';
    expect(conflicts[0]).toMatchObject({ pieceId: pieces[0]?.id, now: stands, wanted });
    const after = (await story.sheet()).rows.find(
      (row) => row.characteristicId === characteristic?.id && row.streamId === sheet.streams[0]?.id,
    );
    expect(after?.readings).toEqual([stands, '19.011', '19.022']);
  });
});

describe('an act that fails half-way', { timeout: 120_000 }, () => {
  let story: PackageStory;
  beforeEach(async () => {
    story = await prepared();
  });

  /** The whole database, but for nothing: what a failed act must leave as it was. */
  async function everything(): Promise<Record<string, unknown>> {
    const tables = await story.app.db.reader.query<{ name: string }[]>(
      "SELECT name FROM sqlite_master WHERE type = 'table' AND name NOT LIKE 'sqlite_%'",
    );
    const rows: Record<string, unknown> = {};
    for (const { name } of tables) rows[name] = await story.app.db.reader.query(`SELECT * FROM "${name}"`);
    return rows;
  }

  /** Lets a disk fail on one table at a time, in the midst of the act; returns on which tables it came to that. */
  async function failsOn(act: () => PromiseLike<Response>, faults: readonly string[]): Promise<string[]> {
    const failed: string[] = [];
    for (const fault of faults) {
      const before = await everything();
      const ddl = (sql: string) => story.app.db.writeTransaction((manager) => manager.query(sql));
      await ddl(`CREATE TRIGGER broken BEFORE ${fault} BEGIN SELECT RAISE(ABORT, 'broken'); END`);
      const answer = await act();
      await ddl('DROP TRIGGER broken');
      expect(answer.status, `${fault}: ${answer.text}`).toBe(500);
      expect(answer.body.detail, fault).toMatch(/^Nothing was changed/);
      expect(await everything(), fault).toEqual(before);
      failed.push(fault);
    }
    return failed;
  }

  it('saves no reading without its line in the trail', async () => {
    const sheet = await story.sheet();
    const changes = sheet.characteristics.slice(0, 3).map((facts) => ({
      characteristicId: facts.id,
      pieceId: sheet.pieces[0]?.id ?? '',
      text: facts.balloon === '2' ? '0.099' : '19.049',
      was: null,
    }));
    const act = () =>
      story.supplier
        .put(`/api/submissions/${story.submissionId}/readings`)
        .send({ changes, overwrite: true });
    const faults = ['INSERT ON audit_events', 'UPDATE ON characteristic_results', 'UPDATE ON submissions'];
    expect(await failsOn(act, faults)).toEqual(faults);
    expect((await act()).status).toBe(200);
  });

  it('submits no package without check, seal, signature, trail and mail', async () => {
    const { digest } = (await story.signer.get(`/api/submissions/${story.submissionId}/warrant`)).body;
    const act = () =>
      story.signer
        .post(`/api/submissions/${story.submissionId}/warrant/signature`)
        .set(onceKey())
        .send({ password: testPassword, digest });
    const tables = [
      'checks',
      'audit_events',
      'sealed_packages',
      'signatures',
      'outbox_mails',
      'idempotency_keys',
    ];
    const faults = [...tables.map((table) => `INSERT ON ${table}`), 'UPDATE OF sealed_at ON submissions'];
    expect(await failsOn(act, faults)).toEqual(faults);
    expect((await act()).status).toBe(201);
  });

  it('decides nothing without signature, buying status, trail and mail', async () => {
    expect((await story.sign()).status).toBe(201);
    await story.acceptAll();
    const path = `/api/submissions/${story.submissionId}`;
    const { digest } = (await story.reviewer.get(`${path}/disposition-draft`).expect(200)).body;
    const act = () =>
      story.reviewer
        .post(`${path}/disposition`)
        .set(onceKey())
        .send({
          password: testPassword,
          digest,
          outcome: 'interim-approval',
          endOn: story.inDays(30),
          containment: '100 % check',
          conditions: [{ text: 'New core', owner: 'Toolroom', dueOn: story.inDays(20) }],
        });
    const faults = [
      ...[
        'dispositions',
        'interim_conditions',
        'audit_events',
        'sealed_packages',
        'signatures',
        'outbox_mails',
      ].map((table) => `INSERT ON ${table}`),
      'UPDATE OF state ON submissions',
      'UPDATE ON supply_lines',
    ];
    expect(await failsOn(act, faults)).toEqual(faults);
    const done = await act();
    expect(done.status, done.text).toBe(201);
    expect(await story.buyingLine()).toMatchObject({ verdict: 'may-buy-within-limits' });
  });
});
