import { describe, expect, it, vi } from 'vitest';
import { fakeApi, problem } from '../testing/fake-api.ts';
import { apiUrl, call, callForNothing, onSignedOut, setCsrfToken } from './api-client.ts';
import { ApiProblem, ContractBreach, NetworkFailure, reasonOf } from './api-problem.ts';

const anything = { parse: (value: unknown) => value };
const failureOf = (work: Promise<unknown>) =>
  work.then(
    () => null,
    (error: unknown) => error,
  );

describe('a call', () => {
  it('sends body, page token, version and idempotency key', async () => {
    setCsrfToken('page-token');
    const calls = fakeApi({ 'PUT /api/people/:id': () => ({ ok: true }) });
    const answer = await call('PUT', '/api/people/7', anything, {
      body: { name: 'A' },
      version: 3,
      idempotencyKey: 'k',
    });
    expect(answer).toEqual({ ok: true });
    expect(calls[0]?.body).toEqual({ name: 'A' });
    expect(calls[0]?.headers.get('If-Match')).toBe('"3"');
    expect(calls[0]?.headers.get('Idempotency-Key')).toBe('k');
    expect(calls[0]?.headers.get('X-CSRF-Token')).toBe('page-token');
  });

  it('does not send the page token with a read', async () => {
    setCsrfToken('page-token');
    const calls = fakeApi({ 'GET /api/people': () => [] });
    await call('GET', '/api/people', anything);
    expect(calls[0]?.headers.has('X-CSRF-Token')).toBe(false);
  });

  it('throws the problem of a refusal with its places', async () => {
    const errors = [{ pointer: '/name', detail: 'Fill this in.' }];
    fakeApi({ 'POST /api/people': () => problem('invalid', 'Two places were refused.', { errors }) });
    const error = await failureOf(call('POST', '/api/people', anything, { body: {} }));
    expect(error).toBeInstanceOf(ApiProblem);
    expect(error instanceof ApiProblem && error.is('invalid')).toBe(true);
    expect(error instanceof ApiProblem && error.problem.errors).toEqual(errors);
  });

  it('makes a problem of an answer that is not from the API', async () => {
    fakeApi({ 'GET /api/x': () => new Response('<h1>Bad gateway</h1>', { status: 502 }) });
    const error = await failureOf(call('GET', '/api/x', anything));
    expect(error instanceof ApiProblem && error.is('unavailable')).toBe(true);
    expect(reasonOf(error)).toBe('The server answered with status 502.');
  });

  it('tells a broken connection from a refusal', async () => {
    fakeApi({
      'GET /api/x': () => {
        throw new TypeError('fetch failed');
      },
    });
    expect(await failureOf(call('GET', '/api/x', anything))).toBeInstanceOf(NetworkFailure);
  });

  it('names an answer that breaks the contract', async () => {
    fakeApi({
      'GET /api/x': () => ({ wrong: true }),
      'GET /api/y': () => new Response('{"cut', { status: 200 }),
    });
    const strict = {
      parse: () => {
        throw new Error('name is missing');
      },
    };
    expect(await failureOf(call('GET', '/api/x', strict))).toBeInstanceOf(ContractBreach);
    expect(await failureOf(call('GET', '/api/y', anything))).toBeInstanceOf(ContractBreach);
  });

  it('tells the portal when the session has ended', async () => {
    fakeApi({ 'DELETE /api/x': () => problem('unauthenticated', 'Sign in.') });
    const heard = vi.fn();
    const stop = onSignedOut(heard);
    await failureOf(callForNothing('DELETE', '/api/x'));
    stop();
    await failureOf(callForNothing('DELETE', '/api/x'));
    expect(heard).toHaveBeenCalledTimes(1);
  });
});

it('leaves empty values out of an address', () => {
  expect(apiUrl('/api/x', { q: '', show: 'all', n: 0, cursor: null })).toBe('/api/x?show=all&n=0');
});

it('says when to try again after too many requests', () => {
  const detail = 'Too many attempts.';
  const busy = {
    type: 'https://trammel.invalid/problems/too-many-requests',
    title: '',
    status: 429,
    detail,
    instance: '/',
  };
  expect(reasonOf(new ApiProblem({ ...busy, retryAfter: 12 }))).toBe('Too many attempts. Try again in 12 s.');
});
