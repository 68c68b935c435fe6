import { sessionListResponse, sessionResponse, signInRequest } from '@trammel/shared/accounts';
import { id } from '@trammel/shared/primitives';
import { z } from 'zod';
import { csrfToken } from '../../http/csrf.ts';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import { Unauthenticated } from '../../http/problems.ts';
import { presentSession } from './session.presenter.ts';
import { findLivingSession, findOwnSessions } from './sessions.queries.ts';
import { endAllSessions, endSession } from './sessions.service.ts';
import { signIn } from './sign-in.service.ts';

export function sessionsRoutes(router: ApiRouter): void {
  const { core } = router;
  const { authentication, config, db, clock } = core;

  const answer = (sessionId: string) => {
    const living = findLivingSession(db.reader, sessionId, clock.now());
    if (!living) throw new Unauthenticated();
    return presentSession(living.actor, {
      csrfToken: csrfToken(authentication.csrfKey, sessionId),
      expiresAt: living.expiresAt,
      demo: config.demo,
    });
  };

  route(router, {
    method: 'post',
    path: '/session',
    permission: 'public',
    summary: 'Sign in',
    body: signInRequest,
    response: sessionResponse,
    status: 201,
    limit: { max: 60, seconds: 60 },
    handler: async ({ body, req, res }) => {
      const session = await signIn(core, body, req.get('user-agent') ?? '');
      authentication.issue(res, session.id, session.expiresAt);
      return answer(session.id);
    },
  });

  route(router, {
    method: 'get',
    path: '/session',
    permission: 'signed-in',
    summary: 'Who is signed in, and what they may do',
    response: sessionResponse,
    handler: ({ deed }) => answer(deed.actor.sessionId),
  });

  route(router, {
    method: 'delete',
    path: '/session',
    permission: 'signed-in',
    summary: 'Sign out here',
    response: 'nothing',
    handler: async ({ deed, res }) => {
      await endSession(deed, deed.actor.sessionId);
      authentication.clear(res);
    },
  });

  route(router, {
    method: 'get',
    path: '/sessions',
    permission: 'signed-in',
    summary: 'Where you are signed in',
    response: sessionListResponse,
    handler: ({ deed }) => ({ items: findOwnSessions(deed) }),
  });

  route(router, {
    method: 'delete',
    path: '/sessions',
    permission: 'signed-in',
    summary: 'Sign out everywhere',
    response: 'nothing',
    handler: async ({ deed, res }) => {
      await endAllSessions(deed, deed.actor.userId);
      authentication.clear(res);
    },
  });

  route(router, {
    method: 'delete',
    path: '/sessions/:sessionId',
    permission: 'signed-in',
    summary: 'End one of your sessions',
    params: z.strictObject({ sessionId: id }),
    response: 'nothing',
    handler: ({ deed, params }) => endSession(deed, params.sessionId),
  });
}
