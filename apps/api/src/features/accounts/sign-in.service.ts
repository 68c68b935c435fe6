import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { later } from '../../clock.ts';
import type { Core } from '../../http/core.ts';
import { appendAudit } from '../../database/append-audit.ts';
import { sha256Hex } from '../../database/canonical-json.ts';
import { Organisation } from '../../database/entities/organisation.entity.ts';
import { Session } from '../../database/entities/session.entity.ts';
import { User } from '../../database/entities/user.entity.ts';
import type { Actor } from '../../http/actor.ts';
import { invalidField, TooMany, Unauthenticated } from '../../http/problems.ts';
import { forgetFailures, mostAttempts, noteFailure, UnknownAddresses } from './failed-attempts.ts';
import { absoluteLimit } from './sessions.queries.ts';

type SignInCore = Pick<Core, 'db' | 'clock' | 'hashing'>;

export interface OpenedSession {
  readonly id: string;
  readonly userId: string;
  readonly expiresAt: string;
}

const unknownAddresses = new UnknownAddresses();

/** Answers alike, in words and in time, for a wrong password and for an address nobody has. */
export async function signIn(
  core: SignInCore,
  credentials: { email: string; password: string },
  userAgent: string,
): Promise<OpenedSession> {
  const now = core.clock.now();
  const accounts = await core.db.reader.getRepository(User).findBy({ email: credentials.email });
  const usable = accounts.filter((user) => user.passwordHash !== null && user.disabledAt === null);
  assertNotSlowedDown(usable, credentials.email, now);
  const user = await matching(core, usable, credentials.password);
  if (!user) {
    await refuse(core, usable, credentials.email, now);
    throw new Unauthenticated(
      'The mail address or the password is not right. After many failures, reset the password by mail.',
    );
  }
  const newHash = core.hashing.isOutdated(user.passwordHash ?? '')
    ? await core.hashing.hash(credentials.password)
    : undefined;
  return core.db.writeTransaction(async (manager) => {
    if (newHash) await manager.update(User, { id: user.id }, { passwordHash: newHash });
    await forgetFailures(manager, user.id);
    return openSession(manager, user, now, userAgent);
  });
}

export async function openSession(
  manager: EntityManager,
  user: User,
  now: string,
  userAgent: string,
): Promise<OpenedSession> {
  const organisation = await manager.findOneByOrFail(Organisation, { id: user.organisationId });
  const session = { id: randomUUID(), userId: user.id, expiresAt: later(now, absoluteLimit) };
  await manager.insert(Session, {
    ...session,
    createdAt: now,
    lastSeenAt: now,
    userAgent: userAgent.slice(0, 200),
  });
  const actor = {
    userId: user.id,
    name: user.name,
    organisationId: organisation.id,
    organisationName: organisation.name,
  };
  appendAudit(
    manager,
    { now, actor },
    {
      action: 'session.opened',
      objectType: 'session',
      objectId: session.id,
      summary: `${user.name} signed in`,
    },
  );
  return session;
}

/** Asks again for the password of the person who is about to sign. */
export async function confirmPassword(
  core: SignInCore,
  actor: Actor,
  password: string,
  pointer = '/password',
): Promise<void> {
  const now = core.clock.now();
  const user = await core.db.reader.getRepository(User).findOneByOrFail({ id: actor.userId });
  assertNotSlowedDown([user], user.email, now);
  if (
    user.passwordHash &&
    user.failedAttempts < mostAttempts &&
    (await core.hashing.verify(user.passwordHash, password))
  ) {
    if (user.failedAttempts > 0)
      await core.db.writeTransaction((manager) => forgetFailures(manager, user.id));
    return;
  }
  await core.db.writeTransaction(async (manager) => {
    const failures = await noteFailure(manager, user.id, now);
    appendAudit(
      manager,
      { now, actor },
      {
        action: 'password.refused',
        objectType: 'user',
        objectId: user.id,
        summary: `A wrong password was given where it is asked for again (${failures} in a row)`,
      },
    );
  });
  throw invalidField(pointer, 'The password is not right. Nothing was changed.');
}

function assertNotSlowedDown(users: readonly User[], address: string, now: string): void {
  const moments =
    users.length > 0 ? users.map((user) => user.blockedUntil) : [unknownAddresses.blockedUntil(address)];
  const until = moments
    .filter((moment): moment is string => moment !== null && moment > now)
    .sort()
    .at(-1);
  if (until) throw new TooMany(Math.ceil((Date.parse(until) - Date.parse(now)) / 1000));
}

async function matching(
  core: SignInCore,
  users: readonly User[],
  password: string,
): Promise<User | undefined> {
  if (users.length === 0) await core.hashing.verifyNothing(password);
  for (const user of users) {
    const fits = await core.hashing.verify(user.passwordHash ?? '', password);
    if (fits && user.failedAttempts < mostAttempts) return user;
  }
  return undefined;
}

/** One commit in either case: a known address must not take longer. */
async function refuse(core: SignInCore, users: readonly User[], address: string, now: string): Promise<void> {
  await core.db.writeTransaction(async (manager) => {
    for (const user of users) await noteFailure(manager, user.id, now);
    appendAudit(
      manager,
      { now, actor: null },
      {
        action: 'session.refused',
        objectType: 'address',
        objectId: sha256Hex(address).slice(0, 32),
        summary: 'A sign-in was refused',
      },
    );
  });
  if (users.length === 0) unknownAddresses.note(address, now);
}
