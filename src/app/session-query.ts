import { getSession, type Session } from '#shared/api/accounts.ts';
import { queryOptions, useQuery, type QueryClient } from '@tanstack/react-query';
import { call } from './api-client.ts';
import { writeSignedInHint } from './signed-in-hint.ts';

export const visitorSession: Session = { user: null, studios: [] };

/** Who is signed in. */
export const sessionQuery = queryOptions({
  queryKey: ['session'],
  queryFn: async ({ signal }): Promise<Session> => {
    const session = await call(getSession, {}, signal);
    writeSignedInHint(session.user !== null);
    return session;
  },
  staleTime: 60_000,
});

export function useSession() {
  return useQuery(sessionQuery);
}

/** After signing in, out, or a changed membership: what was read as somebody else is dropped. */
export function replaceSession(client: QueryClient, session: Session): void {
  writeSignedInHint(session.user !== null);
  client.removeQueries({ predicate: (query) => query.queryKey[0] !== sessionQuery.queryKey[0] });
  client.setQueryData(sessionQuery.queryKey, session);
}
