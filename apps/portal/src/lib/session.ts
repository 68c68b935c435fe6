import { queryOptions, useQuery, useSuspenseQuery } from '@tanstack/react-query';
import type { SessionResponse } from '@trammel/shared/accounts';
import type { Permission, Role } from '@trammel/shared/roles';
import { call, setCsrfToken } from './api-client.ts';
import { ApiProblem } from './api-problem.ts';
import { paths } from './paths.ts';

export const sessionKey = ['session'] as const;

/** Who is signed in; null for nobody. The schema is fetched for an answer only: it is a fifth of the first load. */
export const sessionQuery = queryOptions({
  queryKey: sessionKey,
  staleTime: 60_000,
  queryFn: async ({ signal }): Promise<SessionResponse | null> => {
    try {
      const answer = await call('GET', '/api/session', { parse: (value) => value }, { signal });
      const { sessionResponse } = await import('@trammel/shared/accounts');
      const parsed = sessionResponse.parse(answer);
      setCsrfToken(parsed.csrfToken);
      return parsed;
    } catch (error) {
      if (error instanceof ApiProblem && error.status === 401) return null;
      throw error;
    }
  },
});

/** For pages behind sign-in: the layout has already made sure that somebody is there. */
export function useSession(): SessionResponse {
  const { data } = useSuspenseQuery(sessionQuery);
  if (data === null) throw new Error('This page needs a signed-in person.');
  return data;
}

export function useMaybeSession(): SessionResponse | null {
  return useQuery(sessionQuery).data ?? null;
}

export function useMay(permission: Permission): boolean {
  return useMaybeSession()?.permissions.includes(permission) ?? false;
}

const deskOf: Record<Role, string> = {
  'quality-reviewer': paths.reviewDesk,
  'supplier-quality': paths.worklist,
  purchasing: paths.buyingStatus,
  administrator: paths.people,
};

const byFirstQuestion: readonly Role[] = [
  'quality-reviewer',
  'supplier-quality',
  'purchasing',
  'administrator',
];

/** The page that answers a person's first question. */
export function deskFor(held: readonly Role[]): string {
  const first = byFirstQuestion.find((role) => held.includes(role));
  return first === undefined ? paths.account : deskOf[first];
}

export const roleWords: Record<Role, string> = {
  administrator: 'Administrator',
  'quality-reviewer': 'Quality reviewer',
  purchasing: 'Purchasing',
  'supplier-quality': 'Supplier quality',
};
