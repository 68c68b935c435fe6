import { mkdtempSync, rmSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { TestProject } from 'vitest/node';
import { build } from '../../../.ci/build.mjs';
import { ensureChromium } from '../../../.ci/chromium.mjs';
import { createFamily } from '../../../.ci/processes.mjs';
import { apiEnvironment, settingsFrom, startServices, waitUntilReady } from '../../../.ci/product.mjs';

declare module 'vitest' {
  interface ProvidedContext {
    address: string;
    mailPage: string;
    chromium: string;
  }
}

/** The built product with the demo in a folder of its own, as `npm start` runs it; gone again afterwards. */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  const chromium = await ensureChromium();
  await build();
  const dataDir = mkdtempSync(join(tmpdir(), 'trammel-e2e-'));
  const settings = settingsFrom({ DATA_DIR: dataDir, PORT: String(await freePort()) });
  const family = createFamily();
  const stop = async () => {
    await family.stop();
    rmSync(dataDir, { recursive: true, force: true });
  };
  try {
    process.env.MAIL_PAGE_PORT = String(await freePort());
    const services = await startServices(family, ['dist/api/demo/services.js'], dataDir);
    const server = family.start('server', ['--import', './.ci/leash.mjs', 'dist/api/main.js'], {
      env: { ...apiEnvironment(settings, services), PUBLIC_URL: settings.address },
    });
    await waitUntilReady(settings.address, () => server.exitCode === null && server.signalCode === null);
    project.provide('address', settings.address);
    project.provide('mailPage', services.mailPage ?? '');
    project.provide('chromium', chromium);
  } catch (error) {
    await stop();
    throw error;
  }
  return stop;
}

function freePort(): Promise<number> {
  return new Promise((resolve) => {
    const probe = createServer().listen(0, '127.0.0.1', () => {
      const { port } = probe.address() as AddressInfo;
      probe.close(() => resolve(port));
    });
  });
}
