import { chmodSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { ensureChromium, findChromium } from './chromium.mjs';

afterEach(() => {
  vi.unstubAllEnvs();
});

describe('the browser of the tests', () => {
  it('is the one CHROMIUM_PATH names', () => {
    const folder = mkdtempSync(join(tmpdir(), 'trammel-browser-'));
    const program = join(folder, 'chromium');
    writeFileSync(program, '');
    chmodSync(program, 0o755);
    vi.stubEnv('CHROMIUM_PATH', program);
    expect(findChromium()).toBe(program);
    rmSync(folder, { recursive: true });
  });

  it('is never another one when CHROMIUM_PATH names nothing', async () => {
    vi.stubEnv('CHROMIUM_PATH', '/nowhere/chromium');
    expect(findChromium()).toBeNull();
    await expect(ensureChromium()).rejects.toThrow('CHROMIUM_PATH names no file: /nowhere/chromium');
  });
});
