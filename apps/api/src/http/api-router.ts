import { Router } from 'express';
import type { Core } from './core.ts';
import type { Method, RouteRecord } from './route.ts';

/** Express's router beside the list of what was declared on it. */
export class ApiRouter {
  readonly express = Router({ caseSensitive: true, strict: true });
  readonly routes: RouteRecord[] = [];
  private readonly patterns: { method: Method; pattern: RegExp }[] = [];

  constructor(readonly core: Core) {}

  add(record: RouteRecord): void {
    const name = `${record.method} ${record.path}`;
    if (this.routes.some((known) => `${known.method} ${known.path}` === name)) {
      throw new Error(`The route ${name} is declared twice.`);
    }
    this.routes.push(record);
    const escaped = record.path.replace(/[.*+?^${}()|[\]\\]/g, '\\$&').replace(/:[A-Za-z]+/g, '[^/]+');
    this.patterns.push({ method: record.method, pattern: new RegExp(`^${escaped}$`) });
  }

  /** Methods that this path takes; empty where there is no such path. */
  methodsOf(path: string): string[] {
    const methods = this.patterns
      .filter((entry) => entry.pattern.test(path))
      .map((entry) => entry.method.toUpperCase());
    return methods.includes('GET') ? [...methods, 'HEAD'] : methods;
  }
}
