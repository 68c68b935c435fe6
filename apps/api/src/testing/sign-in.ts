import { randomUUID } from 'node:crypto';
import request, { type Test } from 'supertest';
import { Session } from '../database/entities/session.entity.ts';
import { HOUR, later } from '../clock.ts';
import { csrfHeader, csrfToken } from '../http/csrf.ts';
import type { TestApp } from './test-app.ts';

type Verb = 'get' | 'post' | 'put' | 'patch' | 'delete';

/** A browser of one person: cookie, page token and origin are sent with every request. */
export type Client = Record<Verb, (path: string) => Test> & { readonly sessionId: string };

/** Opens a session without the sign-in page. Paths start at /api. */
export async function signInAs(app: TestApp, user: { id: string }): Promise<Client> {
  const { authentication } = app.core;
  const now = app.clock.now();
  const session = {
    id: randomUUID(),
    userId: user.id,
    createdAt: now,
    lastSeenAt: now,
    expiresAt: later(now, 12 * HOUR),
  };
  await app.db.writeTransaction((manager) => manager.insert(Session, session));
  let cookie = '';
  const catcher = { cookie: (name: string, value: string) => (cookie = `${name}=${value}`) };
  authentication.issue(
    catcher as unknown as Parameters<typeof authentication.issue>[0],
    session.id,
    session.expiresAt,
  );
  const headers = {
    Cookie: cookie,
    Origin: app.config.publicUrl,
    [csrfHeader]: csrfToken(authentication.csrfKey, session.id),
  };
  return { ...verbs(app, headers), sessionId: session.id };
}

/** A browser without a session, on a page of this installation. */
export function anonymous(app: TestApp): Client {
  return { ...verbs(app, { Origin: app.config.publicUrl }), sessionId: '' };
}

/** A new key for an act that must not happen twice. */
export const onceKey = () => ({ 'Idempotency-Key': randomUUID() });

/** The version a change is based on. */
export const ifVersion = (version: number) => ({ 'If-Match': `"${version}"` });

function verbs(app: TestApp, headers: Record<string, string>): Record<Verb, (path: string) => Test> {
  const call = (verb: Verb) => (path: string) => request(app.server)[verb](path).set(headers);
  return {
    get: call('get'),
    post: call('post'),
    put: call('put'),
    patch: call('patch'),
    delete: call('delete'),
  };
}
