import { permissionsOf } from '@trammel/shared/roles';
import type { SessionResponse } from '@trammel/shared/accounts';
import type { Actor } from '../../http/actor.ts';

export function presentSession(
  actor: Omit<Actor, 'permissions' | 'sessionId'>,
  session: { csrfToken: string; expiresAt: string; demo: boolean },
): SessionResponse {
  return {
    user: {
      id: actor.userId,
      name: actor.name,
      email: actor.email,
      title: actor.title,
      roles: [...actor.roles],
      maySign: actor.maySign,
    },
    organisation: { id: actor.organisationId, name: actor.organisationName },
    permissions: permissionsOf(actor.roles, actor.maySign),
    ...session,
  };
}
