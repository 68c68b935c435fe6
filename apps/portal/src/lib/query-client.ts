import { QueryClient } from '@tanstack/react-query';
import { ApiProblem, ContractBreach, NetworkFailure } from './api-problem.ts';

/** A refusal is final; a lost connection or a busy server is worth another try. */
function isWorthRetrying(failures: number, error: Error): boolean {
  if (error instanceof ContractBreach) return false;
  if (error instanceof ApiProblem) return error.is('unavailable') && failures < 2;
  return error instanceof NetworkFailure && failures < 2;
}

export function createQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: { retry: isWorthRetrying, staleTime: 15_000, refetchOnWindowFocus: true },
      mutations: { retry: false },
    },
  });
}
