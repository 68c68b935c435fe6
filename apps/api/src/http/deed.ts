import type { DataSource, EntityManager } from 'typeorm';
import type { Actor } from './actor.ts';

/** Runs the work in the one write transaction; on a route with an idempotency key its result is the answer that is kept. */
export type Transact = <T>(work: (manager: EntityManager) => Promise<T>) => Promise<T>;

/** Who does what, when, and the two ways to the database. First argument of every service. */
export interface Deed {
  readonly actor: Actor;
  /** Time of the request: one moment for every row it writes. */
  readonly now: string;
  readonly requestId: string;
  /** Origin for links in mail. */
  readonly publicUrl: string;
  readonly transact: Transact;
  /** Read-only, sees committed rows only; inside `transact` read through its manager instead. */
  readonly reader: DataSource;
  /**
   * For signing: asks again for the password of the person signed in. A wrong one is 422 at `pointer` (`/password` unless
   * said otherwise), often wrong slows down, both are recorded. Hashing waits, so it comes before the transaction.
   */
  readonly confirmPassword: (password: string, pointer?: string) => Promise<void>;
}
