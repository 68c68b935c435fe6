import { createHash } from 'node:crypto';
import { problemTypes } from '@trammel/shared/problem';
import type { Request, Response } from 'express';
import type { EntityManager } from 'typeorm';
import { z } from 'zod';
import type { Actor } from './actor.ts';
import type { KeyScope } from '../database/idempotency.ts';
import type { Core } from './core.ts';
import { assertNoBody, ordinaryBodyBytes, readJson, run } from './body.ts';
import { assertCsrfToken, assertSameOrigin } from './csrf.ts';
import type { Deed } from './deed.ts';
import { Conflict, Forbidden, Invalid, Malformed, NotFound, Unauthenticated } from './problems.ts';
import type { RoutePermission, RouteRecord } from './route.ts';
import { validate } from './validate.ts';
import { etagOf, requireVersion } from './versions.ts';

const noQuery = z.strictObject({});

/** One request through one route: authenticate, authorize, validate, handle, present. */
export async function serve(core: Core, route: RouteRecord, req: Request, res: Response): Promise<void> {
  res.locals.route = `${route.method} ${route.path}`;
  res.setHeader('Cache-Control', 'no-store');
  core.limits.beforeSignIn(req);
  const actor = route.permission === 'public' ? null : await authorize(core, route, req, res);
  if (route.method !== 'get') {
    assertSameOrigin(req, core.config.publicUrl);
    if (actor) assertCsrfToken(req, core.authentication.csrfKey, actor.sessionId);
  }
  if (route.limit) core.limits.ofOne(`${route.method} ${route.path}`, route.limit, req, actor);

  const params = route.params ? readParams(route.params, req) : undefined;
  const version = route.ifMatch ? requireVersion(req.get('if-match')) : undefined;
  const key = route.idempotent ? readKey(req) : undefined;
  const query = readQuery(route, req);
  if (route.upload) await run(route.upload, req, res);
  const body = await readBody(route, req, res);

  const deed: Omit<Deed, 'actor'> & { actor: Actor | null } = {
    actor,
    now: core.clock.now(),
    requestId: req.id,
    publicUrl: core.config.publicUrl,
    transact: core.db.writeTransaction,
    reader: core.db.reader,
    confirmPassword: (password, pointer) =>
      actor ? core.confirmPassword(actor, password, pointer) : Promise.reject(new Unauthenticated()),
  };
  const call = { deed, params, query, body, version, req, res };
  if (key !== undefined && actor) {
    const scope = { userId: actor.userId, route: `${req.method} ${req.path}`, key, bodyHash: hashOf(req) };
    await serveOnce(core, route, call, scope);
    return;
  }
  const answer = await invoke(route, call);
  if (route.response === 'stream') return;
  send(res, route.status, present(core, route, answer));
}

async function authorize(core: Core, route: RouteRecord, req: Request, res: Response): Promise<Actor> {
  const actor = await core.authentication.actorOf(req, res);
  if (!actor) throw new Unauthenticated();
  res.locals.actor = actor;
  core.limits.afterSignIn(actor);
  if (!mayCall(route.permission, actor)) throw new Forbidden();
  return actor;
}

function mayCall(permission: RoutePermission, actor: Actor): boolean {
  if (permission === 'public' || permission === 'signed-in') return true;
  if (typeof permission === 'string') return actor.permissions.has(permission);
  return permission.some((one) => actor.permissions.has(one));
}

function readParams(schema: z.ZodType, req: Request): unknown {
  const parsed = schema.safeParse(req.params);
  if (!parsed.success) throw new NotFound();
  return parsed.data;
}

/** Express parses the query anew at each look: it is looked at once, and only where there is one. */
function readQuery(route: RouteRecord, req: Request): unknown {
  const sent = req.url.includes('?');
  if (!route.query && !sent) return undefined;
  return validate(route.query ?? noQuery, sent ? req.query : {}, 'query');
}

function readKey(req: Request): string {
  const key = req.get('idempotency-key')?.trim();
  if (!key) {
    throw new Malformed(
      'Send a key of your own in Idempotency-Key, new for each act.',
      problemTypes.idempotencyKeyRequired,
    );
  }
  if (key.length > 200) throw new Malformed('Idempotency-Key takes at most 200 characters.');
  return key;
}

async function readBody(route: RouteRecord, req: Request, res: Response): Promise<unknown> {
  if (route.upload)
    return route.body && validate(route.body, { ...(req.body as object | undefined) }, 'body');
  if (route.body)
    return validate(route.body, await readJson(req, res, route.bodyBytes ?? ordinaryBodyBytes), 'body');
  if (route.method !== 'get') assertNoBody(req);
  return undefined;
}

function hashOf(req: Request): string {
  return createHash('sha256')
    .update(JSON.stringify([req.body ?? null, req.get('if-match') ?? null]))
    .digest('hex');
}

async function serveOnce(
  core: Core,
  route: RouteRecord,
  call: { deed: Omit<Deed, 'actor'>; res: Response },
  scope: KeyScope,
): Promise<void> {
  const earlier = core.keys.claim(scope, call.deed.now);
  if (earlier === 'running')
    throw new Conflict('The same act is still running; wait for its answer.', problemTypes.inProgress);
  if (earlier === 'other-body') {
    throw new Invalid([
      { pointer: '', detail: 'This Idempotency-Key was used with other content; take a new key.' },
    ]);
  }
  if (earlier !== 'fresh') {
    const version = earlier.body === '' ? undefined : versionOf(JSON.parse(earlier.body));
    call.res.setHeader('Idempotent-Replayed', 'true');
    send(call.res, earlier.status, { text: earlier.body, version });
    return;
  }
  try {
    let kept: Answer | undefined;
    const transact: Deed['transact'] = (work) =>
      core.db.writeTransaction(async (manager: EntityManager) => {
        if (kept !== undefined) throw new Error('An act with an idempotency key is one transaction.');
        const result = await work(manager);
        const answer = present(core, route, result);
        core.keys.keep(manager, scope, { status: route.status, body: answer.text }, call.deed.now);
        kept = answer;
        return result;
      });
    await invoke(route, { ...call, deed: { ...call.deed, transact } });
    if (kept === undefined) throw new Error(`${route.path} is idempotent but did nothing in deed.transact.`);
    send(call.res, route.status, kept);
  } finally {
    core.keys.release(scope);
  }
}

function invoke(route: RouteRecord, call: unknown): unknown {
  return (route.handler as (call: unknown) => unknown)(call);
}

interface Answer {
  readonly text: string;
  readonly version: number | undefined;
}

/** The answer as text; empty for a route that answers nothing. */
function present(core: Core, route: RouteRecord, result: unknown): Answer {
  if (typeof route.response === 'string') return { text: '', version: undefined };
  const checked = route.checkAnswer === 'always' || core.checkEveryAnswer;
  const body: unknown = checked ? route.response.parse(result) : result;
  return { text: JSON.stringify(body), version: versionOf(body) };
}

function versionOf(body: unknown): number | undefined {
  if (typeof body !== 'object' || body === null || !('version' in body)) return undefined;
  return typeof body.version === 'number' ? body.version : undefined;
}

function send(res: Response, status: number, answer: Answer): void {
  res.statusCode = status;
  if (status === 204) {
    res.end();
    return;
  }
  if (answer.version !== undefined) res.setHeader('ETag', etagOf(answer.version));
  res.setHeader('Content-Type', 'application/json; charset=utf-8');
  res.setHeader('Content-Length', Buffer.byteLength(answer.text));
  res.end(answer.text);
}
