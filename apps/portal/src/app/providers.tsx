import { QueryClientProvider } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import { BrowserRouter } from 'react-router-dom';
import { createQueryClient } from '../lib/query-client.ts';
import { SessionWatch } from './session-watch.tsx';

export function Providers({ children }: { children: ReactNode }) {
  const [client] = useState(createQueryClient);
  return (
    <QueryClientProvider client={client}>
      <SessionWatch />
      <BrowserRouter>{children}</BrowserRouter>
    </QueryClientProvider>
  );
}
