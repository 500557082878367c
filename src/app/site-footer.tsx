import { Link } from 'react-router-dom';
import { ThemeSwitch } from '../ui/theme-switch.tsx';
import { useSignedInHint } from './signed-in-hint.ts';

const linkClass = 'inline-block py-0.5 underline-offset-4 hover:text-ink hover:underline';

/** The frame's lower edge: the caution that belongs under every check, and the colours. */
export function SiteFooter() {
  const mayBeSignedIn = useSignedInHint();
  return (
    <footer className="mt-auto border-t border-line">
      <div className="mx-auto flex max-w-page flex-wrap items-start justify-between gap-x-12 gap-y-5 px-4 py-7 text-small text-ink-2 sm:px-7">
        <p className="max-w-prose">
          A check without findings means that none of these checks found anything. It is no
          guarantee, and it replaces nobody’s ears.
        </p>
        <nav aria-label="Footer">
          <ul className="flex flex-wrap gap-x-6">
            <li>
              <Link to="/check" className={linkClass}>
                Check a folder
              </Link>
            </li>
            <li>
              <Link to="/#engineers" className={linkClass}>
                For engineers
              </Link>
            </li>
            {!mayBeSignedIn && (
              <li>
                <Link to="/register" className={linkClass}>
                  Make an account
                </Link>
              </li>
            )}
          </ul>
        </nav>
        <ThemeSwitch />
      </div>
    </footer>
  );
}
