export * from './decimal.ts';
export * from './parse-decimal.ts';
export * from './round-decimal.ts';
export * from './ratio.ts';
