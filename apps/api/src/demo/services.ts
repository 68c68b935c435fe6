import { join, resolve } from 'node:path';
import { z } from 'zod';
import { startMailCatcher } from './mail-catcher.ts';
import { startMailPage } from './mail-page.ts';
import { startStore } from './store.ts';

const port = z.coerce.number().int().min(0).max(65_535).default(0);
const environment = z.object({
  DATA_DIR: z.string().min(1).default('data'),
  S3_BUCKET: z.string().min(3).default('trammel'),
  STORE_PORT: port,
  SMTP_PORT: port,
  MAIL_PAGE_PORT: port,
});

/** What `npm start` and `npm run dev` run beside the API: its own process, because the store blocks on the disk. */
async function main(): Promise<void> {
  const settings = environment.parse(process.env);
  const mailDirectory = resolve(settings.DATA_DIR, 'mail');
  const smtp = await startMailCatcher(mailDirectory, settings.SMTP_PORT);
  const store = await startStore(
    join(resolve(settings.DATA_DIR), 'store'),
    settings.S3_BUCKET,
    settings.STORE_PORT,
  );
  const mailPage = await startMailPage(mailDirectory, settings.MAIL_PAGE_PORT);

  let closing = false;
  const stop = () => {
    if (closing) return;
    closing = true;
    void Promise.allSettled([smtp.close(), store.close(), mailPage.close()]).then(() => process.exit(0));
  };
  process.once('SIGTERM', stop);
  process.once('SIGINT', stop);
  // The parent is gone without a word: nothing here may outlive it.
  process.once('disconnect', stop);
  if (process.send && !process.connected) stop();

  const addresses = {
    store: store.address,
    smtpHost: smtp.host,
    smtpPort: smtp.port,
    mailPage: mailPage.address,
  };
  process.stdout.write(`${JSON.stringify({ ready: true, ...addresses })}\n`);
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});
