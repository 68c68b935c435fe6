export { UNITS } from './unit-table.ts';
export type { Dimension, Unit } from './unit-table.ts';
export { convertDecimal, findUnit } from './convert.ts';
export type { Conversion } from './convert.ts';
