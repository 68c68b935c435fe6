import type { Logger } from 'pino';
import type { Clock } from '../clock.ts';
import type { Config } from '../config.ts';
import type { Database } from '../database/data-source.ts';
import type { IdempotencyKeys } from '../database/idempotency.ts';
import type { Actor } from './actor.ts';
import type { Authentication } from './authenticate.ts';
import type { PasswordHashing } from './password-hashing.ts';
import type { RateLimits } from './rate-limits.ts';

/** What serving any route takes, and what a feature may be built from. Made once in app.ts and handed on. */
export interface Core {
  readonly config: Config;
  readonly clock: Clock;
  readonly log: Logger;
  readonly db: Database;
  readonly keys: IdempotencyKeys;
  readonly hashing: PasswordHashing;
  readonly authentication: Authentication;
  readonly limits: RateLimits;
  readonly confirmPassword: (actor: Actor, password: string, pointer?: string) => Promise<void>;
  /** Also check answers of routes that are checked in tests only. */
  readonly checkEveryAnswer: boolean;
}
