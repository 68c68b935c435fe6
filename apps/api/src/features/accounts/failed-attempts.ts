import { SECOND, later } from '../../clock.ts';
import type { EntityManager } from 'typeorm';
import { User } from '../../database/entities/user.entity.ts';

const freeAttempts = 4;
const longestDelay = 25 * SECOND;
/** From here on only a reset by mail opens the account again. */
export const mostAttempts = 100;

/** When the next attempt is taken after so many failures in a row: from the fifth on 1, 2, 4 … 25 seconds later. */
export function blockedUntil(failures: number, now: string): string | null {
  if (failures <= freeAttempts) return null;
  return later(now, Math.min(longestDelay, SECOND * 2 ** Math.min(10, failures - freeAttempts - 1)));
}

export async function noteFailure(manager: EntityManager, userId: string, now: string): Promise<number> {
  const user = await manager.findOneByOrFail(User, { id: userId });
  const failedAttempts = user.failedAttempts + 1;
  await manager.update(
    User,
    { id: userId },
    { failedAttempts, blockedUntil: blockedUntil(failedAttempts, now) },
  );
  return failedAttempts;
}

export async function forgetFailures(manager: EntityManager, userId: string): Promise<void> {
  await manager.update(User, { id: userId }, { failedAttempts: 0, blockedUntil: null });
}

/** The same slowing down for addresses nobody has, so that it does not tell who has one. Bounded; the oldest goes first. */
export class UnknownAddresses {
  private readonly failures = new Map<string, { count: number; blockedUntil: string | null }>();

  blockedUntil(address: string): string | null {
    return this.failures.get(address)?.blockedUntil ?? null;
  }

  note(address: string, now: string): void {
    const count = (this.failures.get(address)?.count ?? 0) + 1;
    this.failures.delete(address);
    this.failures.set(address, { count, blockedUntil: blockedUntil(count, now) });
    const oldest = this.failures.keys().next().value;
    if (this.failures.size > 10_000 && oldest !== undefined) this.failures.delete(oldest);
  }
}
