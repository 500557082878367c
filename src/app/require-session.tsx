import { Navigate, Outlet, useLocation } from 'react-router-dom';
import { LoadingState } from '../ui/states.tsx';
import { ErrorPanel } from './error-panel.tsx';
import { signInPath } from './next-path.ts';
import { useSession } from './session-query.ts';
import { Page } from './shell.tsx';

/** Pages inside need somebody signed in; a visitor is sent to sign in and brought back. */
export function RequireSession() {
  const session = useSession();
  const location = useLocation();
  if (session.isPending)
    return (
      <Page>
        <LoadingState words="Looking who is signed in…" />
      </Page>
    );
  if (session.isError)
    return (
      <Page narrow>
        <ErrorPanel error={session.error} onRetry={() => void session.refetch()} />
      </Page>
    );
  if (session.data.user === null) return <Navigate to={signInPath(location)} replace />;
  return <Outlet />;
}

/** The signed-in person, inside RequireSession. */
export function useUser() {
  const user = useSession().data?.user;
  if (user == null) throw new Error('useUser() is for pages inside RequireSession');
  return user;
}
