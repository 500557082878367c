import { listEditions } from '#shared/api/rules.ts';
import { Link } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { dayWords } from '../../app/moments.ts';
import { ListBody, usePagedList } from '../../app/paged-list.tsx';
import { ButtonLink } from '../../ui/button.tsx';
import { Panel } from '../../ui/panel.tsx';
import { EmptyState } from '../../ui/states.tsx';

/** The published editions of the studio's house rules, newest first. */
export function StudioEditions({ slug }: { slug: string }) {
  const editions = usePagedList(['editions', slug], (query, signal) =>
    call(listEditions, { params: { slug }, query }, signal),
  );
  return (
    <Panel
      title="House rules"
      lead="How files must arrive, as artists read it."
      flush
      actions={
        <ButtonLink to={`/rules/${slug}`} size="small">
          Read them
        </ButtonLink>
      }
    >
      <ListBody
        list={editions}
        words="Loading editions…"
        empty={
          <EmptyState title="Nothing is published yet.">
            Until there is an edition, folders are checked against the default rules.
          </EmptyState>
        }
      >
        {(items) => (
          <ol className="divide-y divide-line">
            {items.map((edition) => (
              <li key={edition.number} className="px-5 py-3.5 sm:px-6">
                <div className="flex flex-wrap items-baseline justify-between gap-x-4">
                  <Link
                    to={`/rules/${slug}/${String(edition.number)}`}
                    className="text-link font-medium"
                  >
                    Edition {edition.number}
                  </Link>
                  <span className="text-small text-ink-2">{dayWords(edition.publishedAt)}</span>
                </div>
                {edition.changeSummary !== '' && (
                  <p className="text-small text-ink-2">{edition.changeSummary}</p>
                )}
              </li>
            ))}
          </ol>
        )}
      </ListBody>
    </Panel>
  );
}
