import type { Logger } from 'pino';
import { MINUTE, later, type Clock } from '../../clock.ts';
import { Session } from '../../database/entities/session.entity.ts';
import type { Database } from '../../database/data-source.ts';
import type { Actor } from '../../http/actor.ts';
import { findLivingSession } from './sessions.queries.ts';

/** Reading must not write each time: a session's last use is noted at most once a minute, beside the request. */
const noteEvery = MINUTE;

export function createActorFinder(
  db: Database,
  clock: Clock,
  log: Logger,
): (sessionId: string) => Actor | null {
  const noting = new Set<string>();
  return (sessionId) => {
    const now = clock.now();
    const living = findLivingSession(db.reader, sessionId, now);
    if (!living) return null;
    if (living.lastSeenAt < later(now, -noteEvery) && !noting.has(sessionId)) {
      noting.add(sessionId);
      db.writeTransaction((manager) => manager.update(Session, { id: sessionId }, { lastSeenAt: now }))
        .catch((error: unknown) => log.warn({ err: error }, 'last use of a session was not noted'))
        .finally(() => noting.delete(sessionId));
    }
    return living.actor;
  };
}
