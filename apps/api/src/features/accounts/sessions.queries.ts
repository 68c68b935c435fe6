import { permissionsOf, type Permission, type Role } from '@trammel/shared/roles';
import type { DataSource } from 'typeorm';
import { HOUR, later } from '../../clock.ts';
import type { Actor } from '../../http/actor.ts';
import type { Deed } from '../../http/deed.ts';
import { readStatement } from '../../database/raw.ts';

export const idleLimit = HOUR;
export const absoluteLimit = 12 * HOUR;

interface Row {
  sessionId: string;
  lastSeenAt: string;
  expiresAt: string;
  userId: string;
  name: string;
  email: string;
  title: string;
  roles: string;
  maySign: number;
  organisationId: string;
  organisationName: string;
}

export interface LivingSession {
  readonly actor: Actor;
  readonly lastSeenAt: string;
  readonly expiresAt: string;
}

const granted = new Map<string, { roles: Role[]; permissions: ReadonlySet<Permission> }>();

/** The session, person and rights as they are now: asked at every request, so that a change holds from the next one. */
export function findLivingSession(reader: DataSource, sessionId: string, now: string): LivingSession | null {
  const row = readStatement(
    reader,
    `SELECT s.id AS sessionId, s.last_seen_at AS lastSeenAt, s.expires_at AS expiresAt,
       u.id AS userId, u.name, u.email, u.title, u.roles,
       u.may_sign AS maySign, o.id AS organisationId, o.name AS organisationName
     FROM sessions s JOIN users u ON u.id = s.user_id JOIN organisations o ON o.id = u.organisation_id
     WHERE s.id = ? AND s.revoked_at IS NULL AND s.expires_at > ? AND s.last_seen_at > ? AND u.disabled_at IS NULL`,
  ).get(sessionId, now, later(now, -idleLimit)) as Row | undefined;
  if (!row) return null;
  const { roles, permissions } = rightsOf(row.roles, row.maySign === 1);
  return {
    lastSeenAt: row.lastSeenAt,
    expiresAt: row.expiresAt,
    actor: {
      userId: row.userId,
      organisationId: row.organisationId,
      organisationName: row.organisationName,
      name: row.name,
      email: row.email,
      title: row.title,
      roles,
      maySign: row.maySign === 1,
      permissions,
      sessionId: row.sessionId,
    },
  };
}

/** Few combinations occur; each is worked out once. */
function rightsOf(rolesJson: string, maySign: boolean) {
  const key = `${rolesJson}${maySign}`;
  let known = granted.get(key);
  if (!known) {
    const roles = JSON.parse(rolesJson) as Role[];
    known = { roles, permissions: new Set(permissionsOf(roles, maySign)) };
    granted.set(key, known);
  }
  return known;
}

/** Changes whenever another connection, such as the writer's, has committed anything. */
export function dataVersion(reader: DataSource): number {
  return (readStatement(reader, 'PRAGMA data_version').get() as { data_version: number }).data_version;
}

/** Living sessions of the person, newest use first. */
export function findOwnSessions({ reader, actor, now }: Pick<Deed, 'reader' | 'actor' | 'now'>) {
  const rows = readStatement(
    reader,
    `SELECT id, created_at AS createdAt, last_seen_at AS lastSeenAt, user_agent AS userAgent FROM sessions
     WHERE user_id = ? AND revoked_at IS NULL AND expires_at > ? AND last_seen_at > ? ORDER BY last_seen_at DESC LIMIT 100`,
  ).all(actor.userId, now, later(now, -idleLimit)) as {
    id: string;
    createdAt: string;
    lastSeenAt: string;
    userAgent: string;
  }[];
  return rows.map((row) => ({ ...row, current: row.id === actor.sessionId }));
}
