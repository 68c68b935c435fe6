import { createHash, randomBytes, randomUUID } from 'node:crypto';
import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { DAY, MINUTE } from '../../clock.ts';
import { buildCast } from '../../testing/builders.ts';
import { anonymous, signInAs, type Client } from '../../testing/sign-in.ts';
import { createTestApp } from '../../testing/test-app.ts';
import { sweepPendingFiles } from './documents.service.ts';

const pdf = Buffer.concat([Buffer.from('%PDF-1.7\n'), randomBytes(200_000)]);

async function scene() {
  const app = await createTestApp();
  const cast = await buildCast(app);
  return { app, cast, supplier: await signInAs(app, cast.supplierQuality) };
}

const send = (
  client: Client,
  content: Buffer | string,
  filename: string,
  contentType = 'application/octet-stream',
) => client.post('/api/files').attach('file', Buffer.from(content), { filename, contentType });

describe('a file', () => {
  it('is stored whole under a key that has nothing of its name, and comes back byte for byte', async () => {
    const { app, supplier } = await scene();
    const sent = await send(supplier, pdf, 'Prüfbericht Ø25 „A“.pdf', 'application/pdf').expect(201);
    expect(sent.body).toMatchObject({
      name: 'Prüfbericht Ø25 „A“.pdf',
      mediaType: 'application/pdf',
      size: pdf.length,
      sha256: createHash('sha256').update(pdf).digest('hex'),
    });
    const [row] = await app.db.reader.query<{ object_key: string }[]>('SELECT object_key FROM stored_files');
    expect(row?.object_key).toMatch(/^[0-9a-f]{16}\/[0-9a-f]{48}$/);
    expect(readdirSync(join(app.config.dataDir, 'uploads'))).toEqual([]);

    const back = await supplier
      .get(`/api/files/${sent.body.id}/content`)
      .buffer(true)
      .parse(asBuffer)
      .expect(200);
    expect((back.body as Buffer).equals(pdf)).toBe(true);
    expect(back.headers).toMatchObject({
      'content-type': 'application/pdf',
      'x-content-type-options': 'nosniff',
      'content-security-policy': "sandbox; default-src 'none'",
      'cross-origin-resource-policy': 'same-origin',
    });
    expect(back.headers['content-disposition']).toBe(
      `attachment; filename="Pr_fbericht _25 _A_.pdf"; filename*=UTF-8''Pr%C3%BCfbericht%20%C3%9825%20%E2%80%9EA%E2%80%9C.pdf`,
    );
  });

  it('is read in ranges as a viewer does', async () => {
    const { supplier } = await scene();
    const { id } = (await send(supplier, pdf, 'drawing.pdf').expect(201)).body;
    const part = (range: string) =>
      supplier.get(`/api/files/${id}/content`).set('Range', range).buffer(true).parse(asBuffer);
    const first = await part('bytes=0-8').expect(206);
    expect((first.body as Buffer).toString()).toBe('%PDF-1.7\n');
    expect(first.headers['content-range']).toBe(`bytes 0-8/${pdf.length}`);
    const last = await part('bytes=-5').expect(206);
    expect((last.body as Buffer).equals(pdf.subarray(-5))).toBe(true);
    const open = await part(`bytes=${pdf.length - 3}-`).expect(206);
    expect((open.body as Buffer).equals(pdf.subarray(-3))).toBe(true);
    const beyond = await part(`bytes=${pdf.length}-`).expect(416);
    expect(beyond.headers['content-range']).toBe(`bytes */${pdf.length}`);
  });

  it('of another organisation is not found, by the same bytes as one that never was', async () => {
    const { app, cast, supplier } = await scene();
    const { id } = (await send(supplier, pdf, 'drawing.pdf').expect(201)).body;
    await anonymous(app).get(`/api/files/${id}/content`).expect(401);
    await (await signInAs(app, cast.purchaser)).get(`/api/files/${id}/content`).expect(403);
    for (const stranger of [cast.otherSupplierQuality, cast.otherReviewer, cast.reviewer]) {
      const client = await signInAs(app, stranger);
      const foreign = await client.get(`/api/files/${id}/content`).expect(404);
      const never = await client.get(`/api/files/${randomUUID()}/content`).expect(404);
      expect({ ...foreign.body, instance: '' }).toEqual({ ...never.body, instance: '' });
      expect(Object.keys(foreign.headers)).toEqual(Object.keys(never.headers));
    }
  });

  it('that differs from what was received is not handed out, and the trail says so', async () => {
    const { app, supplier } = await scene();
    const { id } = (await send(supplier, pdf, 'drawing.pdf').expect(201)).body;
    await supplier.get(`/api/files/${id}/content`).expect(200);
    await app.db.writeTransaction(async (manager) => {
      await manager.query('DROP TRIGGER stored_files_stay');
      await manager.query(`UPDATE stored_files SET sha256 = '${'0'.repeat(64)}'`);
    });
    app.clock.advance(5 * MINUTE);
    await supplier.get(`/api/files/${id}/content`).expect(503);
    const events = await app.db.reader.query<{ action: string }[]>('SELECT action FROM audit_events');
    expect(events.map((event) => event.action)).toEqual(['file.stored', 'file.damaged']);
  });

  it('is taken only from people who may send files, whole and alone', async () => {
    const { app, cast, supplier } = await scene();
    await send(anonymous(app), pdf, 'a.pdf').expect(401);
    await send(await signInAs(app, cast.purchaser), pdf, 'a.pdf').expect(403);
    await supplier.post('/api/files').expect(422);
    await supplier.post('/api/files').attach('other', pdf, 'a.pdf').expect(422);
    await supplier.post('/api/files').attach('file', pdf, 'a.pdf').attach('file', pdf, 'b.pdf').expect(422);
    const drawing = supplier.post('/api/files?purpose=drawing').attach('file', Buffer.from('a;b'), 'a.csv');
    expect((await drawing.expect(422)).body.errors[0].detail).toContain('.csv are not taken here');
    const rows = await app.db.reader.query<unknown[]>(`SELECT * FROM stored_files WHERE state = 'stored'`);
    expect(rows).toEqual([]);
    expect(readdirSync(join(app.config.dataDir, 'uploads'))).toEqual([]);
  });

  it('that never came to an end is swept after a day', async () => {
    const { app, cast } = await scene();
    await app.db.writeTransaction((manager) =>
      manager.query(
        `INSERT INTO stored_files VALUES ('f', '${cast.supplier.id}', 'u', 'U', 'n', 'text/csv', 1, 'x', 'never/there', 'pending', ?)`,
        [app.clock.now()],
      ),
    );
    await sweepPendingFiles(app.db, app.clock, app.store);
    expect(await app.db.reader.query('SELECT id FROM stored_files')).toHaveLength(1);
    app.clock.advance(DAY + 1);
    await sweepPendingFiles(app.db, app.clock, app.store);
    expect(await app.db.reader.query('SELECT id FROM stored_files')).toEqual([]);
  });
});

function asBuffer(answer: unknown, done: (error: Error | null, body: Buffer) => void): void {
  const res = answer as NodeJS.ReadableStream;
  const chunks: Buffer[] = [];
  res.on('data', (chunk: Buffer) => chunks.push(chunk));
  res.on('end', () => done(null, Buffer.concat(chunks)));
}
