// The running product: trial services, API and what is told to the person who started it.
import { createInterface } from 'node:readline';
import { createFamily, portIsFree, Stop } from './processes.mjs';

const mailPagePort = 4184;

/**
 * Where the product of this start listens and keeps its data.
 * @param {NodeJS.ProcessEnv} [env]
 */
export function settingsFrom(env = process.env) {
  const host = env.HOST || '127.0.0.1';
  const port = env.PORT ? Number(env.PORT) : 4180;
  if (!Number.isInteger(port) || port < 1 || port > 65_535) {
    throw new Stop(`PORT is ${env.PORT}: it takes a number from 1 to 65535.`);
  }
  const reachable = ['0.0.0.0', '::'].includes(host) ? '127.0.0.1' : host;
  return { host, port, dataDir: env.DATA_DIR || 'data', address: `http://${reachable}:${port}` };
}

/** @param {{ host: string, port: number }} settings @param {string} [name] */
export async function requirePort({ host, port }, name = 'PORT') {
  if (await portIsFree(host, port)) return;
  throw new Stop(
    `Port ${port} on ${host} is in use, perhaps by a Trammel that is already running. ` +
      `Stop the other program, or name another port by setting ${name}.`,
  );
}

/**
 * Store, mail catcher and mail page. Resolves with their addresses when they listen.
 * @param {ReturnType<typeof createFamily>} family
 * @param {string[]} args
 * @param {string} dataDir
 */
export async function startServices(family, args, dataDir) {
  const wanted = Number(process.env.MAIL_PAGE_PORT ?? mailPagePort);
  const env = {
    ...process.env,
    DATA_DIR: dataDir,
    STORE_PORT: '0',
    SMTP_PORT: '0',
    MAIL_PAGE_PORT: String((await portIsFree('127.0.0.1', wanted)) ? wanted : 0),
  };
  const child = family.start('trial services', args, { env, show: false });
  const lines = createInterface({ input: /** @type {import('node:stream').Readable} */ (child.stdout) });
  return new Promise((/** @type {(value: Record<string, string>) => void} */ resolve, reject) => {
    lines.once('line', (line) => resolve(JSON.parse(line)));
    child.once('exit', () => reject(new Stop('The trial store and mail catcher did not start.')));
  });
}

/** @param {ReturnType<typeof settingsFrom>} settings @param {Record<string, string>} services */
export function apiEnvironment(settings, services) {
  return {
    ...process.env,
    NODE_ENV: 'development',
    TRAMMEL_DEMO: '1',
    HOST: settings.host,
    PORT: String(settings.port),
    PUBLIC_URL: process.env.PUBLIC_URL || settings.address,
    DATA_DIR: settings.dataDir,
    LOG_LEVEL: process.env.LOG_LEVEL || 'error',
    S3_ENDPOINT: services.store,
    S3_BUCKET: process.env.S3_BUCKET || 'trammel',
    S3_ACCESS_KEY_ID: 'S3RVER',
    S3_SECRET_ACCESS_KEY: 'S3RVER',
    SMTP_HOST: services.smtpHost,
    SMTP_PORT: String(services.smtpPort),
    SMTP_SECURE: '0',
    SMTP_USER: '',
    SMTP_PASSWORD: '',
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
  };
}

/** Waits until the product answers that it is ready. @param {string} address @param {() => boolean} alive */
export async function waitUntilReady(address, alive, limitMs = 180_000) {
  const until = Date.now() + limitMs;
  for (;;) {
    const ready = await fetch(`${address}/health/ready`).then(
      (answer) => answer.ok,
      () => false,
    );
    if (ready) return;
    if (!alive()) throw new Stop('The server ended before it was ready: its reason stands above.');
    if (Date.now() > until) throw new Stop(`The server was not ready within ${limitMs / 1000} seconds.`);
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}

/** @param {string} address @param {string} mailPage @param {string} dataDir */
export async function announce(address, mailPage, dataDir, apiAddress = address) {
  const lines = [
    '',
    `Trammel is ready:  ${address}`,
    `Caught mail:       ${mailPage}`,
    `Data:              ${dataDir}`,
  ];
  const demo = await fetch(`${apiAddress}/api/demo/people`)
    .then((answer) => (answer.ok ? answer.json() : null))
    .catch(() => null);
  if (demo?.people.length) {
    const rows = demo.people.map((person) => [person.name, person.desk, person.organisation, person.email]);
    const widths = [0, 1, 2].map((column) => Math.max(...rows.map((row) => row[column].length)));
    lines.push('', `Demo sign-ins, all with the password ${demo.password}`);
    lines.push(...rows.map((row) => `  ${row.map((cell, at) => cell.padEnd(widths[at] ?? 0)).join('  ')}`));
  }
  lines.push('', 'Ctrl-C stops everything. The next start finds all data again.', '');
  console.log(lines.join('\n'));
}

/**
 * Runs `begin` with a family of programs and ends them all with this process, whatever ends it.
 * @param {(family: ReturnType<typeof createFamily>) => Promise<void>} begin
 */
export async function runProduct(begin) {
  const family = createFamily();
  let endingSince = 0;
  /** @param {number} code @param {string} [reason] */
  const end = async (code, reason) => {
    if (endingSince) return;
    endingSince = Date.now();
    if (reason) console.error(reason);
    await family.stop();
    process.exit(code);
  };
  const asked = () => {
    // One Ctrl-C may arrive twice, from the terminal and from npm; a second one from the person comes later.
    if (endingSince && Date.now() - endingSince > 1000) {
      family.killAll();
      process.exit(1);
    }
    void end(0);
  };
  process.on('SIGINT', asked);
  process.on('SIGTERM', asked);
  process.on('SIGHUP', asked);
  // npm does not pass SIGTERM on; its end is noticed here instead.
  if (process.env.npm_lifecycle_event) {
    const parent = process.ppid;
    setInterval(() => process.ppid !== parent && void end(0), 500).unref();
  }
  family.whenLost((name, code) => void end(1, `The ${name} ended unexpectedly (code ${code}).`));
  try {
    await begin(family);
  } catch (error) {
    await end(
      1,
      error instanceof Stop ? error.message : error instanceof Error ? error.stack : String(error),
    );
  }
}
