import type { ReactNode } from 'react';
import { NavLink } from 'react-router-dom';

export const headerLinkClass =
  'inline-flex min-h-9 items-center rounded px-2 sm:px-3 text-[0.9375rem] whitespace-nowrap text-ink-2 hover:bg-wash hover:text-ink aria-[current=page]:bg-wash aria-[current=page]:font-medium aria-[current=page]:text-ink';

type HeaderLinksProps = {
  /** Links after "Check a folder", for people who are signed in. */
  children?: ReactNode;
  /** What stands in the right corner: sign in, or the person. */
  corner?: ReactNode;
};

/** Where one can go, and the corner; on a phone several links get a line of their own. */
export function HeaderLinks({ children, corner }: HeaderLinksProps) {
  const ownLine =
    'max-md:order-last max-md:-mx-2 max-md:w-[calc(100%+1rem)] max-md:overflow-x-auto';
  return (
    <>
      <nav
        aria-label="Main"
        className={`flex min-w-0 gap-0.5 md:grow ${children === undefined ? 'max-md:ml-auto' : ownLine}`}
      >
        <NavLink to="/check" className={headerLinkClass}>
          Check a folder
        </NavLink>
        {children}
      </nav>
      <div className="md:ml-auto">{corner}</div>
    </>
  );
}
