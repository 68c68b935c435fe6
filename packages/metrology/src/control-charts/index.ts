export { c4, chartConstants, d2, d3 } from './constants.ts';
export type { ChartConstants } from './constants.ts';
