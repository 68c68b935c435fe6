import { problemTypes, type ProblemType } from '@trammel/shared/problem';

export interface FieldError {
  readonly detail: string;
  /** JSON pointer into the body, or `?name` in the query, or a place in a file. */
  readonly pointer: string;
}

/** What domain code throws when a person must be told; answered by the error handler alone. */
export abstract class ProblemError extends Error {
  abstract readonly status: number;
  abstract readonly title: string;
  abstract readonly type: ProblemType;
  readonly errors?: readonly FieldError[];
  readonly current?: unknown;
  readonly retryAfter?: number;
  readonly headers?: Readonly<Record<string, string>>;
}

/** The request cannot be read at all: bad JSON, a missing header. */
export class Malformed extends ProblemError {
  readonly status = 400;
  readonly title = 'The request cannot be read';
  constructor(
    detail: string,
    override readonly type: ProblemType = problemTypes.malformed,
  ) {
    super(detail);
  }
}

export class Unauthenticated extends ProblemError {
  readonly status = 401;
  readonly title = 'Not signed in';
  readonly type = problemTypes.unauthenticated;
  constructor(detail = 'Sign in to go on.') {
    super(detail);
  }
}

export class Forbidden extends ProblemError {
  readonly status = 403;
  readonly title = 'Not allowed';
  readonly type = problemTypes.forbidden;
  constructor(detail = 'Your role does not include this.') {
    super(detail);
  }
}

/** Also the answer for another organisation's object: it must not differ from the answer for an id that never was. */
export class NotFound extends ProblemError {
  readonly status = 404;
  readonly title = 'Not found';
  readonly type = problemTypes.notFound;
  constructor(detail = 'There is nothing here that you can see.') {
    super(detail);
  }
}

/** The object is in a state in which this cannot be done; the detail says which. */
export class Conflict extends ProblemError {
  readonly status: number = 409;
  readonly title: string = 'Not possible in this state';
  constructor(
    detail: string,
    override readonly type: ProblemType = problemTypes.conflict,
  ) {
    super(detail);
  }
}

/** Someone changed the object since it was read. `current` is the object as it stands, in the form of its GET. */
export class Stale extends Conflict {
  override readonly status = 412;
  override readonly title = 'Changed by someone else';
  constructor(
    override readonly current: unknown,
    detail = 'This was changed since you opened it. Compare and decide again.',
  ) {
    super(detail, problemTypes.stale);
  }
}

export class VersionRequired extends Conflict {
  override readonly status = 428;
  override readonly title = 'Version required';
  constructor() {
    super('Send the version you read in If-Match, such as If-Match: "3".', problemTypes.versionRequired);
  }
}

export class TooLarge extends ProblemError {
  readonly status = 413;
  readonly title = 'Too large';
  readonly type = problemTypes.tooLarge;
}

/** Understood but wrong: carries every refused place, not only the first. */
export class Invalid extends ProblemError {
  readonly status = 422;
  readonly title = 'Some entries need to be changed';
  readonly type = problemTypes.invalid;
  constructor(
    override readonly errors: readonly FieldError[],
    detail = errors.length === 1
      ? 'One entry needs to be changed.'
      : `${errors.length} entries need to be changed.`,
  ) {
    super(detail);
  }
}

export class TooMany extends ProblemError {
  readonly status = 429;
  readonly title = 'Too many attempts';
  readonly type = problemTypes.tooMany;
  constructor(
    override readonly retryAfter: number,
    detail = `Try again in ${retryAfter} seconds.`,
  ) {
    super(detail);
  }
}

/** Answers of the border itself: no route, no such method, no such media type, store or disk out of reach. */
export class BorderProblem extends ProblemError {
  constructor(
    readonly status: number,
    readonly title: string,
    readonly type: ProblemType,
    detail: string,
    override readonly headers?: Readonly<Record<string, string>>,
  ) {
    super(detail);
  }
}

export function unsupportedMedia(expected: string): BorderProblem {
  return new BorderProblem(
    415,
    'Media type not supported',
    problemTypes.unsupportedMedia,
    `Send this as ${expected}.`,
    { Accept: expected },
  );
}

export function unavailable(detail: string): BorderProblem {
  return new BorderProblem(503, 'Out of reach for now', problemTypes.unavailable, detail, {
    'Retry-After': '30',
  });
}

/** One refused field, for rules that find a single fault. */
export function invalidField(pointer: string, detail: string): Invalid {
  return new Invalid([{ pointer, detail }]);
}
