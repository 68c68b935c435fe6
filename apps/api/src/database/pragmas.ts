import type { Database as Connection } from 'better-sqlite3';

/** The write-ahead log of earlier releases can be corrupted when two connections are open, as here. */
const oldestSafeSqlite = [3, 51, 3] as const;

export class DatabaseUnfit extends Error {}

/** Run on every open: a reopened file does not remember `synchronous`, and FULL is what an acknowledged write rests on. */
export function prepareWriter(connection: Connection): void {
  // Takes effect only while the file is still empty; one row of readings then fills no page by itself.
  connection.pragma('page_size = 8192');
  connection.pragma('journal_mode = WAL');
  connection.pragma('synchronous = FULL');
  connection.pragma('wal_autocheckpoint = 1000');
  connection.pragma('cache_size = -32768');
  connection.pragma('temp_store = MEMORY');
}

export function prepareReader(connection: Connection): void {
  connection.pragma('query_only = ON');
  connection.pragma('cache_size = -32768');
  connection.pragma('mmap_size = 268435456');
}

/** Names of the settings that are not as they must be; empty when the connection is fit to write through. */
export function wrongPragmas(connection: Connection): string[] {
  const read = (name: string) => String(connection.pragma(name, { simple: true }));
  const expected: Record<string, string> = { journal_mode: 'wal', synchronous: '2', foreign_keys: '1' };
  const wrong = Object.entries(expected).flatMap(([name, value]) =>
    read(name) === value ? [] : [`${name} is ${read(name)}, not ${value}`],
  );
  if (Number(read('busy_timeout')) < 1000) wrong.push(`busy_timeout is ${read('busy_timeout')}`);
  return wrong;
}

export function assertSqliteVersion(connection: Connection): void {
  const { version } = connection.prepare('SELECT sqlite_version() AS version').get() as { version: string };
  const parts = version.split('.').map(Number);
  for (const [at, least] of oldestSafeSqlite.entries()) {
    const part = parts[at] ?? 0;
    if (part > least) return;
    if (part < least) {
      throw new DatabaseUnfit(
        `SQLite ${version} is older than ${oldestSafeSqlite.join('.')}, which this needs.`,
      );
    }
  }
}

/** What a start must find in order before anything is served. */
export function assertSound(connection: Connection): void {
  const wrong = wrongPragmas(connection);
  if (wrong.length > 0)
    throw new DatabaseUnfit(`The database is not set up as it must be: ${wrong.join('; ')}.`);
  const quick = connection.pragma('quick_check(1)', { simple: true });
  if (quick !== 'ok')
    throw new DatabaseUnfit(`The database file is damaged: ${String(quick)}. Restore a backup.`);
  const orphans = connection.pragma('foreign_key_check') as { table: string; parent: string }[];
  if (orphans.length > 0) {
    const first = orphans[0];
    throw new DatabaseUnfit(
      `${orphans.length} rows refer to rows that do not exist, first in ${first?.table ?? '?'}.`,
    );
  }
}
