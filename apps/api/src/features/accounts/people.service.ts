import { randomUUID } from 'node:crypto';
import type { changePersonRequest, invitePersonRequest, PersonResponse } from '@trammel/shared/accounts';
import type { EntityManager } from 'typeorm';
import type { z } from 'zod';
import { appendAudit } from '../../database/append-audit.ts';
import { User } from '../../database/entities/user.entity.ts';
import { issueAccountToken } from '../../http/account-tokens.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, invalidField, NotFound } from '../../http/problems.ts';
import { updateVersioned } from '../../http/versions.ts';
import { enqueueMail } from '../../mail/outbox.ts';
import { invitationMail } from '../../mail/templates/account-mails.ts';
import { presentPerson } from './people.presenter.ts';
import { revokeSessions } from './sessions.service.ts';

/** Invites a colleague by mail. The link sets a password and nothing else. */
export function invitePerson(
  deed: Deed,
  command: z.output<typeof invitePersonRequest>,
): Promise<PersonResponse> {
  return deed.transact(async (manager) => {
    const { organisationId } = deed.actor;
    if (await manager.existsBy(User, { organisationId, email: command.email })) {
      throw invalidField('/email', 'This person has access already.');
    }
    const user = manager.create(User, { id: randomUUID(), organisationId, ...command, createdAt: deed.now });
    await manager.insert(User, user);
    await sendInvitation(manager, deed, user);
    appendAudit(manager, deed, {
      action: 'person.invited',
      objectType: 'user',
      objectId: user.id,
      summary: `${user.name} invited`,
      after: command,
    });
    return present(user);
  });
}

/** Sends a new link to someone who has not set a password yet; the earlier link is dead. */
export function inviteAgain(deed: Deed, personId: string): Promise<PersonResponse> {
  return deed.transact(async (manager) => {
    const user = await findColleague(manager, deed, personId);
    if (user.passwordHash !== null || user.disabledAt !== null) {
      throw new Conflict('Only a person who has not yet set a password can be invited again.');
    }
    await sendInvitation(manager, deed, user);
    appendAudit(manager, deed, {
      action: 'person.invited-again',
      objectType: 'user',
      objectId: user.id,
      summary: `${user.name} invited again`,
    });
    return present(user);
  });
}

/** Roles, authority to sign and disablement hold from the person's next request. */
export function changePerson(
  deed: Deed,
  personId: string,
  version: number,
  command: z.output<typeof changePersonRequest>,
): Promise<void> {
  return deed.transact(async (manager) => {
    const user = await findColleague(manager, deed, personId);
    const { disabled, ...fields } = command;
    const losesAdministrator = disabled || !command.roles.includes('administrator');
    if (user.id === deed.actor.userId && losesAdministrator) {
      throw new Conflict('You cannot take the administrator role from yourself; ask another administrator.');
    }
    const disabledAt = disabled ? (user.disabledAt ?? deed.now) : null;
    await updateVersioned(manager, User, { id: personId, version }, { ...fields, disabledAt }, present);
    if (disabled) await revokeSessions(manager, personId, deed.now);
    const before = { name: user.name, title: user.title, roles: user.roles, maySign: user.maySign };
    appendAudit(manager, deed, {
      action: disabled && user.disabledAt === null ? 'person.disabled' : 'person.changed',
      objectType: 'user',
      objectId: personId,
      summary: `Access of ${command.name} changed`,
      before: { ...before, disabled: user.disabledAt !== null },
      after: command,
    });
  });
}

export function endSessionsOf(deed: Deed, personId: string): Promise<void> {
  return deed.transact(async (manager) => {
    const user = await findColleague(manager, deed, personId);
    await revokeSessions(manager, personId, deed.now);
    appendAudit(manager, deed, {
      action: 'session.all-ended',
      objectType: 'user',
      objectId: personId,
      summary: `All sessions of ${user.name} ended`,
    });
  });
}

async function findColleague(manager: EntityManager, deed: Deed, personId: string): Promise<User> {
  const user = await manager.findOneBy(User, { id: personId, organisationId: deed.actor.organisationId });
  if (!user) throw new NotFound();
  return user;
}

async function sendInvitation(manager: EntityManager, deed: Deed, user: User): Promise<void> {
  const token = await issueAccountToken(manager, user.id, 'invitation', deed.now);
  enqueueMail(manager, deed.now, {
    kind: 'person-invited',
    recipient: user.email,
    ...invitationMail(
      { name: user.name, organisationName: deed.actor.organisationName },
      deed.actor.name,
      `${deed.publicUrl}/invitation/${token}`,
    ),
  });
}

function present(user: User): PersonResponse {
  return presentPerson({
    ...user,
    disabledAt: user.disabledAt ?? null,
    hasPassword: typeof user.passwordHash === 'string',
    lastSeenAt: null,
  });
}
