import { getProject } from '#shared/api/projects.ts';
import { queryOptions, useQuery } from '@tanstack/react-query';
import { Link, Navigate, useParams } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { dayWords } from '../../app/moments.ts';
import { usePageTitle } from '../../app/page-title.ts';
import { Page } from '../../app/shell.tsx';
import { ButtonLink } from '../../ui/button.tsx';
import { PageHeader } from '../../ui/page-header.tsx';
import { LoadingState } from '../../ui/states.tsx';
import { roleInSentence } from '../people/role-words.ts';
import { ProjectPeople } from './project-people.tsx';
import { ProjectSongs } from './project-songs.tsx';

export function projectQuery(projectId: string) {
  return queryOptions({
    queryKey: ['projects', projectId],
    queryFn: ({ signal }) => call(getProject, { params: { projectId } }, signal),
    throwOnError: true,
  });
}

/** `/projects/:projectId`: its songs with their reports, and the people in it. */
export function ProjectPage() {
  const { projectId = '' } = useParams();
  const { data: project } = useQuery(projectQuery(projectId));
  usePageTitle(project?.title ?? 'Project');
  if (project === undefined)
    return (
      <Page>
        <LoadingState words="Loading the project…" />
      </Page>
    );
  if (project.kind === 'private' || project.studio === null)
    return <Navigate to="/my/checks" replace />;
  const { studio, rulesEditionNumber } = project;
  const worksThere = project.role === 'owner' || project.role === 'assistant';
  return (
    <Page>
      <PageHeader
        title={project.title}
        crumbs={
          worksThere
            ? [{ label: studio.name, to: `/studio/${studio.slug}` }]
            : [{ label: 'Projects', to: '/projects' }]
        }
        meta={
          <p>
            {project.artistName}, mixed at {studio.name}, since {dayWords(project.createdAt)}.{' '}
            {rulesEditionNumber === null ? (
              'The studio had no house rules when it was opened: the default rules hold.'
            ) : (
              <>
                Held to{' '}
                <Link
                  to={`/rules/${studio.slug}/${String(rulesEditionNumber)}`}
                  className="text-link"
                >
                  house rules, edition {rulesEditionNumber}
                </Link>
                .
              </>
            )}{' '}
            You are {roleInSentence[project.role]} here.
          </p>
        }
        actions={
          project.role !== 'assistant' && (
            <ButtonLink kind="primary" to={`/check?project=${project.id}`}>
              Check a folder
            </ButtonLink>
          )
        }
      />
      <div className="grid items-start gap-6 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        <ProjectSongs project={project} />
        <ProjectPeople project={project} />
      </div>
    </Page>
  );
}
