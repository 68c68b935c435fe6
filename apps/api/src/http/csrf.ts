import { createHmac, timingSafeEqual } from 'node:crypto';
import type { Request } from 'express';
import { Forbidden } from './problems.ts';

export const csrfHeader = 'x-csrf-token';

/** The token belongs to one session: it cannot be fetched by one person and used in the browser of another. */
export function csrfToken(key: Buffer, sessionId: string): string {
  return createHmac('sha256', key).update(sessionId).digest('base64url');
}

/**
 * Refuses a change that a page of another origin started. Browsers say where a request comes from in Sec-Fetch-Site;
 * older ones and other clients send Origin. Neither means refused.
 */
export function assertSameOrigin(req: Request, publicOrigin: string): void {
  const site = req.headers['sec-fetch-site'];
  const ours = site === undefined ? req.headers.origin === publicOrigin : site === 'same-origin';
  if (!ours) throw new Forbidden('This did not come from a page of this installation.');
}

const expectedTokens = new WeakMap<Buffer, Map<string, Buffer>>();
const mostRemembered = 5000;

/** Worked out once a session: the same words give the same token each time. */
function expectedToken(key: Buffer, sessionId: string): Buffer {
  let known = expectedTokens.get(key);
  if (!known) expectedTokens.set(key, (known = new Map()));
  let token = known.get(sessionId);
  if (!token) {
    if (known.size >= mostRemembered) known.clear();
    known.set(sessionId, (token = Buffer.from(csrfToken(key, sessionId))));
  }
  return token;
}

export function assertCsrfToken(req: Request, key: Buffer, sessionId: string): void {
  const given = Buffer.from(req.get(csrfHeader) ?? '');
  const expected = expectedToken(key, sessionId);
  if (given.length !== expected.length || !timingSafeEqual(given, expected)) {
    throw new Forbidden('This page is out of date. Reload it and try again.');
  }
}
