// npm run build: portal and API into dist/, each only when something it is made from has changed.
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, readdirSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { pathToFileURL } from 'node:url';
import { ensureModules } from './modules.mjs';
import { runNode, Stop, top } from './processes.mjs';

const common = ['package-lock.json', 'tsconfig.json', 'packages/shared/src', 'packages/metrology/src'];
const parts = [
  {
    name: 'portal',
    inputs: [...common, 'index.html', 'vite.config.ts', 'tailwind.config.ts', 'public', 'apps/portal'],
    result: 'dist/portal/index.html',
    args: ['build'],
  },
  {
    name: 'api',
    inputs: [...common, 'apps/api'],
    result: 'dist/api/main.js',
    args: ['build', '-c', 'apps/api/vite.config.ts'],
  },
];

const leftOut = /(^|\/)(node_modules|testing|bench|e2e)(\/|$)|\.(test|spec)\.tsx?$/;

/** @param {string} path @returns {string[]} */
function filesUnder(path) {
  const full = join(top, path);
  if (!existsSync(full)) return [];
  if (statSync(full).isFile()) return [path];
  return readdirSync(full, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => relative(top, join(entry.parentPath, entry.name)))
    .filter((file) => !leftOut.test(file));
}

/** @param {string[]} inputs */
function digestOf(inputs) {
  const hash = createHash('sha256');
  for (const file of inputs.flatMap(filesUnder).sort()) {
    const content = readFileSync(join(top, file));
    hash.update(`${file} ${content.length}\n`).update(content);
  }
  return hash.digest('hex');
}

/** @param {(typeof parts)[number]} part */
async function buildPart({ name, inputs, result, args }) {
  const mark = join(top, 'dist', `.${name}.sha256`);
  const digest = digestOf(inputs);
  const upToDate = existsSync(mark) && existsSync(join(top, result)) && readFileSync(mark, 'utf8') === digest;
  if (upToDate) return { name, built: false, seconds: 0 };
  rmSync(mark, { force: true });
  const env = { ...process.env, NODE_ENV: 'production' };
  const { code, output, seconds } = await runNode(['node_modules/vite/bin/vite.js', ...args], {
    quiet: true,
    env,
  });
  if (code !== 0 || !existsSync(join(top, result)))
    throw new Stop(`The build of the ${name} failed:\n${output}`);
  mkdirSync(join(top, 'dist'), { recursive: true });
  writeFileSync(mark, digest);
  return { name, built: true, seconds };
}

/** Builds what changed, both at once. */
export async function build() {
  const done = await Promise.allSettled(parts.map(buildPart));
  const failed = done.filter((outcome) => outcome.status === 'rejected').map((outcome) => outcome.reason);
  if (failed.length) throw new Stop(failed.map((error) => error.message).join('\n'));
  return done.flatMap((outcome) => (outcome.status === 'fulfilled' ? [outcome.value] : []));
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) {
  try {
    await ensureModules();
    for (const { name, built, seconds } of await build()) {
      console.log(built ? `${name} built in ${seconds.toFixed(1)} s` : `${name} is up to date`);
    }
  } catch (error) {
    if (!(error instanceof Stop)) throw error;
    console.error(error.message);
    process.exitCode = 1;
  }
}
