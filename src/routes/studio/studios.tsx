import { listMyStudios } from '#shared/api/studios.ts';
import { Link } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { ListBody, usePagedList } from '../../app/paged-list.tsx';
import { usePageTitle } from '../../app/page-title.ts';
import { Page } from '../../app/shell.tsx';
import { ButtonLink } from '../../ui/button.tsx';
import { PageHeader } from '../../ui/page-header.tsx';
import { Panel } from '../../ui/panel.tsx';
import { EmptyState } from '../../ui/states.tsx';

/** `/studio`: the studios one owns or works for, and founding one. */
export function StudiosPage() {
  usePageTitle('Studios');
  const studios = usePagedList(['studios'], (query, signal) =>
    call(listMyStudios, { query }, signal),
  );
  return (
    <Page>
      <PageHeader
        title="Studios"
        meta="The ones you own or work for."
        actions={<ButtonLink to="/found-studio">Found a studio</ButtonLink>}
      />
      <Panel flush>
        <ListBody
          list={studios}
          words="Loading studios…"
          empty={
            <EmptyState
              title="You have no studio yet."
              action={
                <ButtonLink to="/found-studio" kind="primary">
                  Found a studio
                </ButtonLink>
              }
            >
              Engineers found one to say once how files must arrive. Artists need none: an engineer
              invites them to a project.
            </EmptyState>
          }
        >
          {(items) => (
            <ul className="divide-y divide-line">
              {items.map((studio) => (
                <li
                  key={studio.id}
                  className="flex flex-wrap justify-between gap-3 px-5 py-4 sm:px-6"
                >
                  <Link to={`/studio/${studio.slug}`} className="text-link font-medium">
                    {studio.name}
                  </Link>
                  <span className="text-ink-2">
                    {studio.role === 'owner' ? 'you own it' : 'you assist'}
                  </span>
                </li>
              ))}
            </ul>
          )}
        </ListBody>
      </Panel>
    </Page>
  );
}
