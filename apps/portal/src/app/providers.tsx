import { QueryClientProvider } from '@tanstack/react-query';
import { useEffect, useState, type ReactNode } from 'react';
import { BrowserRouter } from 'react-router-dom';
import { onSignedOut } from '../lib/api-client.ts';
import { createQueryClient } from '../lib/query-client.ts';
import { forgetSession, onSessionChangedElsewhere } from '../lib/session-change.ts';
import { sessionKey } from '../lib/session.ts';

export function Providers({ children }: { children: ReactNode }) {
  const [client] = useState(createQueryClient);

  useEffect(() => {
    const stopHearingServer = onSignedOut(() => {
      if (client.getQueryData(sessionKey)) forgetSession(client);
    });
    const stopHearingTabs = onSessionChangedElsewhere(() => void client.resetQueries());
    return () => {
      stopHearingServer();
      stopHearingTabs();
    };
  }, [client]);

  return (
    <QueryClientProvider client={client}>
      <BrowserRouter>{children}</BrowserRouter>
    </QueryClientProvider>
  );
}
