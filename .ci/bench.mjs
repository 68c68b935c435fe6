// npm run bench: every bench file in a process of its own, one after the other. `npm run bench -- WORD` picks some.
import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { ensureModules } from './modules.mjs';
import { runNode, Stop, top } from './processes.mjs';

const folders = ['packages/metrology/bench', 'apps/api/bench', 'apps/portal/bench'];

/** @param {string[]} words */
function benchFiles(words) {
  return folders
    .filter((folder) => existsSync(join(top, folder)))
    .flatMap((folder) => readdirSync(join(top, folder)).map((file) => `${folder}/${file}`))
    .filter((file) => /\.bench\.(ts|tsx|mjs)$/.test(file))
    .filter((file) => words.length === 0 || words.some((word) => file.includes(word)))
    .sort();
}

try {
  await ensureModules();
  const files = benchFiles(process.argv.slice(2));
  if (files.length === 0) throw new Stop('No bench file of that name.');
  let [within, over, broken] = [0, 0, 0];
  for (const file of files) {
    console.log(`\n${file}`);
    const args = ['--expose-gc', '--import', 'tsx', file];
    const { code, output } = await runNode(args, { quiet: true, limitMs: 20 * 60_000 });
    console.log(output.trimEnd());
    within += output.match(/ ok$/gm)?.length ?? 0;
    over += output.match(/ over$/gm)?.length ?? 0;
    if (code !== 0) broken += 1;
  }
  console.log(
    `\n${within} within their goal, ${over} over${broken ? `, ${broken} files failed to run` : ''}`,
  );
  process.exitCode = over || broken ? 1 : 0;
} catch (error) {
  if (!(error instanceof Stop)) throw error;
  console.error(error.message);
  process.exitCode = 1;
}
