import type { QueryClient } from '@tanstack/react-query';
import type { SessionResponse } from '@trammel/shared/accounts';
import { callForNothing, setCsrfToken } from './api-client.ts';
import { dropDrafts } from './draft-storage.ts';
import { sessionKey } from './session.ts';

const channelName = 'trammel.session';

/** Nothing of the person before is left in memory or storage when somebody signs in. */
export function beginSession(client: QueryClient, session: SessionResponse): void {
  forgetData(client);
  dropDrafts(session.user.id);
  setCsrfToken(session.csrfToken);
  client.setQueryData(sessionKey, session);
  tellOtherTabs();
}

/** Signing out by a person: drafts go too. */
export async function endSession(client: QueryClient, where: 'here' | 'everywhere' = 'here'): Promise<void> {
  await callForNothing('DELETE', where === 'here' ? '/api/session' : '/api/sessions');
  dropDrafts();
  forgetSession(client);
  tellOtherTabs();
}

/** The session ended by itself: what was typed stays in this browser for the same person. */
export function forgetSession(client: QueryClient): void {
  setCsrfToken(null);
  forgetData(client);
  client.setQueryData(sessionKey, null);
}

/** All but the session itself, which the layout watches in order to leave the page. */
function forgetData(client: QueryClient): void {
  client.removeQueries({ predicate: (query) => query.queryKey[0] !== sessionKey[0] });
  client.getMutationCache().clear();
}

function tellOtherTabs(): void {
  if (typeof BroadcastChannel === 'undefined') return;
  const channel = new BroadcastChannel(channelName);
  channel.postMessage('changed');
  channel.close();
}

/** Another tab signed in or out: this one must not go on showing what the person before could see. */
export function onSessionChangedElsewhere(listener: () => void): () => void {
  if (typeof BroadcastChannel === 'undefined') return () => undefined;
  const channel = new BroadcastChannel(channelName);
  channel.onmessage = listener;
  return () => channel.close();
}
