// The promise of `npm start`, kept in the built product: it becomes ready, says where things are, stops cleanly when
// asked to, refuses a port in use, and finds its data again. Run by `npm test` after the build.
import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createRequire } from 'node:module';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { top } from './processes.mjs';

/** @returns {Promise<number>} */
function freePort() {
  return new Promise((resolve) => {
    const probe = createServer().listen(0, '127.0.0.1', () => {
      const { port } = /** @type {import('node:net').AddressInfo} */ (probe.address());
      probe.close(() => resolve(port));
    });
  });
}

/** @param {string} dataDir @param {number} port */
function begin(dataDir, port) {
  const env = {
    ...process.env,
    DATA_DIR: dataDir,
    PORT: String(port),
    MAIL_PAGE_PORT: '0',
    HOST: '127.0.0.1',
  };
  const child = spawn(process.execPath, ['.ci/start.mjs'], {
    cwd: top,
    env,
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let output = '';
  let heard = () => undefined;
  const hear = (/** @type {Buffer} */ chunk) => {
    output += chunk.toString();
    heard();
  };
  child.stdout.on('data', hear);
  child.stderr.on('data', hear);
  const ended = new Promise((resolve) => child.once('close', (code, signal) => resolve(code ?? signal)));
  const said = (/** @type {string} */ words) =>
    new Promise((/** @type {(value: void) => void} */ resolve, reject) => {
      heard = () => void (output.includes(words) && resolve());
      heard();
      void ended.then((code) =>
        reject(new Error(`npm start ended with ${code} before it said "${words}":\n${output}`)),
      );
    });
  return { child, ended, said, output: () => output };
}

/** @param {boolean} holds @param {string} what @param {string} [seen] */
function expect(holds, what, seen = '') {
  if (!holds) throw new Error(`npm start: ${what}${seen && `\n${seen}`}`);
}

/** @param {string} address */
async function answers(address) {
  return fetch(address).then(
    (answer) => answer.ok,
    () => false,
  );
}

/** @param {string} output @param {string} caption */
const addressIn = (output, caption) => new RegExp(`^${caption}:\\s+(\\S+)$`, 'm').exec(output)?.[1] ?? '';

/** @param {string} dataDir @param {number} port @param {NodeJS.Signals} signal */
async function oneLife(dataDir, port, signal) {
  const start = begin(dataDir, port);
  try {
    await start.said('Ctrl-C stops everything');
    const output = start.output();
    const address = addressIn(output, 'Trammel is ready');
    const mailPage = addressIn(output, 'Caught mail');
    expect(address === `http://127.0.0.1:${port}`, 'it prints its address', output);
    expect(/^Demo sign-ins, all with the password .+$/m.test(output), 'it prints the demo sign-ins', output);
    expect((output.match(/@/g) ?? []).length >= 3, 'with a mail address for each', output);
    const portal = await fetch(address);
    expect((await portal.text()).includes('<div id="root">'), 'the address answers with the portal');
    expect(await answers(mailPage), 'caught mail can be read', mailPage);
    expect(await answers(`${address}/health/live`), 'it says that it lives');
    const second = begin(dataDir, port);
    expect((await second.ended) === 1, 'a second start on the same port is refused', second.output());
    expect(
      second.output().includes(`Port ${port} on 127.0.0.1 is in use`),
      'with the reason',
      second.output(),
    );
    // Twice, as a terminal and npm together deliver one Ctrl-C.
    start.child.kill(signal);
    start.child.kill(signal);
    expect((await start.ended) === 0, `${signal} ends it with 0`, start.output());
    expect(!(await answers(`${address}/health/live`)), 'the server is gone afterwards');
    expect(!(await answers(mailPage)), 'and the mail page');
    expect(!existsSync(join(dataDir, 'trammel.lock')), 'and the lock on the data');
    return output;
  } finally {
    start.child.kill('SIGKILL');
  }
}

/** What a life left behind. @param {string} dataDir */
function keptIn(dataDir) {
  const Database = createRequire(import.meta.url)('better-sqlite3');
  const database = new Database(join(dataDir, 'trammel.sqlite'), { readonly: true });
  try {
    const count = (/** @type {string} */ table) =>
      database.prepare(`SELECT count(*) FROM ${table}`).pluck().get();
    const tables = [
      'organisations',
      'users',
      'parts',
      'requests',
      'submissions',
      'signatures',
      'stored_files',
    ];
    const key = readFileSync(join(dataDir, 'keys/audit.key'), 'utf8');
    return {
      rows: JSON.stringify(tables.map((table) => `${table} ${count(table)}`)),
      signed: count('signatures'),
      key,
    };
  } finally {
    database.close();
  }
}

export async function checkStart() {
  const dataDir = mkdtempSync(join(tmpdir(), 'trammel-start-'));
  try {
    const port = await freePort();
    const people = (/** @type {string} */ output) => output.slice(output.indexOf('Demo sign-ins'));
    const first = await oneLife(dataDir, port, 'SIGINT');
    const kept = keptIn(dataDir);
    expect(kept.signed > 0, 'the first start seeds signed packages', kept.rows);
    const again = await oneLife(dataDir, port, 'SIGTERM');
    const found = keptIn(dataDir);
    expect(people(first) === people(again), 'a second start offers the same people', again);
    expect(kept.rows === found.rows, 'a second start keeps all data', `${kept.rows}\n${found.rows}`);
    expect(kept.key === found.key, 'a second start keeps its keys');
  } finally {
    rmSync(dataDir, { recursive: true, force: true });
  }
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) {
  await checkStart();
  console.log('npm start keeps its promise');
}
