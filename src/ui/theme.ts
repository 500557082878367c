import { useSyncExternalStore } from 'react';

/** What a person may choose; `system` follows the device. */
export type ThemeChoice = 'system' | 'light' | 'dark';

/** Also read by src/public/theme.js before the page paints; a test keeps the two the same. */
export const themeStorageKey = 'flightcase-theme';

const listeners = new Set<() => void>();

function readChoice(): ThemeChoice {
  const chosen = document.documentElement.dataset['theme'];
  return chosen === 'light' || chosen === 'dark' ? chosen : 'system';
}

/** Applies the choice at once and remembers it where the browser allows that. */
export function chooseTheme(choice: ThemeChoice): void {
  if (choice === 'system') delete document.documentElement.dataset['theme'];
  else document.documentElement.dataset['theme'] = choice;
  try {
    if (choice === 'system') localStorage.removeItem(themeStorageKey);
    else localStorage.setItem(themeStorageKey, choice);
  } catch {
    // Storage may be forbidden; the choice then lasts as long as the page.
  }
  for (const listener of listeners) listener();
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function useThemeChoice(): ThemeChoice {
  return useSyncExternalStore(subscribe, readChoice);
}

/** The colour a token has now, as the browser resolves it: for canvas, which knows no variables. */
export function readTokenColor(token: string, within: Element = document.body): string {
  const probe = document.createElement('span');
  probe.style.color = `var(--${token})`;
  within.append(probe);
  const color = getComputedStyle(probe).color;
  probe.remove();
  return color;
}

/**
 * Calls back when the colours change, by choice or by the system; returns how to stop.
 * Pictures on canvas are drawn again then.
 */
export function onThemeChange(listener: () => void): () => void {
  const system = matchMedia('(prefers-color-scheme: dark)');
  system.addEventListener('change', listener);
  const unsubscribe = subscribe(listener);
  return () => {
    system.removeEventListener('change', listener);
    unsubscribe();
  };
}
