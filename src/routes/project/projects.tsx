import { listMyProjects } from '#shared/api/projects.ts';
import { call } from '../../app/api-client.ts';
import { ListBody, usePagedList } from '../../app/paged-list.tsx';
import { usePageTitle } from '../../app/page-title.ts';
import { Page } from '../../app/shell.tsx';
import { ButtonLink } from '../../ui/button.tsx';
import { PageHeader } from '../../ui/page-header.tsx';
import { Panel } from '../../ui/panel.tsx';
import { EmptyState } from '../../ui/states.tsx';
import { ProjectRows } from './project-rows.tsx';

/** `/projects`: every project one belongs to, whatever one is there. */
export function ProjectsPage() {
  usePageTitle('Projects');
  const projects = usePagedList(['projects'], (query, signal) =>
    call(listMyProjects, { query }, signal),
  );
  const empty = (
    <EmptyState
      title="You are in no project yet."
      action={<ButtonLink to="/check">Check a folder on your own</ButtonLink>}
    >
      An engineer invites you by mail; open its link and the project is listed here.
    </EmptyState>
  );
  return (
    <Page>
      <PageHeader title="Projects" meta="Records and songs you work on with somebody." />
      <Panel flush>
        <ListBody list={projects} words="Loading projects…" empty={empty}>
          {(items) => {
            const shared = items.filter((project) => project.kind === 'studio');
            return shared.length === 0 && !projects.hasNextPage ? (
              empty
            ) : (
              <ProjectRows projects={shared} withStudio />
            );
          }}
        </ListBody>
      </Panel>
    </Page>
  );
}
