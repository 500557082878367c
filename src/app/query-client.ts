import { AppError } from '#shared/errors.ts';
import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { replaceSession, visitorSession } from './session-query.ts';

const passing: ReadonlySet<string> = new Set(['offline', 'unavailable']);

/**
 * The cache of what the server said. Failures that may pass by themselves are tried again twice;
 * a session that has ended turns the person into a visitor, and RequireSession does the rest.
 */
export function createQueryClient(): QueryClient {
  const onError = (error: Error) => {
    if (error instanceof AppError && error.code === 'sign-in-required')
      replaceSession(client, visitorSession);
  };
  const client = new QueryClient({
    queryCache: new QueryCache({ onError }),
    mutationCache: new MutationCache({ onError }),
    defaultOptions: {
      queries: {
        staleTime: 15_000,
        retry: (failures, error) =>
          failures < 2 && error instanceof AppError && passing.has(error.code),
        // Our own words for being offline are better than a query that waits in silence.
        networkMode: 'always',
      },
      mutations: { networkMode: 'always' },
    },
  });
  return client;
}

/** The one of this page. It comes with the first page that asks the server for something. */
export const queryClient = createQueryClient();
