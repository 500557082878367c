import { useSyncExternalStore } from 'react';

/**
 * Links in mails carry their secret in the URL fragment (`/confirm#token=…`), which browsers
 * send to no server. It is taken out of the address bar before anything is drawn, so that it is
 * neither copied with the address nor kept in the history, and lives only in this page's memory.
 */
const linkPaths: ReadonlySet<string> = new Set([
  '/confirm',
  '/confirm-address',
  '/reset-password',
  '/invitation',
]);

const tokens = new Map<string, string>();
const listeners = new Set<() => void>();

function takeFromAddress(): void {
  const { pathname, search, hash } = window.location;
  if (!linkPaths.has(pathname) || !hash.startsWith('#token=')) return;
  tokens.set(pathname, hash.slice('#token='.length));
  window.history.replaceState(window.history.state, '', pathname + search);
  for (const listener of listeners) listener();
}

/** Call once, before the router starts; later links opened in the same tab are taken as well. */
export function takeLinkTokens(): void {
  takeFromAddress();
  window.addEventListener('hashchange', takeFromAddress);
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

/** The secret this page was opened with; undefined after a reload, or when there was none. */
export function useLinkToken(pathname: string): string | undefined {
  return useSyncExternalStore(subscribe, () => tokens.get(pathname));
}

/** Forgets a secret that has done its work. */
export function forgetLinkToken(pathname: string): void {
  tokens.delete(pathname);
  for (const listener of listeners) listener();
}
