import { parentPort } from 'node:worker_threads';
import { TableRefused } from './table.ts';
import type { WorkerAnswer } from './worker-pool.ts';

/** The inside of a thread of `WorkerPool`: one task after the other, refusals told apart from faults. */
export function serveWorker(perform: (task: never) => unknown): void {
  const port = parentPort;
  if (!port) throw new Error('This file runs as a worker only.');
  port.on('message', ({ id, task }: { id: number; task: unknown }) => {
    void (async () => {
      let answer: WorkerAnswer;
      try {
        answer = { id, value: await perform(task as never) };
      } catch (error) {
        if (error instanceof TableRefused)
          answer = { id, refused: { detail: error.message, remedy: error.remedy } };
        else answer = { id, failed: error instanceof Error ? (error.stack ?? error.message) : String(error) };
      }
      port.postMessage(answer);
    })();
  });
  port.postMessage('ready');
}
