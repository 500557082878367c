import { NavLink, useLocation } from 'react-router-dom';
import { headerLinkClass } from './header-links.tsx';
import { signInPath } from './next-path.ts';

/** Pages from which signing in leads to one's own place and not back to them. */
const notReturnedTo: ReadonlySet<string> = new Set([
  '/',
  '/sign-in',
  '/register',
  '/confirm',
  '/forgot-password',
  '/reset-password',
  '/confirm-address',
]);

export function SignInLink() {
  const location = useLocation();
  return (
    <NavLink
      to={notReturnedTo.has(location.pathname) ? '/sign-in' : signInPath(location)}
      className={headerLinkClass}
    >
      Sign in
    </NavLink>
  );
}
