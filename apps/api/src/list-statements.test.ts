import { randomUUID } from 'node:crypto';
import type Database from 'better-sqlite3';
import type { EntityManager } from 'typeorm';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { rawConnection } from './database/raw.ts';
import { bore, PackageStory } from './testing/package-story.ts';
import { signInAs, type Client } from './testing/sign-in.ts';

let story: PackageStory;
let administrator: Client;
beforeAll(async () => {
  story = await PackageStory.begin({ closes: 'caller' });
  administrator = await signInAs(story.app, story.cast.customerAdministrator);
  await story.releasePart([bore]);
  await story.issue({ piecesPerStream: 1 });
  await story.acknowledge();
  await story.measure({ '1': { 'cavity 1': ['19.02'], 'cavity 2': ['19.03'] } });
  await story.nameGauges();
  await story.attachControlPlan();
  await story.stateRun();
  expect((await story.sign()).status).toBe(201);
  await story.reviewer
    .post(`/api/requests/${story.requestId}/messages`)
    .send({ kind: 'note', text: 'Thank you' })
    .expect(201);
  await story.app.db.writeTransaction(async (manager) => {
    for (let number = 2; number <= 40; number += 1) await copyPackage(manager, number);
  });
}, 120_000);
afterAll(() => story.app.close());

/** A row again under another id. */
async function copy(
  manager: EntityManager,
  table: string,
  id: string,
  changes: Record<string, string | number>,
): Promise<string> {
  const [row] = await manager.query<Record<string, unknown>[]>(`SELECT * FROM ${table} WHERE id = ?`, [id]);
  const next: Record<string, unknown> = { ...row, id: randomUUID(), ...changes };
  const names = Object.keys(next);
  await manager.query(
    `INSERT INTO ${table} (${names.map((name) => `"${name}"`).join(', ')}) VALUES (${names.map(() => '?').join(', ')})`,
    Object.values(next),
  );
  return next.id as string;
}

/** Another part with its revision, request, submitted round and buying line, and another gauge and message. */
async function copyPackage(manager: EntityManager, number: number): Promise<void> {
  const one = async (sql: string) => (await manager.query<{ id: string }[]>(sql))[0]?.id ?? '';
  const partNumber = `TD-${number}`;
  const partId = await copy(manager, 'parts', story.partId, { number: partNumber });
  const revisionId = await copy(manager, 'part_revisions', story.revisionId, { part_id: partId });
  const requestId = await copy(manager, 'requests', story.requestId, {
    number,
    part_id: partId,
    revision_id: revisionId,
  });
  const submissionId = await copy(manager, 'submissions', story.submissionId, {
    request_id: requestId,
    part_id: partId,
    revision_id: revisionId,
    part_number: partNumber,
  });
  const line = await one('SELECT id FROM supply_lines ORDER BY rowid LIMIT 1');
  await copy(manager, 'supply_lines', line, {
    part_id: partId,
    part_number: partNumber,
    open_submission_id: submissionId,
  });
  await copy(manager, 'gauges', await one('SELECT id FROM gauges ORDER BY rowid LIMIT 1'), {
    code: `G-${number}`,
  });
  await copy(manager, 'request_messages', await one('SELECT id FROM request_messages LIMIT 1'), {});
  await copy(manager, 'users', story.cast.purchaser.id, { email: `buyer-${number}@works.example` });
}

/** Statements that a look at this address runs, on either connection, and how many rows it showed. */
async function look(client: Client, path: string): Promise<{ statements: number; rows: number }> {
  const connection = rawConnection(story.app.db.reader);
  const prototype = Object.getPrototypeOf(connection.prepare('SELECT 1')) as Database.Statement;
  const spies = (['all', 'get', 'run', 'iterate'] as const).map((name) => vi.spyOn(prototype, name));
  const answer = await client.get(`/api${path}`).expect(200);
  const statements = spies.reduce((sum, spy) => sum + spy.mock.calls.length, 0);
  for (const spy of spies) spy.mockRestore();
  const rows = Array.isArray(answer.body.items) ? answer.body.items.length : answer.text.split('\n').length;
  return { statements, rows };
}

const lists: [name: string, who: () => Client, path: string, most: number][] = [
  ['the worklist', () => story.supplier, '/worklist?show=all', 2],
  ['the review desk', () => story.reviewer, '/review-desk?show=all', 2],
  ['the buying status', () => story.purchaser, '/buying-status?sort=partNumber', 3],
  ['the requests of the customer', () => story.reviewer, '/requests?sort=createdAt', 3],
  ['the requests of the supplier', () => story.supplier, '/requests?sort=createdAt', 3],
  ['the parts', () => story.reviewer, '/parts?sort=number', 3],
  ['the gauges', () => story.supplier, '/gauges?sort=code', 3],
];

describe('statements behind a list', () => {
  it.each(lists)('%s: as many for forty rows as for one', async (_, who, path, most) => {
    await look(who(), path);
    const one = await look(who(), `${path}&limit=1`);
    const all = await look(who(), `${path}&limit=200`);
    expect(one.rows).toBe(1);
    expect(all.rows).toBe(40);
    expect(all.statements).toBe(one.statements);
    expect(all.statements).toBeLessThanOrEqual(most);
  });

  it('does not ask row by row where a list has no pages', async () => {
    for (const [client, path] of [
      [administrator, '/people'],
      [story.reviewer, '/organisation/reviewers'],
      [story.reviewer, '/suppliers'],
      [story.supplier, `/submissions/${story.submissionId}/elements`],
      [administrator, '/audit?limit=50'],
    ] as const) {
      const seen = await look(client, path);
      expect(seen.rows, path).toBeGreaterThan(0);
      expect(seen.statements, path).toBeLessThan(10);
    }
  });

  it('writes the whole buying status as CSV in a few statements', async () => {
    const seen = await look(story.purchaser, '/buying-status.csv');
    expect(seen.rows).toBeGreaterThan(40);
    expect(seen.statements).toBeLessThanOrEqual(4);
  });
});
