import { vi } from 'vitest';
import type { ProblemName } from '../lib/api-problem.ts';
import { problemBase } from '../lib/api-problem.ts';

export interface FakeCall {
  method: string;
  path: string;
  query: URLSearchParams;
  params: Record<string, string>;
  body: unknown;
  headers: Headers;
}

/** Answers with a value as JSON, nothing (204), a `Response`, or throws to break the connection. */
export type FakeHandler = (call: FakeCall) => unknown;

const statuses: Partial<Record<ProblemName, number>> = {
  malformed: 400,
  unauthenticated: 401,
  forbidden: 403,
  'not-found': 404,
  conflict: 409,
  'stale-version': 412,
  invalid: 422,
  'version-required': 428,
  'too-many-requests': 429,
  internal: 500,
  unavailable: 503,
};

/** A refusal as the server writes it. */
export function problem(name: ProblemName, detail: string, extra: Record<string, unknown> = {}): Response {
  const status = statuses[name] ?? 400;
  const body = { type: problemBase + name, title: name, status, detail, instance: '/api', ...extra };
  return new Response(JSON.stringify(body), {
    status,
    headers: { 'Content-Type': 'application/problem+json' },
  });
}

/** Puts the handlers in the place of the network, keyed `GET /api/people/:id`; answers with the list of calls made. */
export function fakeApi(handlers: Record<string, FakeHandler>): FakeCall[] {
  const calls: FakeCall[] = [];
  const routes = Object.entries(handlers).map(([key, handler]) => {
    const [method = '', pattern = ''] = key.split(' ');
    const names = [...pattern.matchAll(/:(\w+)/g)].map((match) => match[1] ?? '');
    return { method, names, pattern: new RegExp(`^${pattern.replace(/:\w+/g, '([^/]+)')}$`), handler };
  });
  vi.stubGlobal('fetch', async (input: string, init: RequestInit = {}) => {
    const url = new URL(input, 'https://portal.invalid');
    const method = init.method ?? 'GET';
    for (const route of routes) {
      const match = route.method === method ? route.pattern.exec(url.pathname) : null;
      if (match === null) continue;
      const call: FakeCall = {
        method,
        path: url.pathname,
        query: url.searchParams,
        params: Object.fromEntries(route.names.map((name, index) => [name, match[index + 1] ?? ''])),
        body: typeof init.body === 'string' ? JSON.parse(init.body) : init.body,
        headers: new Headers(init.headers),
      };
      calls.push(call);
      const answer: unknown = await route.handler(call);
      if (answer instanceof Response) return answer;
      if (answer === undefined) return new Response(null, { status: 204 });
      return new Response(JSON.stringify(answer), {
        status: 200,
        headers: { 'Content-Type': 'application/json' },
      });
    }
    return problem('not-found', `The fake API has no ${method} ${url.pathname}.`);
  });
  return calls;
}
