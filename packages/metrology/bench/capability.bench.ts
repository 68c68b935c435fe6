import { atMost, median } from '../../../.ci/bench-harness.mjs';
import { capabilityStudy } from '../src/capability/index.ts';

/** Flatness-like readings: skewed, bounded by 0, four decimals. */
const values = Array.from({ length: 300 }, (_, index) => {
  const share = ((index * 137) % 300) + 0.5;
  return Math.round((0.012 * Math.sqrt(-2 * Math.log(1 - share / 300)) + 0.004) * 1e4) / 1e4;
});

const study = () =>
  capabilityStudy({ values, limits: { upper: 0.06, naturalLower: 0 }, distribution: 'fitted' });
const found = study();
if ('undetermined' in found) throw new Error(found.reason);
const once = () => {
  const started = performance.now();
  study();
  return performance.now() - started;
};
for (let round = 0; round < 10; round += 1) once();
atMost(
  'capability with fitted distributions, 300 readings',
  median(Array.from({ length: 31 }, once)),
  'ms',
  5,
);
