/** The sign-in page's address, with the way back to where the person was. */
export function signInPath(location: { pathname: string; search: string }): string {
  return `/sign-in?next=${encodeURIComponent(location.pathname + location.search)}`;
}

/**
 * Where to go after signing in: a path of our own, or undefined. An address that leads to
 * another site (`//evil.example`, `/\evil.example`, `https:`) is never followed.
 */
export function safeNextPath(search: string): string | undefined {
  const next = new URLSearchParams(search).get('next');
  if (next === null || !/^\/(?![/\\])/.test(next)) return undefined;
  const here = 'https://flightcase.example';
  if (!URL.canParse(next, here)) return undefined;
  const url = new URL(next, here);
  return url.origin === here ? url.pathname + url.search + url.hash : undefined;
}
