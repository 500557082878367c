import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';

export type Crumb = { label: string; to: string };

type PageHeaderProps = {
  title: string;
  /** The way down to this page, outermost first; the page itself is not among them. */
  crumbs?: readonly Crumb[];
  /** One line of figures or one sentence under the title. */
  meta?: ReactNode;
  actions?: ReactNode;
};

/** Title of a page, with where it hangs and what can be done with the whole of it. */
export function PageHeader({ title, crumbs = [], meta, actions }: PageHeaderProps) {
  return (
    <header className="mb-8 flex flex-wrap items-end justify-between gap-x-8 gap-y-4">
      <div className="min-w-0">
        {crumbs.length > 0 && (
          <nav aria-label="Where this page hangs" className="mb-2">
            <ol className="flex flex-wrap gap-x-2 text-small text-ink-2">
              {crumbs.map((crumb, index) => (
                <li key={crumb.to} className="flex gap-2">
                  {index > 0 && <span aria-hidden="true">/</span>}
                  <Link to={crumb.to} className="underline-offset-4 hover:text-ink hover:underline">
                    {crumb.label}
                  </Link>
                </li>
              ))}
            </ol>
          </nav>
        )}
        <h1 className="text-title">{title}</h1>
        {meta !== undefined && <div className="mt-2 text-ink-2">{meta}</div>}
      </div>
      {actions !== undefined && <div className="flex flex-wrap gap-2">{actions}</div>}
    </header>
  );
}
