import { lazy, Suspense } from 'react';
import { Link } from 'react-router-dom';
import { HeaderLinks } from './header-links.tsx';
import { SignInLink } from './sign-in-link.tsx';
import { useSignedInHint } from './signed-in-hint.ts';
import { Wordmark } from './wordmark.tsx';

const PersonLinks = lazy(async () => ({
  default: (await import('./person-links.tsx')).PersonLinks,
}));

/**
 * The frame's upper edge: who we are, where one can go, who is signed in. The session is asked
 * for only where somebody has signed in with this browser before, so that a visitor's first page
 * needs neither the request nor the script for it.
 */
export function SiteHeader() {
  const mayBeSignedIn = useSignedInHint();
  return (
    <header className="border-b border-line">
      <div className="mx-auto flex max-w-page flex-wrap items-center gap-x-1 gap-y-1 px-4 sm:gap-x-4 py-2.5 sm:px-7">
        <Link
          to="/"
          className="mr-auto flex min-h-9 items-center rounded md:mr-3"
          aria-label="Flightcase, front page"
        >
          <Wordmark />
        </Link>
        {mayBeSignedIn ? (
          <Suspense fallback={<HeaderLinks />}>
            <PersonLinks />
          </Suspense>
        ) : (
          <HeaderLinks corner={<SignInLink />} />
        )}
      </div>
    </header>
  );
}
