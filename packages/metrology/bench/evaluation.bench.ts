import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { atLeast, compare } from '../../../.ci/bench-harness.mjs';
import { NELSON_RULES } from '../src/control-charts/rules.ts';
import { scanProcess } from '../src/process-scan/index.ts';
import { leanestEvaluation } from './leanest-evaluation.ts';
import type { CheckSums } from './leanest-evaluation.ts';

const CHARACTERISTICS = 2000;
const READINGS = 300;
const [LOWER, UPPER] = [24.98, 25.02];

/** Numbers near 25 with four decimals, the same on every machine. */
function numbers(count: number): Float64Array {
  let state = 7;
  const next = () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
  return Float64Array.from({ length: count }, () => {
    let sum = 0;
    for (let term = 0; term < 12; term += 1) sum += next();
    return Math.round((25 + (sum - 6) * 0.006) * 1e4) / 1e4;
  });
}

const block = numbers(CHARACTERISTICS * READINGS);
const rows = Array.from({ length: CHARACTERISTICS }, (_, row) =>
  block.subarray(row * READINGS, (row + 1) * READINGS),
);
const limits = { lower: LOWER, upper: UPPER };

function product(): CheckSums {
  const sums: CheckSums = { rules: NELSON_RULES.map(() => 0), cpk: 0, ppk: 0, cp: 0, ends: 0, beyond: 0 };
  for (const row of rows) {
    const found = scanProcess(row, limits);
    if ('undetermined' in found) throw new Error(found.reason);
    NELSON_RULES.forEach(
      (rule, index) => (sums.rules[index] = (sums.rules[index] ?? 0) + found.signalCounts[rule]),
    );
    sums.cpk += found.indices.cpk;
    sums.ppk += found.indices.ppk;
    sums.cp += found.indices.cp ?? 0;
    sums.ends += found.maximum - found.minimum;
    sums.beyond += found.movingRangesBeyond;
  }
  return sums;
}

const limit = () => leanestEvaluation(block, CHARACTERISTICS, READINGS, LOWER, UPPER);

function mustAgree(name: string, a: CheckSums, b: CheckSums): void {
  const same = (x: number, y: number) => Math.abs(x / y - 1) < 1e-9;
  const alike = a.rules.every((count, rule) => count === b.rules[rule]) && a.beyond === b.beyond;
  if (!alike || !same(a.cpk, b.cpk) || !same(a.ppk, b.ppk) || !same(a.cp, b.cp) || !same(a.ends, b.ends))
    throw new Error(`${name} does not compute the same: ${JSON.stringify(a)} ${JSON.stringify(b)}`);
}

mustAgree('The leanest loop', product(), limit());
const { product: ours } = await compare(
  '2,000 characteristics × 300 readings: summary, ranges, limits, eight rules, indices',
  {
    product,
    limit,
    goal: 2,
  },
);

const folder = mkdtempSync(join(tmpdir(), 'trammel-bench-'));
try {
  const file = join(folder, 'readings.bin');
  writeFileSync(file, new Uint8Array(block.buffer));
  const script = join(dirname(fileURLToPath(import.meta.url)), 'full-evaluation.R');
  const run = spawnSync(
    'Rscript',
    ['--vanilla', script, file, String(CHARACTERISTICS), String(READINGS), '7'],
    {
      encoding: 'utf8',
    },
  );
  if (run.error || run.status !== 0)
    console.log('Base R is not installed here: the comparison with it is left out');
  else {
    const [time = '', counts = '', sums = ''] = run.stdout.trim().split('\n');
    const [cpk = NaN, ppk = NaN, cp = NaN, ends = NaN, beyond = NaN] = sums.trim().split(' ').map(Number);
    mustAgree('Base R', product(), {
      rules: counts.trim().split(' ').map(Number),
      cpk,
      ppk,
      cp,
      ends,
      beyond,
    });
    console.log(`base R, vectorised, the same work and the same counts: ${time} ms`);
    atLeast('faster than base R, vectorised', Number(time) / ours, 'times', 5);
  }
} finally {
  rmSync(folder, { recursive: true });
}
