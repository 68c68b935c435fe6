import { copyFileSync, mkdtempSync, rmSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { inject, onTestFinished } from 'vitest';
import { createApp, type App } from '../app.ts';
import { readConfig, type Config } from '../config.ts';
import { openDatabase, type Database } from '../database/data-source.ts';
import type { OutboxMail } from '../database/entities/outbox-mail.entity.ts';
import { ordinaryLimits, type RateLimitSettings } from '../http/rate-limits.ts';
import { createLogger } from '../http/request-log.ts';
import { FileStore } from '../storage/file-store.ts';
import { fakeClock, type FakeClock } from './fake-clock.ts';
import { catchingTransport, type CatchingTransport } from './catching-transport.ts';
import { testBucket, testStore } from './test-store.ts';

export interface TestApp extends App {
  readonly config: Config;
  readonly clock: FakeClock;
  readonly db: Database;
  readonly store: FileStore;
  /** Takes what the relay sends. */
  readonly transport: CatchingTransport;
  readonly server: Server;
  readonly url: string;
  /** Lines of the log, for what must or must not stand in it. */
  readonly logLines: string[];
  /** Mails in the outbox, oldest first. */
  readonly mails: () => Promise<OutboxMail[]>;
  readonly close: () => Promise<void>;
}

export interface TestAppOptions {
  readonly clock?: FakeClock;
  readonly env?: Record<string, string>;
  readonly limits?: Partial<RateLimitSettings>;
  /** A database to start from instead of the empty one. */
  readonly database?: string;
  /** `test` closes it when the current test ends; `caller` when the caller says so (in `afterAll`). */
  readonly closes?: 'test' | 'caller';
}

/** The whole application on a copy of the migrated database, a real server on a free port, a clock that tests move. */
export async function createTestApp(options: TestAppOptions = {}): Promise<TestApp> {
  const folder = mkdtempSync(join(tmpdir(), 'trammel-test-'));
  const file = join(folder, 'trammel.sqlite');
  copyFileSync(options.database ?? inject('baseDatabase'), file);
  const clock = options.clock ?? fakeClock();
  const server = createServer();
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  const config = readConfig({
    NODE_ENV: 'test',
    TRAMMEL_DEMO: '1',
    DATA_DIR: folder,
    PUBLIC_URL: url,
    S3_ENDPOINT: await testStore(),
    S3_BUCKET: testBucket,
    ...options.env,
  });
  const logLines: string[] = [];
  const db = await openDatabase(file, { migrate: false });
  const store = new FileStore(config.s3);
  const transport = catchingTransport();
  const app = createApp({
    config,
    clock,
    log: createLogger('debug', { write: (line) => void logLines.push(line) }),
    db,
    store,
    transport,
    rateLimits: { ...ordinaryLimits, enabled: false, ...options.limits },
    checkEveryAnswer: true,
  });
  server.on('request', app.express);
  const close = async () => {
    server.closeAllConnections();
    await new Promise((resolve) => server.close(resolve));
    await db.close();
    store.close();
    rmSync(folder, { recursive: true, force: true });
  };
  if ((options.closes ?? 'test') === 'test') onTestFinished(close);
  const mails = () => db.reader.query<OutboxMail[]>('SELECT * FROM outbox_mails ORDER BY created_at, rowid');
  return { ...app, config, clock, db, store, transport, server, url, logLines, mails, close };
}
