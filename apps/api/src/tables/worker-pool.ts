import { existsSync } from 'node:fs';
import { createRequire } from 'node:module';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { Worker } from 'node:worker_threads';
import { tableBudget } from './budget.ts';
import { TableRefused } from './table.ts';

export interface WorkerAnswer {
  readonly id: number;
  readonly value?: unknown;
  readonly refused?: { readonly detail: string; readonly remedy: string };
  readonly failed?: string;
}

interface Job {
  readonly task: unknown;
  readonly transfer: readonly ArrayBuffer[];
  readonly resolve: (value: unknown) => void;
  readonly reject: (error: Error) => void;
}

const idleMilliseconds = 30_000;

/**
 * A few threads that read other people's files: bounded in memory and time, so that no file can stall or bring down
 * the process that serves everyone. A thread that overruns is ended and replaced.
 */
export class WorkerPool {
  private readonly queue: Job[] = [];
  private readonly idle: { worker: Worker; timer: NodeJS.Timeout }[] = [];
  private running = 0;
  private lastId = 0;

  constructor(
    private readonly entry: URL,
    private readonly size = 2,
    private readonly seconds: number = tableBudget.seconds,
  ) {}

  run(task: unknown, transfer: readonly ArrayBuffer[] = []): Promise<unknown> {
    return new Promise((resolve, reject) => {
      this.queue.push({ task, transfer, resolve, reject });
      this.next();
    });
  }

  private next(): void {
    if (this.running >= this.size) return;
    const job = this.queue.shift();
    if (!job) return;
    this.running += 1;
    const waiting = this.idle.pop();
    if (waiting) clearTimeout(waiting.timer);
    const worker = waiting?.worker ?? this.start();
    this.serve(worker, job);
  }

  private serve(worker: Worker, job: Job): void {
    const id = (this.lastId += 1);
    let deadline: NodeJS.Timeout | undefined;
    const finish = (keep: boolean, settle: () => void) => {
      clearTimeout(deadline);
      worker.removeAllListeners();
      worker.unref();
      if (keep) this.rest(worker);
      else void worker.terminate();
      this.running -= 1;
      settle();
      this.next();
    };
    const overrun = () =>
      finish(false, () =>
        job.reject(
          new TableRefused(
            `Reading the file took longer than ${this.seconds} seconds.`,
            'Send a smaller table.',
          ),
        ),
      );
    const begin = () => {
      deadline = setTimeout(overrun, this.seconds * 1000);
      worker.postMessage({ id, task: job.task }, [...job.transfer]);
    };
    worker.ref();
    worker.on('message', (answer: WorkerAnswer | 'ready') => {
      if (answer === 'ready') return begin();
      if (answer.id !== id) return;
      finish(answer.failed === undefined, () => {
        if (answer.refused) job.reject(new TableRefused(answer.refused.detail, answer.refused.remedy));
        else if (answer.failed !== undefined) job.reject(new Error(answer.failed));
        else job.resolve(answer.value);
      });
    });
    worker.on('error', (error: Error & { code?: string }) => {
      const tooBig = error.code === 'ERR_WORKER_OUT_OF_MEMORY';
      finish(false, () =>
        job.reject(
          tooBig
            ? new TableRefused(
                'The table needs more memory than is given to one file.',
                'Send a smaller table.',
              )
            : error,
        ),
      );
    });
    if (this.warm.has(worker)) begin();
    this.warm.add(worker);
  }

  private readonly warm = new WeakSet<Worker>();

  private rest(worker: Worker): void {
    const timer = setTimeout(() => {
      const index = this.idle.findIndex((entry) => entry.worker === worker);
      if (index >= 0) this.idle.splice(index, 1);
      void worker.terminate();
    }, idleMilliseconds);
    timer.unref();
    this.idle.push({ worker, timer });
  }

  private start(): Worker {
    return new Worker(this.entry, {
      resourceLimits: {
        maxOldGenerationSizeMb: tableBudget.heapMegabytes,
        maxYoungGenerationSizeMb: 64,
        stackSizeMb: 4,
      },
      // Sources run through the loader of development; the built product has plain JavaScript.
      ...(this.entry.pathname.endsWith('.ts') ? { execArgv: ['--import', loaderOfDevelopment()] } : {}),
    });
  }
}

function loaderOfDevelopment(): string {
  return pathToFileURL(createRequire(import.meta.url).resolve('tsx')).href;
}

/** The worker's file: beside its caller as source, at the top of the build as JavaScript. */
export function workerEntry(callerUrl: string, name: string): URL {
  for (const candidate of [`./${name}.ts`, `./${name}.js`, `../${name}.js`]) {
    const url = new URL(candidate, callerUrl);
    if (existsSync(fileURLToPath(url))) return url;
  }
  throw new Error(`The worker ${name} is missing from the build.`);
}
