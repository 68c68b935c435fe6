import { queryOptions } from '@tanstack/react-query';
import {
  demoPeopleResponse,
  sessionListResponse,
  sessionResponse,
  tokenStateResponse,
  type DemoPeopleResponse,
  type SignInRequest,
} from '@trammel/shared/accounts';
import { call, callForNothing } from '../../lib/api-client.ts';
import { ApiProblem } from '../../lib/api-problem.ts';

export const signIn = (request: SignInRequest) =>
  call('POST', '/api/session', sessionResponse, { body: request });

/** Nobody outside a demonstration: the address then does not exist. */
export const demoPeopleQuery = queryOptions({
  queryKey: ['demo-people'],
  staleTime: Infinity,
  queryFn: async ({ signal }): Promise<DemoPeopleResponse | null> => {
    try {
      return await call('GET', '/api/demo/people', demoPeopleResponse, { signal });
    } catch (error) {
      if (error instanceof ApiProblem && error.is('not-found')) return null;
      throw error;
    }
  },
});

export const sessionsQuery = queryOptions({
  queryKey: ['sessions'],
  queryFn: ({ signal }) => call('GET', '/api/sessions', sessionListResponse, { signal }),
});

export const endOtherSession = (id: string) => callForNothing('DELETE', `/api/sessions/${id}`);

export const changePassword = (body: { currentPassword: string; newPassword: string }) =>
  callForNothing('PUT', '/api/account/password', { body });

export const askForPasswordReset = (email: string) =>
  callForNothing('POST', '/api/password-resets', { body: { email } });

const tokenPath = (token: string) => `/api/account-tokens/${encodeURIComponent(token)}`;

export const tokenQuery = (token: string) =>
  queryOptions({
    queryKey: ['account-token', token],
    queryFn: ({ signal }) => call('GET', tokenPath(token), tokenStateResponse, { signal }),
  });

export const setPassword = (token: string, newPassword: string) =>
  callForNothing('POST', `${tokenPath(token)}/password`, { body: { newPassword } });
