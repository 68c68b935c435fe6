import type { Logger } from 'pino';
import { MINUTE, type Clock } from '../../clock.ts';
import { Session } from '../../database/entities/session.entity.ts';
import type { Database } from '../../database/data-source.ts';
import type { Actor } from '../../http/actor.ts';
import { dataVersion, findLivingSession, idleLimit } from './sessions.queries.ts';

/** Reading must not write each time: a session's last use is noted at most once a minute, beside the request. */
const noteEvery = MINUTE;

export function createActorFinder(
  db: Database,
  clock: Clock,
  log: Logger,
): (sessionId: string) => Actor | null {
  const noting = new Set<string>();
  const known = new Map<string, KnownSession>();
  let version = -1;

  /** What was read stays true until anything at all is committed: the same answer as reading it again, for less. */
  const read = (sessionId: string): KnownSession | null => {
    const current = dataVersion(db.reader);
    if (current !== version) known.clear();
    version = current;
    const earlier = known.get(sessionId);
    if (earlier) return earlier;
    const living = findLivingSession(db.reader, sessionId, clock.now());
    if (!living) return null;
    const found = {
      actor: living.actor,
      lastSeen: Date.parse(living.lastSeenAt),
      ends: Date.parse(living.expiresAt),
    };
    known.set(sessionId, found);
    return found;
  };

  return (sessionId) => {
    const session = read(sessionId);
    const now = clock.millis();
    if (!session || session.ends <= now || session.lastSeen <= now - idleLimit) return null;
    if (session.lastSeen < now - noteEvery && !noting.has(sessionId)) {
      noting.add(sessionId);
      const lastSeenAt = clock.now();
      db.writeTransaction((manager) => manager.update(Session, { id: sessionId }, { lastSeenAt }))
        .catch((error: unknown) => log.warn({ err: error }, 'last use of a session was not noted'))
        .finally(() => noting.delete(sessionId));
    }
    return session.actor;
  };
}

interface KnownSession {
  readonly actor: Actor;
  readonly lastSeen: number;
  readonly ends: number;
}
