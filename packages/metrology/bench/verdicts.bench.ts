import { compare, atMost, median } from '../../../.ci/bench-harness.mjs';
import { evaluateReadings } from '../src/conformance/index.ts';

const CHARACTERISTICS = 2000;
const READINGS = 300;
const LIMITS = { lower: '25.000', upper: '25.021' };

/** Readings of a process with C = 1 about the middle of the band: a few of them out, as in real studies. */
function texts(count: number): string[] {
  let state = 42;
  const next = () => {
    state = (state * 1664525 + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
  return Array.from({ length: count }, () => {
    let sum = 0;
    for (let term = 0; term < 12; term += 1) sum += next();
    return (25.0105 + (sum - 6) * 0.0035).toFixed(4);
  });
}

const rows = Array.from({ length: CHARACTERISTICS }, () => texts(READINGS));

await compare('exact verdicts and summary of 600,000 decimal texts, against Number(text)', {
  product: () => {
    let out = 0;
    for (const row of rows) {
      const found = evaluateReadings(row, LIMITS);
      if ('outCount' in found) out += found.outCount;
    }
    return out;
  },
  limit: () => {
    let sum = 0;
    for (const row of rows) for (const text of row) sum += Number(text);
    return sum;
  },
  goal: 4,
});

const few = texts(50_000);
const many = Array.from({ length: 8 }, () => few).flat();
const timed = (list: readonly string[]) => {
  const started = performance.now();
  evaluateReadings(list, LIMITS);
  return performance.now() - started;
};
const ratios = Array.from({ length: 15 }, () => timed(many) / timed(few) / 8);
atMost('cost of a reading, 400,000 against 50,000 readings', median(ratios), 'times', 1.5);
