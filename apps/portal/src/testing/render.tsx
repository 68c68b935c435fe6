import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render, type RenderResult } from '@testing-library/react';
import type { SessionResponse } from '@trammel/shared/accounts';
import { Suspense, type ReactNode } from 'react';
import { MemoryRouter, Route, Routes, useLocation } from 'react-router-dom';
import { setCsrfToken } from '../lib/api-client.ts';
import { sessionKey } from '../lib/session.ts';

export interface RenderOptions {
  /** Address that is shown. */
  at?: string;
  /** Pattern of the route, when the page reads parameters. */
  route?: string;
  /** Null for nobody; left out where the page asks the fake API itself. */
  session?: SessionResponse | null;
}

export interface RenderedPage extends RenderResult {
  client: QueryClient;
  /** Address now. */
  address: () => string;
}

/** Shows an element with router, query cache and, where given, a signed-in person. */
export function renderPage(
  element: ReactNode,
  { at = '/', route = '*', session }: RenderOptions = {},
): RenderedPage {
  const client = new QueryClient({ defaultOptions: { queries: { retry: false, staleTime: 60_000 } } });
  if (session !== undefined) {
    client.setQueryData(sessionKey, session);
    setCsrfToken(session?.csrfToken ?? null);
  }
  let address = at;
  const Address = () => {
    const location = useLocation();
    address = location.pathname + location.search;
    return null;
  };
  const result = render(
    <QueryClientProvider client={client}>
      <MemoryRouter initialEntries={[at]}>
        <Address />
        <Suspense fallback="Loading">
          <Routes>
            <Route path={route} element={element} />
            <Route path="*" element={null} />
          </Routes>
        </Suspense>
      </MemoryRouter>
    </QueryClientProvider>,
  );
  return { ...result, client, address: () => address };
}
