import { getEdition } from '#shared/api/rules.ts';
import { queryOptions, useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { dayWords } from '../../app/moments.ts';
import { usePageTitle } from '../../app/page-title.ts';
import { Page } from '../../app/shell.tsx';
import { ButtonLink } from '../../ui/button.tsx';
import { PageHeader } from '../../ui/page-header.tsx';
import { LoadingState } from '../../ui/states.tsx';
import { EditionText } from './edition-text.tsx';
import { OtherEditions } from './other-editions.tsx';

/** One published edition; it never changes, only what `latest` means does. */
export function editionQuery(slug: string, number: number | 'latest') {
  return queryOptions({
    queryKey: ['editions', slug, number],
    queryFn: ({ signal }) => call(getEdition, { params: { slug, number } }, signal),
    staleTime: number === 'latest' ? 60_000 : Infinity,
    throwOnError: true,
  });
}

function editionOf(param: string | undefined): number | 'latest' {
  const number = Number(param);
  return Number.isInteger(number) && number >= 1 ? number : 'latest';
}

/** `/rules/:slug` and `/rules/:slug/:edition`: how files must arrive, for whoever has the link. */
export function RulesPage() {
  const { slug = '', edition: editionParam } = useParams();
  const { data: edition } = useQuery(editionQuery(slug, editionOf(editionParam)));
  usePageTitle(edition === undefined ? 'House rules' : `House rules of ${edition.studio.name}`);
  if (edition === undefined)
    return (
      <Page>
        <LoadingState words="Loading the house rules…" />
      </Page>
    );
  const { rules, studio, number, publishedAt } = edition;
  return (
    <Page>
      <PageHeader
        title={rules.title === '' ? `How files must arrive at ${studio.name}` : rules.title}
        meta={
          <p>
            House rules of {studio.name}, edition {number}, published on {dayWords(publishedAt)}.
          </p>
        }
        actions={
          <ButtonLink kind="primary" to={`/check?rules=${studio.slug}/${String(number)}`}>
            Check a folder against these rules
          </ButtonLink>
        }
      />
      <div className="grid items-start gap-x-14 gap-y-10 lg:grid-cols-[minmax(0,1fr)_16rem]">
        <EditionText rules={rules} />
        <aside aria-label="Other editions" className="text-small lg:sticky lg:top-6">
          <OtherEditions slug={studio.slug} shown={number} />
          <p className="mt-5 text-ink-2">
            Nothing to install and no account: the check reads your files inside the browser.{' '}
            <Link to="/" className="text-link">
              What Flightcase does
            </Link>
          </p>
        </aside>
      </div>
    </Page>
  );
}
