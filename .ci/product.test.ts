import { createServer, type AddressInfo, type Server } from 'node:net';
import { createServer as createHttpServer } from 'node:http';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { environment, readConfig } from '../apps/api/src/config.ts';
import { announce, apiEnvironment, requirePort, settingsFrom, waitUntilReady } from './product.mjs';

let server: Server | undefined;
afterEach(async () => {
  vi.restoreAllMocks();
  await new Promise((resolve) => (server ? server.close(resolve) : resolve(undefined)));
  server = undefined;
});
const listen = async (serving: Server) => {
  server = serving;
  await new Promise<void>((resolve) => serving.listen(0, '127.0.0.1', resolve));
  return (serving.address() as AddressInfo).port;
};

describe('the settings of a start', () => {
  it('have defaults, and an address to open even when it listens everywhere', () => {
    expect(settingsFrom({})).toEqual({
      host: '127.0.0.1',
      port: 4180,
      dataDir: 'data',
      address: 'http://127.0.0.1:4180',
    });
    expect(settingsFrom({ HOST: '0.0.0.0', PORT: '80' }).address).toBe('http://127.0.0.1:80');
  });

  it('refuse a port that is none', () => {
    expect(() => settingsFrom({ PORT: '4180x' })).toThrow(
      'PORT is 4180x: it takes a number from 1 to 65535.',
    );
    expect(() => settingsFrom({ PORT: '70000' })).toThrow('PORT is 70000');
  });

  it('say which port is in use and which setting moves it', async () => {
    const port = await listen(createServer());
    await expect(requirePort({ host: '127.0.0.1', port })).rejects.toThrow(
      new RegExp(`^Port ${port} on 127\\.0\\.0\\.1 is in use.*setting PORT\\.$`),
    );
  });

  it('become an environment the server accepts, of names it knows', () => {
    const services = { store: 'http://127.0.0.1:1', smtpHost: '127.0.0.1', smtpPort: '2', mailPage: '' };
    const before = new Set(Object.keys(process.env));
    const env = apiEnvironment(settingsFrom({ DATA_DIR: 'elsewhere' }), services);
    const added = Object.keys(env).filter((name) => !before.has(name));
    const known = [...Object.keys(environment.shape), 'AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED'];
    expect(added.filter((name) => !known.includes(name))).toEqual([]);
    const secret = Buffer.alloc(32).toString('base64');
    const config = readConfig({ ...env, JWT_SECRET: secret, AUDIT_KEY: secret, SIGNING_KEY: 'BEGIN' });
    expect(config).toMatchObject({
      demo: true,
      production: false,
      port: 4180,
      smtp: { port: 2, user: undefined },
    });
  });
});

describe('waiting for the server', () => {
  it('ends when it is ready', async () => {
    let asked = 0;
    const port = await listen(
      createHttpServer((request, response) => {
        asked += 1;
        response.writeHead(request.url === '/health/ready' && asked > 2 ? 200 : 503).end();
      }),
    );
    await waitUntilReady(`http://127.0.0.1:${port}`, () => true);
    expect(asked).toBe(3);
  });

  it('ends when the server has died, and when it takes too long', async () => {
    await expect(waitUntilReady('http://127.0.0.1:1', () => false)).rejects.toThrow(
      'ended before it was ready',
    );
    await expect(waitUntilReady('http://127.0.0.1:1', () => true, 50)).rejects.toThrow(
      'not ready within 0.05 seconds',
    );
  });
});

describe('the announcement', () => {
  it('names address, mail, data and everyone to sign in as', async () => {
    const people = [
      {
        name: 'Ines Carrow',
        desk: 'Review desk',
        organisation: 'Tarnfell Drives',
        email: 'ines@tarnfell.example',
      },
      {
        name: 'Ravi',
        desk: 'Buying status',
        organisation: 'Tarnfell Drives',
        email: 'ravi@tarnfell.example',
      },
    ];
    const port = await listen(
      createHttpServer((_request, response) =>
        response.end(JSON.stringify({ password: 'three words', people })),
      ),
    );
    const log = vi.spyOn(console, 'log').mockImplementation(() => undefined);
    await announce(`http://127.0.0.1:${port}`, 'http://127.0.0.1:4184', 'data');
    const said = String(log.mock.calls[0]?.[0]);
    expect(said).toContain(
      `Trammel is ready:  http://127.0.0.1:${port}\nCaught mail:       http://127.0.0.1:4184\n`,
    );
    expect(said).toContain('Demo sign-ins, all with the password three words');
    expect(said).toContain('  Ravi         Buying status  Tarnfell Drives  ravi@tarnfell.example');
  });
});
