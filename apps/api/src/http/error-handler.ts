import { problemTypes, type Problem } from '@trammel/shared/problem';
import type { ErrorRequestHandler, Response } from 'express';
import type { Logger } from 'pino';
import {
  BorderProblem,
  Invalid,
  Malformed,
  ProblemError,
  TooLarge,
  unavailable,
  unsupportedMedia,
} from './problems.ts';

/** The only place that writes an error answer. */
export function createErrorHandler(log: Logger): ErrorRequestHandler {
  return (error: unknown, req, res, next) => {
    const problem = asProblem(error);
    const facts = {
      requestId: req.id,
      route: res.locals.route as string | undefined,
      actor: (res.locals.actor as { userId: string } | undefined)?.userId,
      status: problem.status,
    };
    if (problem.status >= 500) log.error({ ...facts, err: error }, 'request failed');
    else if (problem.status === 401 || problem.status === 403 || problem.status === 404)
      log.warn(facts, 'refused');
    if (res.headersSent) {
      // Part of the answer has left: the only honest end is a broken connection.
      next(error);
      return;
    }
    writeProblem(res, problem, req.id);
  };
}

function writeProblem(res: Response, problem: ProblemError, requestId: string): void {
  const body: Problem = {
    type: problem.type,
    title: problem.title,
    status: problem.status,
    detail: problem.message,
    instance: `urn:uuid:${requestId}`,
    ...(problem.errors && { errors: [...problem.errors] }),
    ...(problem.current !== undefined && { current: problem.current }),
    ...(problem.retryAfter !== undefined && { retryAfter: problem.retryAfter }),
  };
  for (const [name, value] of Object.entries(problem.headers ?? {})) res.setHeader(name, value);
  if (problem.retryAfter !== undefined) res.setHeader('Retry-After', String(problem.retryAfter));
  // The rest of a body that is too large is not waited for.
  if (problem.status === 413) res.setHeader('Connection', 'close');
  res.removeHeader('ETag');
  res.removeHeader('Content-Disposition');
  res.status(problem.status);
  res.setHeader('Content-Type', 'application/problem+json');
  res.setHeader('Cache-Control', 'no-store');
  res.end(JSON.stringify(body));
}

interface Coded {
  readonly code?: unknown;
  readonly type?: unknown;
  readonly status?: unknown;
  readonly driverError?: { readonly code?: unknown };
}

function asProblem(error: unknown): ProblemError {
  if (error instanceof ProblemError) return error;
  const coded: Coded = typeof error === 'object' && error !== null ? error : {};
  return fromBodyParser(coded) ?? fromMultipart(coded) ?? fromDatabase(coded) ?? internal();
}

function internal(): ProblemError {
  return new BorderProblem(
    500,
    'Something failed here',
    problemTypes.internal,
    'Nothing was changed. The fault is recorded under the number of this request.',
  );
}

function fromBodyParser(error: Coded): ProblemError | undefined {
  switch (error.type) {
    case 'entity.too.large':
      return new TooLarge('The request is larger than this takes.');
    case 'entity.parse.failed':
      return new Malformed('The body is not valid JSON.');
    case 'encoding.unsupported':
    case 'charset.unsupported':
      return unsupportedMedia('application/json');
    case 'request.size.invalid':
    case 'request.aborted':
      return new Malformed('The request ended early.');
    default:
      // Express throws this for a path such as /%zz.
      return error instanceof URIError || error.status === 400
        ? new Malformed('The address cannot be read.')
        : undefined;
  }
}

function fromMultipart(error: Coded): ProblemError | undefined {
  if (typeof error.code !== 'string' || !error.code.startsWith('LIMIT_')) return undefined;
  if (error.code === 'LIMIT_FILE_SIZE') return new TooLarge('The file is larger than this takes.');
  return new Invalid([
    { pointer: '/file', detail: 'Send one file in the field named file, and nothing else.' },
  ]);
}

function fromDatabase(error: Coded): ProblemError | undefined {
  const code = error.driverError?.code ?? error.code;
  if (typeof code !== 'string' || !code.startsWith('SQLITE_')) return undefined;
  if (code === 'SQLITE_FULL') {
    return new BorderProblem(
      507,
      'Storage is full',
      problemTypes.unavailable,
      'Nothing was changed. The disk of this installation is full; ask whoever runs it to make room.',
    );
  }
  if (/^SQLITE_(IOERR|READONLY|BUSY|CANTOPEN|CORRUPT)/.test(code)) {
    return unavailable('Nothing was changed. The database cannot be written just now.');
  }
  return undefined;
}
