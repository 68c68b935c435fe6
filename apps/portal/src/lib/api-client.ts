import type { Problem } from '@trammel/shared/problem';
import { ApiProblem, ContractBreach, NetworkFailure, problemBase } from './api-problem.ts';

/** Anything that checks a value, such as a schema of the contract. */
export interface Parser<T> {
  parse(value: unknown): T;
}

export interface CallOptions {
  /** Sent as JSON. */
  body?: unknown;
  /** A file or form, sent as it is; the browser names its type. */
  form?: FormData;
  query?: Record<string, string | number | boolean | null | undefined>;
  /** Version the person saw: sent as `If-Match`. */
  version?: number;
  /** Makes a repeated act one act; take it from `newIdempotencyKey()` once for each intention. */
  idempotencyKey?: string;
  signal?: AbortSignal;
  /** Lets the request outlive the page, for the last draft of a tab that closes. */
  keepalive?: boolean;
}

let csrfToken: string | null = null;
const signedOutListeners = new Set<() => void>();

export function setCsrfToken(token: string | null): void {
  csrfToken = token;
}

/** Headers a request outside `call` must carry, such as an upload that reports progress. */
export function guardHeaders(): Record<string, string> {
  return csrfToken === null ? {} : { 'X-CSRF-Token': csrfToken };
}

/** Told when the server no longer knows the session. */
export function onSignedOut(listener: () => void): () => void {
  signedOutListeners.add(listener);
  return () => signedOutListeners.delete(listener);
}

export function newIdempotencyKey(): string {
  return crypto.randomUUID();
}

export function apiUrl(path: string, query: CallOptions['query'] = {}): string {
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(query)) {
    if (value !== null && value !== undefined && value !== '') search.set(name, String(value));
  }
  const text = search.toString();
  return text === '' ? path : `${path}?${text}`;
}

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/** Sends one request; answers with what the parser made of it, or throws `ApiProblem`, `NetworkFailure`, `ContractBreach`. */
export async function call<T>(
  method: Method,
  path: string,
  parser: Parser<T>,
  options: CallOptions = {},
): Promise<T> {
  const response = await send(method, path, options);
  const value: unknown = response.status === 204 ? undefined : await readJson(response, path);
  try {
    return parser.parse(value);
  } catch (reason) {
    throw new ContractBreach(path, reason);
  }
}

/** For acts that answer with nothing. */
export async function callForNothing(method: Method, path: string, options: CallOptions = {}): Promise<void> {
  await send(method, path, options);
}

async function send(method: Method, path: string, options: CallOptions): Promise<Response> {
  const headers: Record<string, string> = { Accept: 'application/json' };
  if (method !== 'GET') Object.assign(headers, guardHeaders());
  if (options.body !== undefined) headers['Content-Type'] = 'application/json';
  if (options.version !== undefined) headers['If-Match'] = `"${options.version}"`;
  if (options.idempotencyKey !== undefined) headers['Idempotency-Key'] = options.idempotencyKey;
  let response: Response;
  try {
    response = await fetch(apiUrl(path, options.query), {
      method,
      headers,
      body: options.form ?? (options.body === undefined ? null : JSON.stringify(options.body)),
      credentials: 'same-origin',
      signal: options.signal ?? null,
      keepalive: options.keepalive ?? false,
    });
  } catch (reason) {
    if (options.signal?.aborted) throw reason;
    throw new NetworkFailure(reason);
  }
  if (response.ok) return response;
  const problem = await readProblem(response, path);
  if (response.status === 401 && problem.is('unauthenticated'))
    for (const listener of signedOutListeners) listener();
  throw problem;
}

async function readJson(response: Response, path: string): Promise<unknown> {
  try {
    return await response.json();
  } catch (reason) {
    throw reason instanceof SyntaxError ? new ContractBreach(path, reason) : new NetworkFailure(reason);
  }
}

async function readProblem(response: Response, path: string): Promise<ApiProblem> {
  const text = await response.text().catch(() => '');
  return problemFromText(response.status, text, path, response.headers.get('ETag'));
}

/** A proxy between may answer in its own words: those become a problem of the same form. */
export function problemFromText(
  status: number,
  text: string,
  path: string,
  etag: string | null = null,
): ApiProblem {
  const fallback: Problem = {
    type: problemBase + (status === 401 ? 'unauthenticated' : status >= 500 ? 'unavailable' : 'malformed'),
    title: 'The request failed',
    status,
    detail: `The server answered with status ${status}.`,
    instance: path,
  };
  try {
    const value: unknown = JSON.parse(text);
    if (isProblem(value)) return new ApiProblem({ ...fallback, ...value, status }, etag);
  } catch {
    return new ApiProblem(fallback, etag);
  }
  return new ApiProblem(fallback, etag);
}

function isProblem(value: unknown): value is Partial<Problem> & { type: string } {
  return typeof value === 'object' && value !== null && 'type' in value && typeof value.type === 'string';
}
