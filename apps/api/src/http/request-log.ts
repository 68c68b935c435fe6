import { randomUUID } from 'node:crypto';
import type { IncomingMessage, ServerResponse } from 'node:http';
import type { RequestHandler } from 'express';
import { pino, type DestinationStream, type Logger } from 'pino';
import { pinoHttp } from 'pino-http';

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

/** One line a request: number, route as declared, actor, outcome. No header, no address with a token in it, no body. */
export function requestLog(log: Logger): RequestHandler {
  return pinoHttp({
    logger: log,
    quietReqLogger: true,
    genReqId: (_req, res) => {
      const id = randomUUID();
      res.setHeader('X-Request-Id', id);
      return id;
    },
    autoLogging: { ignore: (req) => req.url === '/health/live' || (req.url ?? '').startsWith('/assets/') },
    serializers: { req: () => undefined, res: () => undefined, err: () => undefined },
    customLogLevel: (_req, res) => (res.statusCode >= 500 ? 'error' : 'info'),
    customSuccessMessage: () => 'request',
    customErrorMessage: () => 'request',
    customAttributeKeys: { reqId: 'requestId' },
    customSuccessObject: (req, res, given: object) => ({ ...given, ...outcome(req, res) }),
    customErrorObject: (req, res, _error, given: object) => ({ ...given, ...outcome(req, res) }),
  }) as RequestHandler;
}

/** Written when the answer is complete, so that route and actor are known. */
function outcome(req: IncomingMessage, res: ServerResponse) {
  const locals = (res as { locals?: { route?: string; actor?: Caller } }).locals;
  return {
    method: req.method,
    route: locals?.route,
    status: res.statusCode,
    actor: locals?.actor?.userId,
    organisation: locals?.actor?.organisationId,
  };
}

interface Caller {
  readonly userId: string;
  readonly organisationId: string;
}
