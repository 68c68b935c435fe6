// npm test: every check there is. The last line says how many passed and how many failed.
import { mkdirSync, readFileSync, readdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { build } from './build.mjs';
import { ensureChromium } from './chromium.mjs';
import { countTests } from './counts.mjs';
import { ensureModules } from './modules.mjs';
import { runNode, Stop, top } from './processes.mjs';
import { checkStart } from './start-check.mjs';

const limitMs = 30 * 60_000;
const reports = join(top, 'reports');
const total = { passed: 0, failed: 0, skipped: 0 };

/** @param {string} name @param {{ ok: boolean, seconds: number, output?: string, detail?: string }} result */
function tell(name, { ok, seconds, output = '', detail = '' }) {
  console.log(`${ok ? 'passed' : 'FAILED'}  ${name} (${seconds.toFixed(0)} s)${detail && `: ${detail}`}`);
  if (!ok) console.log(`${output.trimEnd()}\n`);
  total[ok ? 'passed' : 'failed'] += 1;
}

/** A step that is one check by itself. @param {string} name @param {() => Promise<unknown>} work */
async function step(name, work) {
  const started = performance.now();
  const seconds = () => (performance.now() - started) / 1000;
  try {
    await work();
    tell(name, { ok: true, seconds: seconds() });
    return true;
  } catch (error) {
    const output =
      error instanceof Stop ? error.message : error instanceof Error ? (error.stack ?? '') : String(error);
    tell(name, { ok: false, seconds: seconds(), output });
    return false;
  }
}

/** @param {string[]} args */
const command = (args) => async () => {
  const { code, output } = await runNode(args, { quiet: true, limitMs });
  if (code !== 0) throw new Stop(output);
};

/** @param {string} name @param {string[]} projects @param {NodeJS.ProcessEnv} [env] */
async function tests(name, projects, env = process.env) {
  const file = join(reports, `${name}.json`);
  const args = ['run', ...projects.flatMap((project) => ['--project', project])];
  const { code, output, seconds } = await runNode(
    [
      'node_modules/vitest/vitest.mjs',
      ...args,
      '--reporter=default',
      '--reporter=json',
      `--outputFile=${file}`,
    ],
    { quiet: true, limitMs, env: { ...env, FORCE_COLOR: '0', NO_COLOR: '1' } },
  );
  const { passed, failed, skipped } = countTests(readReport(file), code);
  total.passed += passed;
  total.failed += failed;
  total.skipped += skipped;
  const detail = `${passed} passed, ${failed} failed${skipped ? `, ${skipped} skipped` : ''}`;
  console.log(`${failed ? 'FAILED' : 'passed'}  ${name} (${seconds.toFixed(0)} s): ${detail}`);
  if (failed) console.log(`${output.trimEnd()}\n`);
}

/** @param {string} file */
function readReport(file) {
  try {
    return readFileSync(file, 'utf8');
  } catch {
    return '';
  }
}

function hasStories() {
  try {
    return readdirSync(join(top, 'apps/portal/e2e/specs')).some((file) => file.endsWith('.spec.ts'));
  } catch {
    return false;
  }
}

async function browserTests(built) {
  if (!hasStories())
    return console.log('skipped browser tests: there is no story in apps/portal/e2e/specs yet');
  let browser = '';
  const ready = await step('browser', async () => {
    if (!built) throw new Stop('Not run: there is no build to drive.');
    browser = await ensureChromium();
  });
  if (ready) await tests('e2e', ['e2e'], { ...process.env, CHROMIUM_PATH: browser });
}

async function everything() {
  rmSync(reports, { recursive: true, force: true });
  mkdirSync(reports, { recursive: true });
  // Two cores: the checks of the text on one, the tests that run it on the other.
  const checks = async () => {
    await step('types', command(['node_modules/typescript/bin/tsc', '--noEmit']));
    await step('lint', command(['node_modules/eslint/bin/eslint.js', '.', '--max-warnings=0']));
    await step('format', command(['node_modules/prettier/bin/prettier.cjs', '--check', '.']));
    return step('build', build);
  };
  const [built] = await Promise.all([
    checks(),
    tests('unit', ['metrology', 'shared', 'house', 'portal', 'api']),
  ]);
  if (built) await step('start', checkStart);
  await browserTests(built);
}

try {
  if (await step('install', ensureModules)) await everything();
} catch (error) {
  tell('test run', { ok: false, seconds: 0, output: error instanceof Error ? error.stack : String(error) });
}
if (total.skipped) console.log(`${total.skipped} skipped`);
console.log(`${total.passed} passed, ${total.failed} failed`);
process.exitCode = total.failed ? 1 : 0;
