import { useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { onSignedOut } from '../lib/api-client.ts';
import { forgetSession, onSessionChangedElsewhere } from '../lib/session-change.ts';
import { sessionKey } from '../lib/session.ts';

/** Notices when the session ends, by the server or in another tab, and forgets what it showed. */
export function SessionWatch() {
  const client = useQueryClient();
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
  return null;
}
