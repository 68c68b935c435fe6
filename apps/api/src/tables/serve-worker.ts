import { parentPort } from 'node:worker_threads';
import { TableRefused } from './table.ts';
import type { WorkerAnswer } from './worker-pool.ts';

/** The inside of a thread of `WorkerPool`: one task after the other, refusals told apart from faults. */
export function serveWorker(perform: (task: never) => unknown): void {
  const port = parentPort;
  if (!port) throw new Error('This file runs as a worker only.');
  port.on('message', (task: unknown) => {
    void answerTo(perform, task).then((answer) => port.postMessage(answer));
  });
  port.postMessage('ready');
}

async function answerTo(perform: (task: never) => unknown, task: unknown): Promise<WorkerAnswer> {
  try {
    return { value: await perform(task as never) };
  } catch (error) {
    if (error instanceof TableRefused) return { refused: { detail: error.message, remedy: error.remedy } };
    return { failed: error instanceof Error ? (error.stack ?? error.message) : String(error) };
  }
}
