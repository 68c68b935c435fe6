import { closeSync, copyFileSync, mkdtempSync, openSync, rmSync, writeFileSync, writeSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import Sqlite from 'better-sqlite3';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { createWriter, openDatabase, type Database } from './data-source.ts';
import { Organisation } from './entities/organisation.entity.ts';
import { AlreadyRunning, takeLock } from './lock-file.ts';
import { writeStatement } from './raw.ts';

let folder: string;
let file: string;
let db: Database;

beforeEach(async () => {
  folder = mkdtempSync(join(tmpdir(), 'trammel-db-'));
  file = join(folder, 'trammel.sqlite');
  db = await openDatabase(file);
});

afterEach(async () => {
  await db.close();
  rmSync(folder, { recursive: true, force: true });
});

const organisation = (name: string) => ({ id: name, name, createdAt: '2026-03-02T08:00:00.000Z' });
const names = async () =>
  (await db.reader.query<{ name: string }[]>('SELECT name FROM organisations ORDER BY name')).map(
    (row) => row.name,
  );
const tick = () => new Promise((resolve) => setImmediate(resolve));

describe('the database', () => {
  it('is durable on every open, not only on a new file', async () => {
    expect(db.faults()).toEqual([]);
    await db.close();
    db = await openDatabase(file);
    expect(db.faults()).toEqual([]);
    const raw = new Sqlite(file, { readonly: true });
    expect(raw.pragma('page_size', { simple: true })).toBe(8192);
    expect(raw.pragma('journal_mode', { simple: true })).toBe('wal');
    raw.close();
  });

  it('has exactly the schema that the entities describe', async () => {
    const writer = await createWriter(file).initialize();
    const difference = await writer.driver.createSchemaBuilder().log();
    await writer.destroy();
    expect(difference.upQueries.map((query) => query.query)).toEqual([]);
  });

  it('refuses to open a file whose rows refer to rows that are gone, and a damaged one', async () => {
    await db.close();
    const raw = new Sqlite(file);
    raw.pragma('foreign_keys = OFF');
    raw.exec(`INSERT INTO sites (id, organisation_id, name) VALUES ('s', 'nobody', 'Nowhere')`);
    raw.close();
    await expect(openDatabase(file)).rejects.toThrow('refer to rows that do not exist, first in sites');
    const copy = join(folder, 'damaged.sqlite');
    copyFileSync(file, copy);
    const handle = openSync(copy, 'r+');
    writeSync(handle, Buffer.alloc(60_000, 0x5a), 0, 60_000, 8192 * 3);
    closeSync(handle);
    await expect(openDatabase(copy)).rejects.toThrow(/damaged|malformed|corrupt/);
    const mend = new Sqlite(file);
    mend.exec(`DELETE FROM sites`);
    mend.close();
    db = await openDatabase(file);
  });

  it('lets screens read only', async () => {
    await expect(db.reader.query(`DELETE FROM organisations`)).rejects.toThrow(/readonly|query_only/);
  });
});

describe('the write transaction', () => {
  it('keeps an acknowledged write when another fails at the same time, and shows nothing uncommitted', async () => {
    let release = () => undefined as void;
    const gate = new Promise<void>((resolve) => (release = resolve));
    const failing = db.writeTransaction(async (manager) => {
      await manager.insert(Organisation, organisation('fails'));
      await gate;
      throw new Error('refused');
    });
    const good = db.writeTransaction((manager) => manager.insert(Organisation, organisation('stays')));
    await tick();
    expect(await names()).toEqual([]);
    release();
    await expect(failing).rejects.toThrow('refused');
    await good;
    expect(await names()).toEqual(['stays']);
  });

  it('runs units one after the other, so that no change is lost', async () => {
    await db.writeTransaction((manager) => manager.insert(Organisation, organisation('0')));
    const once = () =>
      db.writeTransaction(async (manager) => {
        const row = await manager.findOneByOrFail(Organisation, { id: '0' });
        await tick();
        await manager.update(Organisation, { id: '0' }, { name: String(Number(row.name) + 1) });
      });
    await Promise.all(Array.from({ length: 200 }, once));
    expect(await names()).toEqual(['200']);
  });

  it('refuses to be entered inside itself instead of waiting for ever', async () => {
    const nested = db.writeTransaction(() => db.writeTransaction(() => Promise.resolve('never')));
    await expect(nested).rejects.toThrow('entered inside a write transaction');
    await db.writeTransaction((manager) => manager.insert(Organisation, organisation('after')));
    expect(await names()).toEqual(['after']);
  });

  it('stops work that goes on after its end', async () => {
    let forgotten: Promise<unknown> = Promise.resolve();
    await db.writeTransaction((manager) => {
      forgotten = tick().then(() => manager.insert(Organisation, organisation('late')));
      forgotten.catch(() => undefined);
      return Promise.resolve();
    });
    await expect(forgotten).rejects.toThrow('an await is missing');
    expect(await names()).toEqual([]);
  });

  it('rolls raw statements back with everything else', async () => {
    const insert = `INSERT INTO organisations (id, name, created_at, version) VALUES (?, ?, ?, 1)`;
    const failing = db.writeTransaction((manager) => {
      writeStatement(manager, insert).run('a', 'raw', '2026-03-02T08:00:00.000Z');
      return Promise.reject(new Error('half-way'));
    });
    await expect(failing).rejects.toThrow('half-way');
    expect(await names()).toEqual([]);
  });
});

describe('the lock file', () => {
  it('keeps a second instance out and survives an owner that died', () => {
    const lock = join(folder, 'lock');
    const release = takeLock(lock);
    release();
    const again = takeLock(lock);
    again();
    writeFileSync(lock, String(process.ppid));
    expect(() => takeLock(lock)).toThrow(AlreadyRunning);
    writeFileSync(lock, '999999');
    takeLock(lock)();
  });
});
