import { existsSync } from 'node:fs';
import { createRequire } from 'node:module';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { Worker } from 'node:worker_threads';
import { tableBudget } from './budget.ts';
import { TableRefused } from './table.ts';

export interface WorkerAnswer {
  readonly value?: unknown;
  readonly refused?: { readonly detail: string; readonly remedy: string };
  readonly failed?: string;
}

interface Job {
  readonly task: unknown;
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
  private readonly threads = new Set<Thread>();

  constructor(
    private readonly entry: URL,
    private readonly size = 2,
    private readonly seconds: number = tableBudget.seconds,
  ) {}

  run(task: unknown): Promise<unknown> {
    return new Promise((resolve, reject) => {
      this.queue.push({ task, resolve, reject });
      this.next();
    });
  }

  private next(): void {
    const job = this.queue[0];
    if (!job) return;
    let thread = [...this.threads].find((one) => one.isFree);
    if (!thread && this.threads.size < this.size) {
      thread = new Thread(this.entry, this.seconds, (ended) => {
        if (ended) this.threads.delete(ended);
        this.next();
      });
      this.threads.add(thread);
    }
    if (!thread) return;
    this.queue.shift();
    thread.take(job);
  }
}

class Thread {
  private readonly worker: Worker;
  private job: Job | null = null;
  private isReady = false;
  private deadline: NodeJS.Timeout | undefined;
  private rest: NodeJS.Timeout | undefined;
  private hasEnded = false;

  constructor(
    entry: URL,
    private readonly seconds: number,
    private readonly onFree: (ended: Thread | null) => void,
  ) {
    this.worker = startWorker(entry);
    this.worker.on('message', (message: WorkerAnswer | 'ready') => {
      if (message === 'ready') {
        this.isReady = true;
        this.begin();
      } else this.answered(message);
    });
    this.worker.on('error', (error: Error & { code?: string }) => {
      const refused = new TableRefused(
        'The table needs more memory than is given to one file.',
        'Send a smaller table.',
      );
      this.end(error.code === 'ERR_WORKER_OUT_OF_MEMORY' ? refused : error);
    });
    this.worker.on('exit', () => this.end(new Error('A thread that reads tables ended by itself.')));
  }

  get isFree(): boolean {
    return this.job === null && !this.hasEnded;
  }

  take(job: Job): void {
    clearTimeout(this.rest);
    this.job = job;
    this.worker.ref();
    if (this.isReady) this.begin();
  }

  /** The clock runs from here: how long a thread takes to start is not the file's fault. */
  private begin(): void {
    if (!this.job) return;
    this.worker.postMessage(this.job.task);
    this.deadline = setTimeout(() => {
      const detail = `Reading the file took longer than ${this.seconds} seconds.`;
      this.end(new TableRefused(detail, 'Send a smaller table.'));
    }, this.seconds * 1000);
  }

  private answered({ value, refused, failed }: WorkerAnswer): void {
    const job = this.settle();
    if (refused) job?.reject(new TableRefused(refused.detail, refused.remedy));
    else if (failed !== undefined) job?.reject(new Error(failed));
    else job?.resolve(value);
    this.worker.unref();
    this.rest = setTimeout(() => this.end(null), idleMilliseconds);
    this.rest.unref();
    this.onFree(null);
  }

  private settle(): Job | null {
    clearTimeout(this.deadline);
    const { job } = this;
    this.job = null;
    return job;
  }

  private end(reason: Error | null): void {
    if (this.hasEnded) return;
    this.hasEnded = true;
    clearTimeout(this.rest);
    const job = this.settle();
    void this.worker.terminate();
    if (reason) job?.reject(reason);
    this.onFree(this);
  }
}

function startWorker(entry: URL): Worker {
  const resourceLimits = {
    maxOldGenerationSizeMb: tableBudget.heapMegabytes,
    maxYoungGenerationSizeMb: 64,
    stackSizeMb: 4,
  };
  return entry.pathname.endsWith('.ts')
    ? new Worker(throughLoader(entry), { resourceLimits, eval: true })
    : new Worker(entry, { resourceLimits });
}

/** Sources run through the loader of development, which does not enter threads by itself; the build is plain JavaScript. */
function throughLoader(entry: URL): string {
  const loader = createRequire(import.meta.url)
    .resolve('tsx/esm/api')
    .replace(/\.cjs$/, '.mjs');
  const start = `import(${JSON.stringify(pathToFileURL(loader).href)}).then((tsx) => tsx.register())`;
  return `${start}.then(() => import(${JSON.stringify(entry.href)}));`;
}

/** The worker's file: beside its caller as source, beside the bundle as JavaScript. */
export function workerEntry(callerUrl: string, name: string): URL {
  for (const candidate of [`./${name}.ts`, `./${name}.js`, `../${name}.js`]) {
    const url = new URL(candidate, callerUrl);
    if (existsSync(fileURLToPath(url))) return url;
  }
  throw new Error(`The worker ${name} is missing from the build.`);
}
