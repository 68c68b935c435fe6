import type { Permission } from '@trammel/shared/roles';
import type { Request, RequestHandler, Response } from 'express';
import type { z } from 'zod';
import type { Deed } from './deed.ts';
import type { ApiRouter } from './api-router.ts';

export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';
/** Who may call at all (of a list, whoever holds one); on which objects is settled where each object is loaded. */
export type RoutePermission = 'public' | 'signed-in' | Permission | readonly Permission[];

type Parsed<S> = S extends z.ZodType ? z.output<S> : undefined;

/** What a handler is given, read and checked. */
export interface Call<Who, Params, Query, Body, IfMatch> {
  readonly deed: Who extends 'public' ? Omit<Deed, 'actor'> : Deed;
  readonly params: Parsed<Params>;
  readonly query: Parsed<Query>;
  readonly body: Parsed<Body>;
  /** The version in If-Match, on routes that ask for it. */
  readonly version: IfMatch extends true ? number : undefined;
  readonly req: Request;
  readonly res: Response;
}

export interface RouteDefinition<
  Who extends RoutePermission,
  Params extends z.ZodType | undefined,
  Query extends z.ZodType | undefined,
  Body extends z.ZodType | undefined,
  Answer extends z.ZodType | 'nothing' | 'stream',
  IfMatch extends boolean | undefined,
> {
  readonly method: Method;
  /** Under /api, with `:name` for a parameter. */
  readonly path: string;
  readonly permission: Who;
  readonly summary: string;
  /** A parameter that does not fit its schema names nothing: 404, as for any unknown id. */
  readonly params?: Params;
  readonly query?: Query;
  readonly body?: Body;
  /** What may leave: fields the schema does not name are dropped. `stream`: the handler writes the answer itself. */
  readonly response: Answer;
  /** 200 unless said otherwise; 204 where the response is nothing. */
  readonly status?: 200 | 201 | 202;
  /** Demands Idempotency-Key; the handler must do its deed in `deed.transact`, whose result is the answer. */
  readonly idempotent?: true;
  /** Demands If-Match with the version read. */
  readonly ifMatch?: IfMatch;
  /** Larger than 1 MB only where a message needs it. */
  readonly bodyBytes?: number;
  /** Multipart reader; runs once the person was let in. */
  readonly upload?: RequestHandler;
  /** Large answers made by our own code are checked in tests only. */
  readonly checkAnswer?: 'always' | 'in-tests';
  /** Stricter than the general limit, counted by person or address. */
  readonly limit?: { readonly max: number; readonly seconds: number };
  readonly handler: (
    call: Call<Who, Params, Query, Body, IfMatch>,
  ) =>
    | Promise<Answer extends z.ZodType ? z.input<Answer> : void>
    | (Answer extends z.ZodType ? z.input<Answer> : void);
}

/** A route as the inventory, the API description and the 405 answer see it. */
export interface RouteRecord {
  readonly method: Method;
  readonly path: string;
  readonly permission: RoutePermission;
  readonly summary: string;
  readonly params: z.ZodType | undefined;
  readonly query: z.ZodType | undefined;
  readonly body: z.ZodType | undefined;
  readonly response: z.ZodType | 'nothing' | 'stream';
  readonly status: number;
  readonly idempotent: boolean;
  readonly ifMatch: boolean;
  readonly upload: RequestHandler | undefined;
  readonly bodyBytes: number | undefined;
  readonly checkAnswer: 'always' | 'in-tests';
  readonly limit: { readonly max: number; readonly seconds: number } | undefined;
  readonly handler: (call: never) => unknown;
}

/** Declares one route: who may, what goes in, what comes out. There is no other way to reach a handler under /api. */
export function route<
  const Who extends RoutePermission,
  Answer extends z.ZodType | 'nothing' | 'stream',
  Params extends z.ZodType | undefined = undefined,
  Query extends z.ZodType | undefined = undefined,
  Body extends z.ZodType | undefined = undefined,
  const IfMatch extends boolean | undefined = undefined,
>(router: ApiRouter, definition: RouteDefinition<Who, Params, Query, Body, Answer, IfMatch>): void {
  const record: RouteRecord = {
    method: definition.method,
    path: definition.path,
    permission: definition.permission,
    summary: definition.summary,
    params: definition.params,
    query: definition.query,
    body: definition.body,
    response: definition.response,
    status: definition.response === 'nothing' ? 204 : (definition.status ?? 200),
    idempotent: definition.idempotent ?? false,
    ifMatch: definition.ifMatch ?? false,
    upload: definition.upload,
    bodyBytes: definition.bodyBytes,
    checkAnswer: definition.checkAnswer ?? 'always',
    limit: definition.limit,
    handler: definition.handler,
  };
  router.add(record);
}
