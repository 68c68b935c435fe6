import { randomUUID } from 'node:crypto';
import type { DataSource, EntityManager } from 'typeorm';
import { DAY, later } from '../clock.ts';
import { readStatement, writeStatement } from './raw.ts';

export interface KeyScope {
  readonly userId: string;
  readonly route: string;
  readonly key: string;
  readonly bodyHash: string;
}

export interface StoredAnswer {
  readonly status: number;
  readonly body: string;
}

export type KeyState = 'fresh' | 'running' | 'other-body' | StoredAnswer;

interface Row {
  bodyHash: string;
  status: number;
  response: string;
}

const keptFor = DAY;

/** Keys of acts that must not happen twice. The answer is written in the transaction of the act, so both exist or neither. */
export class IdempotencyKeys {
  private readonly running = new Set<string>();

  constructor(private readonly reader: DataSource) {}

  /** Claims the key for this request, or says what became of the earlier one. A fresh key must be released. */
  claim(scope: KeyScope, now: string): KeyState {
    const row = readStatement(
      this.reader,
      `SELECT body_hash AS bodyHash, status, response FROM idempotency_keys
       WHERE user_id = ? AND route = ? AND key = ? AND created_at > ?`,
    ).get(scope.userId, scope.route, scope.key, later(now, -keptFor)) as Row | undefined;
    if (row)
      return row.bodyHash === scope.bodyHash ? { status: row.status, body: row.response } : 'other-body';
    const name = nameOf(scope);
    if (this.running.has(name)) return 'running';
    this.running.add(name);
    return 'fresh';
  }

  release(scope: KeyScope): void {
    this.running.delete(nameOf(scope));
  }

  keep(manager: EntityManager, scope: KeyScope, answer: StoredAnswer, now: string): void {
    writeStatement(
      manager,
      'DELETE FROM idempotency_keys WHERE user_id = ? AND route = ? AND key = ? AND created_at <= ?',
    ).run(scope.userId, scope.route, scope.key, later(now, -keptFor));
    writeStatement(
      manager,
      `INSERT INTO idempotency_keys (id, user_id, route, key, body_hash, status, response, created_at)
       VALUES (?, ?, ?, ?, ?, ?, ?, ?)`,
    ).run(
      randomUUID(),
      scope.userId,
      scope.route,
      scope.key,
      scope.bodyHash,
      answer.status,
      answer.body,
      now,
    );
  }

  /** Removes what has outlived its day. */
  sweep(manager: EntityManager, now: string): number {
    return writeStatement(manager, 'DELETE FROM idempotency_keys WHERE created_at <= ?').run(
      later(now, -keptFor),
    ).changes;
  }
}

function nameOf(scope: KeyScope): string {
  return JSON.stringify([scope.userId, scope.route, scope.key]);
}
