import { randomUUID } from 'node:crypto';
import type { RequestHandler } from 'express';
import { pino, type DestinationStream, type Logger } from 'pino';

/** Names that never reach a log, wherever in a logged object they stand. */
const secrets = [
  'password',
  'currentPassword',
  'newPassword',
  'token',
  'csrfToken',
  'cookie',
  'authorization',
];

export function createLogger(level: string, destination?: DestinationStream): Logger {
  const options = {
    level,
    base: null,
    timestamp: () => `,"time":"${new Date().toISOString()}"`,
    redact: { paths: secrets.flatMap((name) => [name, `*.${name}`, `*.*.${name}`]), censor: '(withheld)' },
  };
  return destination ? pino(options, destination) : pino(options);
}

declare module 'express-serve-static-core' {
  interface Request {
    /** Number of the request, in every answer and every line of the log. */
    id: string;
  }
}

/** One line a request: number, route as declared, actor, outcome. No header, no address with a token in it, no body. */
export function requestLog(log: Logger): RequestHandler {
  // These lines hold our own fixed fields only: looking for secrets in each would cost more than writing it.
  const lines = log.child({}, { redact: [] });
  const wanted = log.isLevelEnabled('info');
  return (req, res, next) => {
    const id = randomUUID();
    req.id = id;
    res.setHeader('X-Request-Id', id);
    if (wanted && req.url !== '/health/live' && !req.url.startsWith('/assets/')) {
      const began = performance.now();
      res.on('close', () => {
        const actor = res.locals.actor as Caller | undefined;
        lines.info(
          {
            requestId: id,
            method: req.method,
            route: res.locals.route as string | undefined,
            status: res.statusCode,
            complete: res.writableFinished,
            milliseconds: Math.round(performance.now() - began),
            actor: actor?.userId,
            organisation: actor?.organisationId,
          },
          'request',
        );
      });
    }
    next();
  };
}

interface Caller {
  readonly userId: string;
  readonly organisationId: string;
}
