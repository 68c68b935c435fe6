import { randomBytes } from 'node:crypto';
import { createWriteStream, mkdirSync } from 'node:fs';
import { rename, rm } from 'node:fs/promises';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { pipeline } from 'node:stream/promises';
import { SMTPServer } from 'smtp-server';

export interface MailCatcher {
  readonly host: string;
  readonly port: number;
  close(): Promise<void>;
}

/** Accepts every mail and keeps it as a file; none is ever sent on. File names sort by the time of arrival. */
export async function startMailCatcher(directory: string, port: number): Promise<MailCatcher> {
  mkdirSync(directory, { recursive: true, mode: 0o700 });
  let latest = 0;
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    disableReverseLookup: true,
    closeTimeout: 500,
    size: 20 * 1024 * 1024,
    onData(stream, _session, done) {
      latest = Math.max(Date.now(), latest + 1);
      const name = `${latest}-${randomBytes(4).toString('hex')}`;
      const partial = join(directory, `${name}.part`);
      pipeline(stream, createWriteStream(partial, { mode: 0o600 }))
        .then(async () => {
          if (stream.sizeExceeded) {
            await rm(partial, { force: true });
            throw Object.assign(new Error('The mail is larger than 20 MB'), { responseCode: 552 });
          }
          await rename(partial, join(directory, `${name}.eml`));
        })
        .then(() => done(), done);
    },
  });
  // A sender that hangs up half-way is its own loss: the catcher goes on.
  server.on('error', () => undefined);
  await new Promise<void>((resolve, reject) => {
    server.server.once('error', reject);
    server.listen(port, '127.0.0.1', resolve);
  });
  const { port: taken } = server.server.address() as AddressInfo;
  return {
    host: '127.0.0.1',
    port: taken,
    close: () => new Promise((resolve) => server.close(() => resolve())),
  };
}
