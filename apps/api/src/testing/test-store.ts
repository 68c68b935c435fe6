import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { startStore } from '../demo/store.ts';

export const testBucket = 'trammel-test';

let running: Promise<string> | undefined;

/** The address of one object store for all tests of this process, on a free port and in a folder of its own. */
export function testStore(): Promise<string> {
  running ??= start();
  return running;
}

async function start(): Promise<string> {
  const folder = mkdtempSync(join(tmpdir(), 'trammel-store-'));
  process.on('exit', () => rmSync(folder, { recursive: true, force: true }));
  return (await startStore(folder, testBucket, 0)).address;
}
