import { IsNull, type EntityManager } from 'typeorm';
import { appendAudit } from '../../database/append-audit.ts';
import { Session } from '../../database/entities/session.entity.ts';
import type { Deed } from '../../http/deed.ts';
import { NotFound } from '../../http/problems.ts';

/** Ends one session of the person; anybody else's is not found. */
export function endSession(deed: Deed, sessionId: string): Promise<void> {
  return deed.transact(async (manager) => {
    const own = { id: sessionId, userId: deed.actor.userId, revokedAt: IsNull() };
    const ended = await manager.update(Session, own, { revokedAt: deed.now });
    if (ended.affected !== 1) throw new NotFound();
    appendAudit(manager, deed, {
      action: 'session.ended',
      objectType: 'session',
      objectId: sessionId,
      summary: `${deed.actor.name} signed out`,
    });
  });
}

export function endAllSessions(deed: Deed, userId: string): Promise<void> {
  return deed.transact(async (manager) => {
    await revokeSessions(manager, userId, deed.now);
    appendAudit(manager, deed, {
      action: 'session.all-ended',
      objectType: 'user',
      objectId: userId,
      summary: `${deed.actor.name} signed out everywhere`,
    });
  });
}

/** For every event after which old cookies must be worth nothing: password, role, disablement. */
export async function revokeSessions(
  manager: EntityManager,
  userId: string,
  now: string,
  except?: string,
): Promise<void> {
  const open = await manager.findBy(Session, { userId, revokedAt: IsNull() });
  for (const session of open) {
    if (session.id !== except) await manager.update(Session, { id: session.id }, { revokedAt: now });
  }
}
