import { useId, type ReactNode } from 'react';

type PanelProps = {
  /** Heading of the panel; the section is labelled by it. */
  title?: ReactNode;
  /** One quiet sentence under the heading. */
  lead?: ReactNode;
  /** Buttons on the heading's line. */
  actions?: ReactNode;
  /** Let the content touch the edges, for lists and tables. */
  flush?: boolean;
  children?: ReactNode;
  className?: string;
};

/** A sheet lying on the paper. */
export function Panel({
  title,
  lead,
  actions,
  flush = false,
  children,
  className = '',
}: PanelProps) {
  const headingId = useId();
  return (
    <section
      aria-labelledby={title === undefined ? undefined : headingId}
      className={`rounded-panel border border-line bg-sheet ${className}`}
    >
      {title !== undefined && (
        <header
          className={`flex flex-wrap items-center justify-between gap-x-4 gap-y-2 px-5 pt-4 sm:px-6 ${flush ? 'pb-4' : ''}`}
        >
          <div>
            <h2 id={headingId} className="text-heading">
              {title}
            </h2>
            {lead !== undefined && <p className="text-small text-ink-2">{lead}</p>}
          </div>
          {actions}
        </header>
      )}
      <div className={flush ? 'border-t border-line' : 'px-5 py-5 sm:px-6'}>{children}</div>
    </section>
  );
}
