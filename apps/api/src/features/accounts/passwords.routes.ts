import {
  changePasswordRequest,
  passwordResetRequest,
  setPasswordRequest,
  tokenParams,
  tokenStateResponse,
} from '@trammel/shared/accounts';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import { askForReset, changePassword, readToken, setPasswordByToken } from './passwords.service.ts';

const limit = { max: 20, seconds: 300 };

export function passwordsRoutes(router: ApiRouter): void {
  const { hashing } = router.core;

  route(router, {
    method: 'put',
    path: '/account/password',
    permission: 'signed-in',
    summary: 'Change your password',
    body: changePasswordRequest,
    response: 'nothing',
    limit,
    handler: ({ deed, body }) => changePassword(deed, hashing, body),
  });

  route(router, {
    method: 'post',
    path: '/password-resets',
    permission: 'public',
    summary: 'Ask for a link to set a new password',
    body: passwordResetRequest,
    response: 'nothing',
    limit,
    handler: ({ deed, body }) => askForReset(deed, body.email),
  });

  route(router, {
    method: 'get',
    path: '/account-tokens/:token',
    permission: 'public',
    summary: 'Whom the link of an invitation or reset belongs to',
    params: tokenParams,
    response: tokenStateResponse,
    limit: { max: 60, seconds: 300 },
    handler: ({ deed, params }) => readToken(deed.reader, params.token, deed.now),
  });

  route(router, {
    method: 'post',
    path: '/account-tokens/:token/password',
    permission: 'public',
    summary: 'Choose a password: accepts an invitation or ends a reset',
    params: tokenParams,
    body: setPasswordRequest,
    response: 'nothing',
    limit,
    handler: ({ deed, params, body }) => setPasswordByToken(deed, hashing, params.token, body.newPassword),
  });
}
