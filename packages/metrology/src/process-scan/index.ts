export { signalBytes } from './run-registers.ts';
export { scanProcess } from './scan-process.ts';
export type { ProcessScan, ScanIndices } from './scan-process.ts';
