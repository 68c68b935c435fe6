import type { tokenStateResponse } from '@trammel/shared/accounts';
import type { z } from 'zod';
import { IsNull, MoreThan, type DataSource, type EntityManager } from 'typeorm';
import { appendAudit } from '../../database/append-audit.ts';
import { sha256Hex } from '../../database/canonical-json.ts';
import { AccountToken } from '../../database/entities/account-token.entity.ts';
import { User } from '../../database/entities/user.entity.ts';
import { hashOfToken, issueAccountToken, type TokenKind } from '../../http/account-tokens.ts';
import type { Core } from '../../http/core.ts';
import type { Deed } from '../../http/deed.ts';
import { invalidField, NotFound } from '../../http/problems.ts';
import { enqueueMail } from '../../mail/outbox.ts';
import { passwordChangedMail, passwordResetMail } from '../../mail/templates/account-mails.ts';
import { weaknessOf } from './password-blocklist.ts';
import { revokeSessions } from './sessions.service.ts';

type PublicDeed = Omit<Deed, 'actor'>;
type Hashing = Core['hashing'];

/** Needs the password in force. Every other session ends; this one goes on. */
export async function changePassword(
  deed: Deed,
  hashing: Hashing,
  passwords: { currentPassword: string; newPassword: string },
): Promise<void> {
  await deed.confirmPassword(passwords.currentPassword, '/currentPassword');
  const { actor } = deed;
  const hash = await hashed(hashing, passwords.newPassword, [
    actor.name,
    actor.email,
    actor.organisationName,
  ]);
  await deed.transact(async (manager) => {
    const user = await manager.findOneOrFail(User, {
      where: { id: actor.userId },
      relations: { organisation: true },
    });
    await settle(manager, deed, user, hash, actor.sessionId);
  });
}

/** Sends a link to every account of this address; the answer is the same when there is none. */
export function askForReset(deed: PublicDeed, email: string): Promise<void> {
  return deed.transact(async (manager) => {
    const users = await manager.find(User, {
      where: { email, disabledAt: IsNull() },
      relations: { organisation: true },
      take: 20,
    });
    for (const user of users) {
      const kind: TokenKind = user.passwordHash === null ? 'invitation' : 'password-reset';
      const token = await issueAccountToken(manager, user.id, kind, deed.now);
      const page = kind === 'invitation' ? 'invitation' : 'password-reset';
      enqueueMail(manager, deed.now, {
        kind: 'password-reset',
        recipient: user.email,
        ...passwordResetMail(
          { name: user.name, organisationName: user.organisation.name },
          `${deed.publicUrl}/${page}/${token}`,
        ),
      });
    }
    appendAudit(
      manager,
      { now: deed.now, actor: null },
      {
        action: 'password.reset-asked',
        objectType: 'address',
        objectId: sha256Hex(email).slice(0, 32),
        summary: 'A new password was asked for by mail',
      },
    );
  });
}

/** Whom a link belongs to; a used, expired or made-up one is not found. */
export async function readToken(
  reader: DataSource,
  secret: string,
  now: string,
): Promise<z.infer<typeof tokenStateResponse>> {
  const { token, user } = await findToken(reader.manager, secret, now);
  return { kind: token.kind, name: user.name, email: user.email, organisationName: user.organisation.name };
}

/** Sets the password that the link allows, once. It does not sign anybody in. */
export async function setPasswordByToken(
  deed: PublicDeed,
  hashing: Hashing,
  secret: string,
  newPassword: string,
): Promise<void> {
  const { user } = await findToken(deed.reader.manager, secret, deed.now);
  const hash = await hashed(hashing, newPassword, [user.name, user.email, user.organisation.name]);
  await deed.transact(async (manager) => {
    const found = await findToken(manager, secret, deed.now);
    await manager.update(AccountToken, { id: found.token.id }, { usedAt: deed.now });
    await settle(manager, deed, found.user, hash);
  });
}

async function findToken(manager: EntityManager, secret: string, now: string) {
  const token = await manager.findOne(AccountToken, {
    where: { tokenHash: hashOfToken(secret), usedAt: IsNull(), expiresAt: MoreThan(now) },
    relations: { user: { organisation: true } },
  });
  if (!token || token.user.disabledAt !== null)
    throw new NotFound('This link has been used or has run out. Ask for a new one.');
  return { token, user: token.user };
}

async function hashed(hashing: Hashing, password: string, ownWords: readonly string[]): Promise<string> {
  const weakness = weaknessOf(password, ownWords);
  if (weakness) throw invalidField('/newPassword', `${weakness} Choose another one.`);
  return hashing.hash(password);
}

async function settle(
  manager: EntityManager,
  deed: PublicDeed,
  user: User,
  passwordHash: string,
  keptSession?: string,
): Promise<void> {
  const first = user.passwordHash === null;
  await manager.update(User, { id: user.id }, { passwordHash, failedAttempts: 0, blockedUntil: null });
  await revokeSessions(manager, user.id, deed.now, keptSession);
  const organisationName = user.organisation.name;
  const actor = { userId: user.id, name: user.name, organisationId: user.organisationId, organisationName };
  appendAudit(
    manager,
    { now: deed.now, actor },
    {
      action: first ? 'invitation.accepted' : 'password.changed',
      objectType: 'user',
      objectId: user.id,
      summary: first ? `${user.name} accepted the invitation` : `${user.name} changed the password`,
    },
  );
  if (first) return;
  enqueueMail(manager, deed.now, {
    kind: 'password-changed',
    recipient: user.email,
    ...passwordChangedMail({ name: user.name, organisationName }),
  });
}
