export { median, quantile } from './quantile.ts';
export type { QuantileDefinition, SampleQuantile } from './quantile.ts';
export type { Reading } from './readings.ts';
export { summarize } from './summarize.ts';
export type { Summary } from './summarize.ts';
