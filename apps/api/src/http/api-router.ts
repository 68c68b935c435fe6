import type { RequestHandler } from 'express';
import type { Core } from './core.ts';
import type { RouteRecord } from './route.ts';
import { serve } from './serve.ts';

interface CompiledRoute {
  readonly record: RouteRecord;
  /** A fixed piece of the path, or null where a parameter stands. */
  readonly pieces: readonly (string | null)[];
  readonly names: readonly (string | null)[];
}

/**
 * What was declared, and the way from a request to it. Routes are found by method and number of pieces: trying some
 * hundred patterns in turn would cost more than the rest of a small request.
 */
export class ApiRouter {
  readonly routes: RouteRecord[] = [];
  private readonly byShape = new Map<string, CompiledRoute[]>();

  constructor(readonly core: Core) {}

  add(record: RouteRecord): void {
    const name = `${record.method} ${record.path}`;
    if (this.routes.some((known) => `${known.method} ${known.path}` === name)) {
      throw new Error(`The route ${name} is declared twice.`);
    }
    this.routes.push(record);
    const pieces = record.path.split('/').slice(1);
    const shape = `${record.method} ${pieces.length}`;
    const compiled = {
      record,
      pieces: pieces.map((piece) => (piece.startsWith(':') ? null : piece)),
      names: pieces.map((piece) => (piece.startsWith(':') ? piece.slice(1) : null)),
    };
    const sameShape = [...(this.byShape.get(shape) ?? []), compiled];
    // A fixed piece wins over a parameter in the same place, whatever was declared first.
    this.byShape.set(
      shape,
      sameShape.sort((a, b) => parameterPlaces(a).localeCompare(parameterPlaces(b))),
    );
  }

  /** Hands the request to its route; to the next handler when there is none. */
  readonly handle: RequestHandler = (req, res, next) => {
    const method = req.method === 'HEAD' ? 'get' : req.method.toLowerCase();
    const found = this.find(method, req.path);
    if (!found) {
      next();
      return;
    }
    const pieces = req.path.split('/');
    const params: Record<string, string> = {};
    try {
      found.names.forEach((name, at) => {
        if (name !== null) params[name] = decodeURIComponent(pieces[at + 1] ?? '');
      });
    } catch (error) {
      next(error);
      return;
    }
    req.params = params;
    serve(this.core, found.record, req, res).catch(next);
  };

  /** Methods that this path takes; empty where there is no such path. */
  methodsOf(path: string): string[] {
    const methods = ['post', 'get', 'put', 'patch', 'delete']
      .filter((method) => this.find(method, path) !== undefined)
      .map((method) => method.toUpperCase());
    return methods.includes('GET') ? [...methods, 'HEAD'] : methods;
  }

  private find(method: string, path: string): CompiledRoute | undefined {
    const pieces = path.split('/');
    return this.byShape
      .get(`${method} ${pieces.length - 1}`)
      ?.find((route) =>
        route.pieces.every((piece, at) =>
          piece === null ? pieces[at + 1] !== '' : piece === pieces[at + 1],
        ),
      );
  }
}

function parameterPlaces(route: CompiledRoute): string {
  return route.pieces.map((piece) => (piece === null ? '1' : '0')).join('');
}
