import { copyFileSync } from 'node:fs';
import { join } from 'node:path';
import Sqlite from 'better-sqlite3';
import { describe, expect, it } from 'vitest';
import { appendAudit, hashOfRow, type AuditRow } from '../../database/append-audit.ts';
import { AuditAnchors, AnchorsBroken } from '../../database/audit-anchors.ts';
import { openDatabase } from '../../database/data-source.ts';
import { auditHead, verifyAuditTrail } from '../../database/verify-audit.ts';
import { buildCast } from '../../testing/builders.ts';
import { anonymous, signInAs } from '../../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../../testing/test-app.ts';

async function scene() {
  const app = await createTestApp();
  const cast = await buildCast(app);
  const administrator = await signInAs(app, cast.customerAdministrator);
  for (const name of ['North', 'South', 'East']) {
    await administrator.post('/api/organisation/sites').send({ name }).expect(201);
  }
  return { app, cast, administrator };
}

describe('the audit trail', () => {
  it('is read by administrators, their own organisation only, numbered without gaps', async () => {
    const { app, cast, administrator } = await scene();
    await anonymous(app).get('/api/audit').expect(401);
    await (await signInAs(app, cast.reviewer)).get('/api/audit').expect(403);
    await app.db.writeTransaction((manager) => {
      const organisation = { id: cast.otherSupplier.id, name: cast.otherSupplier.name };
      const entry = { action: 'x.y', objectType: 'x', objectId: 'x', summary: 'Elsewhere' };
      return Promise.resolve(
        appendAudit(manager, { now: app.clock.now(), actor: null, organisation }, entry),
      );
    });
    await administrator.post('/api/organisation/sites').send({ name: 'West' }).expect(201);
    const first = await administrator.get('/api/audit?limit=2').expect(200);
    expect(first.body.items.map((item: { number: number }) => item.number)).toEqual([4, 3]);
    expect(first.body.items[0]).toMatchObject({ action: 'site.added', after: { name: 'West', address: '' } });
    const second = await administrator.get(`/api/audit?limit=2&cursor=${first.body.nextCursor}`).expect(200);
    expect(second.body.items.map((item: { number: number }) => item.number)).toEqual([2, 1]);
    expect(second.body.nextCursor).toBeNull();
    const found = await administrator.get('/api/audit?q=south').expect(200);
    expect(found.body.items).toHaveLength(1);
    await administrator.get('/api/audit?cursor=made-up').expect(422);
  });

  it('records that it was read', async () => {
    const { administrator } = await scene();
    await administrator.get('/api/audit').expect(200);
    const read = await administrator.get('/api/audit').expect(200);
    expect(read.body.items[0]).toMatchObject({ action: 'audit.read' });
  });

  it('cannot be changed or cut, whoever tries', async () => {
    const { app } = await scene();
    const attempt = (sql: string) => app.db.writeTransaction((manager) => manager.query(sql));
    await expect(attempt(`UPDATE audit_events SET summary = 'x'`)).rejects.toThrow(
      'audit_events is append-only',
    );
    await expect(attempt(`DELETE FROM audit_events`)).rejects.toThrow('audit_events is append-only');
  });

  it('is sound to its administrators while nobody has tampered with it', async () => {
    const { administrator } = await scene();
    const answer = await administrator.get('/api/audit/verification').expect(200);
    expect(answer.body).toEqual({ rows: 3, sound: true, firstBroken: null, reason: null });
  });
});

describe('verification', () => {
  const mutations: Record<string, (raw: Sqlite.Database) => void> = {
    edit: (raw) => raw.exec(`UPDATE audit_events SET summary = 'Nothing happened' WHERE sequence = 2`),
    delete: (raw) => raw.exec(`DELETE FROM audit_events WHERE sequence = 2`),
    insert: (raw) => {
      raw.exec(`UPDATE audit_events SET sequence = sequence + 10 WHERE sequence > 2`);
      raw.exec(`UPDATE audit_events SET sequence = sequence - 9 WHERE sequence > 10`);
      raw.exec(`INSERT INTO audit_events SELECT 3, 99, at, actor_id, actor_name, organisation_id, organisation_name,
        action, object_type, object_id, 'slipped in', before, after, previous_hash, hash FROM audit_events WHERE sequence = 2`);
    },
    swap: (raw) => {
      raw.exec(`UPDATE audit_events SET sequence = 99 WHERE sequence = 1`);
      raw.exec(`UPDATE audit_events SET sequence = 1 WHERE sequence = 2`);
      raw.exec(`UPDATE audit_events SET sequence = 2 WHERE sequence = 99`);
    },
    truncate: (raw) => raw.exec(`DELETE FROM audit_events WHERE sequence = 3`),
    recompute: (raw) => recompute(raw),
  };

  it.each(Object.keys(mutations))('finds: %s', async (name) => {
    const { app } = await scene();
    const anchors = await anchored(app);
    const file = join(app.config.dataDir, 'tampered.sqlite');
    await app.db.backup(file);
    copyFileSync(file, `${file}.copy`);
    const raw = new Sqlite(file);
    raw.exec('DROP TRIGGER audit_events_no_update; DROP TRIGGER audit_events_no_delete');
    mutations[name]?.(raw);
    raw.close();
    const tampered = await openDatabase(file, { migrate: false });
    const verdict = await verifyAuditTrail(tampered.reader, await anchors.read());
    await tampered.close();
    expect(verdict.sound).toBe(false);
    expect(verdict.reason).toMatch(/\w/);
    expect(await verifyAuditTrail(app.db.reader, await anchors.read())).toMatchObject({
      sound: true,
      rows: 3,
    });
  });

  it('refuses anchors that were not written with the key', async () => {
    const { app } = await scene();
    await anchored(app);
    const forged = new AuditAnchors(join(app.config.dataDir, 'anchors'), Buffer.alloc(32, 7));
    await expect(forged.read()).rejects.toThrow(AnchorsBroken);
  });
});

async function anchored(app: TestApp): Promise<AuditAnchors> {
  const anchors = new AuditAnchors(join(app.config.dataDir, 'anchors'), app.config.secrets.audit);
  await anchors.note(auditHead(app.db.reader), app.clock.now());
  return anchors;
}

/** What someone with the database file and this source could do: rewrite a row and work out the rest anew. */
function recompute(raw: Sqlite.Database): void {
  const rows = raw
    .prepare(
      `SELECT sequence, organisation_sequence AS organisationSequence, at, actor_id AS actorId, actor_name AS actorName,
        organisation_id AS organisationId, organisation_name AS organisationName, action, object_type AS objectType,
        object_id AS objectId, summary, before, after, previous_hash AS previousHash FROM audit_events ORDER BY sequence`,
    )
    .all() as AuditRow[];
  let previous = rows[0]?.previousHash ?? '';
  for (const row of rows) {
    const changed = { ...row, summary: `${row.summary} (rewritten)`, previousHash: previous };
    previous = hashOfRow(changed);
    raw
      .prepare('UPDATE audit_events SET summary = ?, previous_hash = ?, hash = ? WHERE sequence = ?')
      .run(changed.summary, changed.previousHash, previous, row.sequence);
  }
}
