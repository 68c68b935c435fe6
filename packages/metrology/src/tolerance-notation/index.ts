export { readTolerance } from './read-tolerance.ts';
export type { ReadTolerance, ToleranceText } from './read-tolerance.ts';
export { writeTolerance } from './write-tolerance.ts';
export type { StatedTolerance } from './stated-tolerance.ts';
export { statedLimits } from './stated-limits.ts';
