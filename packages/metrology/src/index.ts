export { isUndetermined, undetermined } from './result.ts';
export type { Undetermined } from './result.ts';
export * from './decimal/index.ts';
export * from './units/index.ts';
export * from './conformance/index.ts';
export * from './process-scan/index.ts';
export * from './sampling/index.ts';
export * from './distributions/index.ts';
export * from './statistics/index.ts';
