import type { Logger } from 'pino';

/** Work of the server itself, done again and again while it runs. */
export interface Job {
  readonly name: string;
  readonly everySeconds: number;
  readonly work: () => Promise<void>;
}

/** Runs each job at its pace, never two rounds of the same job at once. Stopping waits for rounds under way. */
export function startJobs(jobs: readonly Job[], log: Logger): { stop: () => Promise<void> } {
  let stopped = false;
  const running = new Set<Promise<void>>();
  const timers = new Set<NodeJS.Timeout>();

  const round = (job: Job) => {
    const done = job
      .work()
      .catch((error: unknown) => log.error({ err: error, job: job.name }, 'background work failed'))
      .finally(() => {
        running.delete(done);
        if (!stopped) wait(job);
      });
    running.add(done);
  };
  const wait = (job: Job) => {
    const timer = setTimeout(() => {
      timers.delete(timer);
      round(job);
    }, job.everySeconds * 1000);
    timers.add(timer);
  };
  for (const job of jobs) round(job);

  return {
    stop: async () => {
      stopped = true;
      for (const timer of timers) clearTimeout(timer);
      await Promise.all(running);
    },
  };
}
