// npm run bench -w packages/metrology: every bench file in a process of its own, ratios measured in one run.
import { spawnSync } from 'node:child_process';
import { readdirSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

const folder = dirname(fileURLToPath(import.meta.url));
const words = process.argv.slice(2);
const files = readdirSync(folder)
  .filter((file) => file.endsWith('.bench.ts'))
  .filter((file) => words.length === 0 || words.some((word) => file.includes(word)))
  .sort();

for (const file of files) {
  const { status } = spawnSync(process.execPath, ['--expose-gc', '--import', 'tsx', join(folder, file)], {
    stdio: 'inherit',
  });
  if (status !== 0) process.exitCode = 1;
}
