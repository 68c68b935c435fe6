import { mkdirSync } from 'node:fs';
import { createServer } from 'node:http';
import { join } from 'node:path';
import { createApp } from './app.ts';
import { startJobs } from './background.ts';
import { systemClock } from './clock.ts';
import { readConfig } from './config.ts';
import { openDatabase } from './database/data-source.ts';
import { takeLock } from './database/lock-file.ts';
import { gracefulStop } from './graceful-stop.ts';
import { ordinaryLimits } from './http/rate-limits.ts';
import { createLogger } from './http/request-log.ts';
import { createMailTransport } from './mail/transport.ts';
import { seedDemo } from './seed/seed-demo.ts';
import { FileStore } from './storage/file-store.ts';

/** Longest a transaction should hold the writer; beyond, it is named in the log. */
const slowTransactionMs = 250;

async function main(): Promise<void> {
  const config = readConfig(process.env);
  const log = createLogger(config.logLevel);
  mkdirSync(config.dataDir, { recursive: true, mode: 0o700 });
  const releaseLock = takeLock(join(config.dataDir, 'trammel.lock'));
  const db = await openDatabase(config.databaseFile, {
    onHold: (milliseconds) => {
      if (milliseconds > slowTransactionMs)
        log.warn({ milliseconds }, 'a transaction held the database long');
    },
  });
  const store = new FileStore(config.s3);
  await store
    .prepare()
    .catch((error: unknown) => log.error({ err: error }, 'the file store does not answer'));
  const transport = createMailTransport(config.smtp);
  const app = createApp({
    config,
    clock: systemClock,
    log,
    db,
    store,
    transport,
    rateLimits: ordinaryLimits,
    checkEveryAnswer: false,
  });
  await app.prepare();
  if (config.demo && (await seedDemo(app.core, store))) log.info('the demo scenario is in place');

  const server = createServer(app.express);
  server.requestTimeout = 300_000;
  server.headersTimeout = 15_000;
  server.keepAliveTimeout = 10_000;
  server.maxHeadersCount = 100;
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(config.port, config.host, resolve);
  });
  const jobs = startJobs(app.jobs, log);
  log.info({ port: config.port }, 'ready');

  gracefulStop({
    server,
    log,
    beforeClosing: () => app.stopping(),
    close: async () => {
      await jobs.stop();
      await app.finish();
      transport.close();
      store.close();
      await db.close();
      releaseLock();
    },
  });
}

main().catch((error: unknown) => {
  // The log may not exist yet, and whoever starts the program reads this.
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});
