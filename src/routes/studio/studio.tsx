import { getStudio } from '#shared/api/studios.ts';
import { queryOptions, useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { dayWords } from '../../app/moments.ts';
import { usePageTitle } from '../../app/page-title.ts';
import { Page } from '../../app/shell.tsx';
import { PageHeader } from '../../ui/page-header.tsx';
import { LoadingState } from '../../ui/states.tsx';
import { StudioEditions } from './studio-editions.tsx';
import { StudioMembers } from './studio-members.tsx';
import { StudioProjects } from './studio-projects.tsx';

export function studioQuery(slug: string) {
  return queryOptions({
    queryKey: ['studios', slug],
    queryFn: ({ signal }) => call(getStudio, { params: { slug } }, signal),
    // Nothing to see here is said by the not-found page of the nearest boundary.
    throwOnError: true,
  });
}

/** `/studio/:slug`: the studio's projects, its rules and the people in it. */
export function StudioPage() {
  const { slug = '' } = useParams();
  const { data: studio } = useQuery(studioQuery(slug));
  usePageTitle(studio?.name ?? 'Studio');
  if (studio === undefined)
    return (
      <Page>
        <LoadingState words="Loading the studio…" />
      </Page>
    );
  const owns = studio.role === 'owner';
  return (
    <Page>
      <PageHeader
        title={studio.name}
        crumbs={[{ label: 'Studios', to: '/studio' }]}
        meta={
          owns
            ? `You founded it on ${dayWords(studio.createdAt)}.`
            : 'You assist here, on the projects you were put on.'
        }
      />
      <div className="grid items-start gap-6 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        <StudioProjects studio={studio} />
        <div className="flex flex-col gap-6">
          <StudioEditions slug={studio.slug} />
          {owns && <StudioMembers studioId={studio.id} />}
        </div>
      </div>
    </Page>
  );
}
