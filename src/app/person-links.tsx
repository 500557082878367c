import { QueryClientProvider } from '@tanstack/react-query';
import { NavLink } from 'react-router-dom';
import { HeaderLinks, headerLinkClass } from './header-links.tsx';
import { queryClient } from './query-client.ts';
import { useSession } from './session-query.ts';
import { SignInLink } from './sign-in-link.tsx';

/** Where a person's studios are reached: the one there is, or the list of them. */
function studioPath(slugs: readonly string[]): string {
  return slugs.length === 1 ? `/studio/${slugs[0] ?? ''}` : '/studio';
}

function Links() {
  const { data: session } = useSession();
  if (session === undefined) return <HeaderLinks />;
  if (session.user === null) return <HeaderLinks corner={<SignInLink />} />;
  return (
    <HeaderLinks
      corner={
        <NavLink
          to="/account"
          className="inline-flex min-h-9 max-w-48 items-center rounded-full border border-edge bg-sheet px-4 text-[0.9375rem] hover:border-ink"
        >
          <span className="truncate">
            <span className="sr-only">Account of</span> {session.user.name}
          </span>
        </NavLink>
      }
    >
      <NavLink to="/my/checks" className={headerLinkClass}>
        My checks
      </NavLink>
      <NavLink to="/projects" className={headerLinkClass}>
        Projects
      </NavLink>
      {session.studios.length > 0 && (
        <NavLink
          to={studioPath(session.studios.map(({ slug }) => slug))}
          className={headerLinkClass}
        >
          Studio
        </NavLink>
      )}
    </HeaderLinks>
  );
}

/** The header of somebody who has signed in with this browser; comes in a script of its own. */
export function PersonLinks() {
  return (
    <QueryClientProvider client={queryClient}>
      <Links />
    </QueryClientProvider>
  );
}
