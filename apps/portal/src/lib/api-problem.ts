import type { Problem } from '@trammel/shared/problem';

/** The names of `problemTypes` in the contract; spelled here so that the first load does without the schema library. */
export type ProblemName =
  | 'malformed'
  | 'unauthenticated'
  | 'forbidden'
  | 'not-found'
  | 'method-not-allowed'
  | 'conflict'
  | 'stale-version'
  | 'version-required'
  | 'idempotency-key-required'
  | 'in-progress'
  | 'too-large'
  | 'unsupported-media-type'
  | 'invalid'
  | 'too-many-requests'
  | 'unavailable'
  | 'internal';

export const problemBase = 'https://trammel.invalid/problems/';

/** An answer of the server that says no, with its reason in words. */
export class ApiProblem extends Error {
  constructor(
    readonly problem: Problem,
    readonly etag: string | null = null,
  ) {
    super(problem.detail || problem.title);
    this.name = 'ApiProblem';
  }

  get status(): number {
    return this.problem.status;
  }

  is(...names: ProblemName[]): boolean {
    return names.some((name) => this.problem.type === problemBase + name);
  }
}

/** The server was not reached, or the connection broke before its answer was read. */
export class NetworkFailure extends Error {
  constructor(readonly reason: unknown) {
    super('The server was not reached. Check the connection; what was typed is kept here.');
    this.name = 'NetworkFailure';
  }
}

/** The answer does not have the form the contract promises: portal and server are of different versions. */
export class ContractBreach extends Error {
  constructor(
    readonly where: string,
    readonly reason: unknown,
  ) {
    super(`The answer of ${where} was not understood. Load the page again to get the current version.`);
    this.name = 'ContractBreach';
  }
}

/** One sentence for a person, whatever was thrown. */
export function reasonOf(error: unknown): string {
  if (error instanceof ApiProblem) {
    if (error.is('too-many-requests') && error.problem.retryAfter !== undefined) {
      return `${error.message} Try again in ${error.problem.retryAfter} s.`;
    }
    return error.message;
  }
  if (error instanceof Error && error.message !== '') return error.message;
  return 'The reason is not known.';
}
