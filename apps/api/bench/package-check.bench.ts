import { compare, memoryAtMost } from '../../../.ci/bench-harness.mjs';
import { runCheck } from '../src/evidence/run-check.ts';
import { packageInputs } from './package-scene.ts';

const inputs = packageInputs(2000, 300);

/** The leanest code that reads the same texts and knows least, most and mean of every row. */
function barePass(): number {
  let sum = 0;
  for (const row of inputs.rows) {
    let [low, high, total] = [Infinity, -Infinity, 0];
    const texts = row.readings.split('\n');
    for (const text of texts) {
      const value = Number(text);
      if (value < low) low = value;
      if (value > high) high = value;
      total += value;
    }
    sum += low + high + total / texts.length;
  }
  return sum;
}

await compare('check of 2,000 x 300 readings against a bare pass', {
  product: () => runCheck(inputs).counts.stops,
  limit: barePass,
  goal: 5,
  rounds: 9,
});
await memoryAtMost('memory of the check above idle', () => runCheck(inputs).counts.stops, 300);
