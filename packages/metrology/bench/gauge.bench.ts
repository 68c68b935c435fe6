import { atMost, median } from '../../../.ci/bench-harness.mjs';
import { gaugeAnova } from '../src/measurement-systems/index.ts';

const readings = Array.from({ length: 10 }, (_, part) =>
  Array.from({ length: 3 }, (_, appraiser) =>
    Array.from(
      { length: 3 },
      (_, trial) => 25 + 0.01 * part + 0.001 * appraiser + 0.0007 * ((part * 7 + trial * 3) % 5),
    ),
  ),
);

const CALLS = 200;
const once = () => {
  const started = performance.now();
  for (let call = 0; call < CALLS; call += 1) gaugeAnova(readings);
  return (performance.now() - started) / CALLS;
};
for (let round = 0; round < 5; round += 1) once();
atMost(
  'gauge study by ANOVA, 10 parts × 3 people × 3 trials',
  median(Array.from({ length: 15 }, once)),
  'ms',
  1,
);
