import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { TestProject } from 'vitest/node';
import { openDatabase } from '../database/data-source.ts';

declare module 'vitest' {
  interface ProvidedContext {
    baseDatabase: string;
  }
}

/** One migrated file a run; every test application starts from a copy of it. */
export async function setup(project: TestProject): Promise<() => void> {
  // The store's client says on every start which Node its next year's releases need.
  process.env.AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED = 'true';
  const folder = mkdtempSync(join(tmpdir(), 'trammel-base-'));
  const file = join(folder, 'base.sqlite');
  const db = await openDatabase(file);
  await db.close();
  project.provide('baseDatabase', file);
  return () => rmSync(folder, { recursive: true, force: true });
}
