import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import request from 'supertest';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { createTestApp, type TestApp } from '../testing/test-app.ts';

let folder: string;
let app: TestApp;

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'trammel-portal-'));
  mkdirSync(join(folder, 'assets'));
  writeFileSync(join(folder, 'index.html'), '<!doctype html><title>Trammel</title>');
  writeFileSync(join(folder, 'assets', 'main-abc.js'), 'export {};');
  writeFileSync(join(folder, '.secret'), 'x');
  app = await createTestApp({ closes: 'caller', env: { PORTAL_DIR: folder } });
});
afterAll(async () => {
  await app.close();
  rmSync(folder, { recursive: true, force: true });
});

it('keeps assets for ever and asks for the page each time', async () => {
  const asset = await request(app.server).get('/assets/main-abc.js').expect(200);
  expect(asset.headers['cache-control']).toBe('public, max-age=31536000, immutable');
  expect(asset.headers['content-type']).toContain('text/javascript');
  for (const path of ['/', '/index.html', '/submissions/123/review']) {
    const page = await request(app.server).get(path).expect(200);
    expect(page.text, path).toContain('<title>Trammel');
    expect(page.headers['cache-control'], path).toBe('no-cache');
  }
});

it('never answers a missing asset, a hidden file or an unknown API address with the page', async () => {
  for (const path of ['/assets/main-old.js', '/assets/', '/assets', '/.secret', '/api/nowhere', '/api']) {
    const answer = await request(app.server).get(path);
    expect(answer.text, path).not.toContain('<title>');
  }
  await request(app.server).get('/assets/..%2f..%2f..%2fetc%2fpasswd').expect(404);
  await request(app.server).post('/').expect(404);
});

it('says that it lives and whether it is ready, and nothing else', async () => {
  expect((await request(app.server).get('/health/live').expect(200)).body).toEqual({ live: true });
  const ready = await request(app.server).get('/health/ready').expect(200);
  expect(ready.body).toEqual({
    ready: true,
    degraded: false,
    serving: true,
    database: true,
    disk: true,
    store: true,
  });
  app.stopping();
  await request(app.server).get('/health/ready').expect(503);
});
