import express, { type Request, type RequestHandler, type Response } from 'express';
import { Malformed, unsupportedMedia } from './problems.ts';

export const ordinaryBodyBytes = 1024 * 1024;
const deepest = 20;
const forbiddenKeys = new Set(['__proto__', 'constructor', 'prototype']);
const exactJson = /^application\/json(?:\s*;\s*charset="?utf-8"?)?$/i;

const parsers = new Map<number, RequestHandler>();

/** Reads the body only after the person was let in, so that nobody unknown makes the server parse anything. */
export async function readJson(req: Request, res: Response, limit: number): Promise<unknown> {
  if (!exactJson.test(req.headers['content-type'] ?? '')) throw unsupportedMedia('application/json');
  await run(parserFor(limit), req, res);
  assertPlain(req.body);
  return req.body as unknown;
}

/** A route without a body schema takes no body: nothing that was sent is silently dropped. */
export function assertNoBody(req: Request): void {
  const length = req.headers['content-length'];
  if (req.headers['transfer-encoding'] !== undefined || (length !== undefined && length !== '0')) {
    throw new Malformed('This takes no body.');
  }
}

export function run(handler: RequestHandler, req: Request, res: Response): Promise<void> {
  return new Promise((resolve, reject) => {
    // A middleware may answer through `next(error)` only; none of those used here writes by itself.
    void handler(req, res, (error?: unknown) => {
      if (error === undefined) resolve();
      else reject(error instanceof Error ? error : new Error(String(error)));
    });
  });
}

function parserFor(limit: number): RequestHandler {
  const known = parsers.get(limit);
  if (known) return known;
  const parser = express.json({ limit, inflate: false, strict: true, type: () => true });
  parsers.set(limit, parser);
  return parser;
}

/** Throws for nesting beyond what any message needs and for keys that reach into prototypes. */
export function assertPlain(value: unknown, depth = 0): void {
  if (typeof value !== 'object' || value === null) return;
  if (depth >= deepest) throw new Malformed(`The body is nested more than ${deepest} levels deep.`);
  if (Array.isArray(value)) {
    for (const item of value) assertPlain(item, depth + 1);
    return;
  }
  for (const key of Object.keys(value)) {
    if (forbiddenKeys.has(key)) throw new Malformed(`A field may not be called ${key}.`);
    assertPlain((value as Record<string, unknown>)[key], depth + 1);
  }
}
