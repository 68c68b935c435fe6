import type { Server } from 'node:http';
import type { Logger } from 'pino';

interface Parts {
  readonly server: Server;
  readonly log: Logger;
  /** From here on readiness is red, so that no new work is sent. */
  readonly beforeClosing: () => void;
  readonly close: () => Promise<void>;
}

const longestWaitMs = 10_000;

/** On SIGTERM or SIGINT: take nothing new, let running requests finish, then background work, database and lock. */
export function gracefulStop({ server, log, beforeClosing, close }: Parts): void {
  let stopping = false;
  const stop = (code: number) => {
    if (stopping) return;
    stopping = true;
    beforeClosing();
    const impatience = setTimeout(() => server.closeAllConnections(), longestWaitMs);
    server.close(() => {
      clearTimeout(impatience);
      close().then(
        () => process.exit(code),
        (error: unknown) => {
          log.fatal({ err: error }, 'stopping failed');
          process.exit(1);
        },
      );
    });
    server.closeIdleConnections();
  };
  process.on('SIGTERM', () => stop(0));
  process.on('SIGINT', () => stop(0));
  // The state of a process after such an error is unknown: it ends in order and is started anew.
  process.on('uncaughtException', (error) => {
    log.fatal({ err: error }, 'uncaught error');
    stop(1);
  });
  process.on('unhandledRejection', (error) => {
    log.fatal({ err: error }, 'unhandled rejection');
    stop(1);
  });
}
