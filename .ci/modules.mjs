// Makes node_modules what the lock file says, and knows when it already is.
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { run, runNode, Stop, top } from './processes.mjs';
import { canInstall, installPackages } from './system-packages.mjs';

const markFile = join(top, 'node_modules', '.trammel-installed');

function wantedMark() {
  const lock = readFileSync(join(top, 'package-lock.json'));
  return createHash('sha256')
    .update(lock)
    .update(`${process.platform} ${process.arch} ${process.versions.modules}`)
    .digest('hex');
}

/** Settings a shell may carry that would leave out what the build and the tests need. */
function cleanEnvironment() {
  const env = { ...process.env };
  const unwanted =
    /^(node_env|npm_config_(omit|only|production|include|ignore_scripts|dry_run|global|location|prefix|workspaces?|package_lock(_only)?|local_prefix))$/i;
  for (const name of Object.keys(env)) if (unwanted.test(name)) delete env[name];
  return env;
}

/** What npm wrote down about the last install, against the lock: somebody may have run `npm ci` by hand. */
function alreadyInstalled() {
  try {
    const read = (/** @type {string} */ file) => JSON.parse(readFileSync(join(top, file), 'utf8')).packages;
    const wanted = read('package-lock.json');
    const present = read('node_modules/.package-lock.json');
    return Object.entries(wanted).every(([path, entry]) => {
      if (!path.includes('node_modules/') || entry.optional || entry.devOptional) return true;
      const there = present[path];
      return there && there.version === entry.version && existsSync(join(top, path));
    });
  } catch {
    return false;
  }
}

const nativeModulesWork = async () =>
  (await runNode(['-e', "new (require('better-sqlite3'))(':memory:')"], { quiet: true })).code === 0;

function npmCi() {
  const args = ['ci', '--include=dev', '--no-audit', '--no-fund'];
  const npm = process.env.npm_execpath;
  const env = cleanEnvironment();
  return npm?.endsWith('.js') ? runNode([npm, ...args], { env }) : run('npm', args, { env });
}

function refuseOtherNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
  if (major === 20 && minor >= 11) return;
  throw new Stop(`Trammel runs on Node 20 (20.11 or later). This is Node ${process.versions.node}.`);
}

/** Installs when the lock file, the platform or Node's binary interface changed since the last install. */
export async function ensureModules() {
  refuseOtherNode();
  const mark = wantedMark();
  if (existsSync(markFile) && readFileSync(markFile, 'utf8') === mark) return;
  if (!(alreadyInstalled() && (await nativeModulesWork()))) {
    console.log('Installing packages from the lock file. The first time takes two to four minutes.');
    let result = await npmCi();
    if (result.code !== 0 && canInstall()) {
      console.log('Installing a compiler for the database driver, then trying again.');
      if (await installPackages(['python3', 'make', 'g++'])) result = await npmCi();
    }
    if (result.code !== 0) {
      throw new Stop(
        'Packages could not be installed: npm said why above. If it is the database driver (better-sqlite3), ' +
          'install python3, make and a C++ compiler, then try again.',
      );
    }
    if (!(await nativeModulesWork()))
      throw new Stop('better-sqlite3 is installed but does not load on this machine.');
  }
  writeFileSync(markFile, mark);
}
