export { signalBytes } from './run-registers.ts';
export { FEWEST_FOR_CONTROL, scanProcess } from './scan-process.ts';
export type { ProcessScan, ScanIndices } from './scan-process.ts';
