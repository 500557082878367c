/// <reference lib="webworker" />

/** What the build knows: every file the application needs, and a name for this set of them. */
export type AppShell = { version: string; files: string[] };

const cachePrefix = 'flightcase-';

/** Keeps the application's files, so that it opens without a network. Missing ones come later. */
export async function keepShell({ version, files }: AppShell): Promise<void> {
  const cache = await caches.open(cachePrefix + version);
  const keep = async (address: string): Promise<void> => {
    const answer = await fetch(address, { cache: 'no-cache' }).catch(() => null);
    if (answer?.ok) await cache.put(address, answer);
  };
  await Promise.all(['/', ...files].map(keep));
}

/** Lets go of the files of earlier versions. */
export async function dropOldShells({ version }: AppShell): Promise<void> {
  for (const name of await caches.keys()) {
    if (name.startsWith(cachePrefix) && name !== cachePrefix + version) await caches.delete(name);
  }
}

/**
 * The answer to a request for a part of the application; null for everything else, the API above
 * all. Pages come from the network and from the cache without one; files with a hash in their
 * names never change, so they come from the cache.
 */
export function answerFromShell(
  { version, files }: AppShell,
  request: Request,
): Promise<Response> | null {
  const { pathname } = new URL(request.url);
  if (request.method !== 'GET' || pathname.startsWith('/api/')) return null;
  const cache = (): Promise<Cache> => caches.open(cachePrefix + version);
  if (request.mode === 'navigate') {
    return fetch(request).catch(async (cause: unknown) => {
      const kept = await (await cache()).match('/');
      if (!kept) throw cause;
      return kept;
    });
  }
  if (!files.includes(pathname)) return null;
  return cache().then(async (kept) => {
    const known = await kept.match(pathname);
    if (known) return known;
    const answer = await fetch(request);
    if (answer.ok) await kept.put(pathname, answer.clone());
    return answer;
  });
}
