import { useSyncExternalStore } from 'react';

const storageKey = 'flightcase-signed-in';
const listeners = new Set<() => void>();

function readHint(): boolean {
  try {
    return localStorage.getItem(storageKey) === 'yes';
  } catch {
    return false;
  }
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

/** Whether somebody signed in with this browser; a hint for what to load, never a permission. */
export function useSignedInHint(): boolean {
  return useSyncExternalStore(subscribe, readHint);
}

/** Remembered whenever the server has said who is signed in. */
export function writeSignedInHint(signedIn: boolean): void {
  try {
    if (signedIn) localStorage.setItem(storageKey, 'yes');
    else localStorage.removeItem(storageKey);
  } catch {
    // Storage may be forbidden; then the header keeps offering to sign in.
  }
  for (const listener of listeners) listener();
}
