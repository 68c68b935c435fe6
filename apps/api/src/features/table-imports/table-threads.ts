import { workerEntry, WorkerPool } from '../../tables/worker-pool.ts';
import type { OpenedFile } from './open-table.ts';
import type {
  CharacteristicsTask,
  OpenTask,
  ReadCharacteristicsAnswer,
  ReadingsTask,
  ReadReadingsAnswer,
  WorkbookTask,
} from './table-imports.worker.ts';

let pool: WorkerPool | undefined;

function run(task: OpenTask | CharacteristicsTask | ReadingsTask | WorkbookTask): Promise<unknown> {
  pool ??= new WorkerPool(workerEntry(import.meta.url, 'table-imports.worker'));
  return pool.run(task);
}

/** The border to the threads: each answer has the type that its task has inside. */
export const inThread = {
  open: (task: Omit<OpenTask, 'kind'>) => run({ kind: 'open', ...task }) as Promise<OpenedFile>,
  characteristics: (task: Omit<CharacteristicsTask, 'kind'>) =>
    run({ kind: 'characteristics', ...task }) as Promise<ReadCharacteristicsAnswer>,
  readings: (task: Omit<ReadingsTask, 'kind'>) =>
    run({ kind: 'readings', ...task }) as Promise<ReadReadingsAnswer>,
  workbook: (task: Omit<WorkbookTask, 'kind'>) => run({ kind: 'workbook', ...task }) as Promise<Uint8Array>,
};
