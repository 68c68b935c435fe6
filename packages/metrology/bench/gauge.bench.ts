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
/** Processor time, so that what else the machine does is not counted. */
const once = () => {
  const before = process.cpuUsage();
  for (let call = 0; call < CALLS; call += 1) gaugeAnova(readings);
  const { user, system } = process.cpuUsage(before);
  return (user + system) / 1000 / CALLS;
};
for (let round = 0; round < 5; round += 1) once();
atMost(
  'gauge study by ANOVA, 10 parts × 3 people × 3 trials',
  median(Array.from({ length: 15 }, once)),
  'ms cpu',
  1,
);
