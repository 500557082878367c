import { Link } from 'react-router-dom';
import { usePageTitle } from '../../app/page-title.ts';
import { useUser } from '../../app/require-session.tsx';
import { useSession } from '../../app/session-query.ts';
import { Page } from '../../app/shell.tsx';
import { ButtonLink } from '../../ui/button.tsx';
import { PageHeader } from '../../ui/page-header.tsx';
import { Panel } from '../../ui/panel.tsx';
import { ProjectSongs } from '../project/project-songs.tsx';

/** `/my/checks`: songs one checks for oneself; they live in a project nobody else sees. */
export function MyChecksPage() {
  usePageTitle('My checks');
  const user = useUser();
  const hasStudio = (useSession().data?.studios.length ?? 0) > 0;
  return (
    <Page>
      <PageHeader
        title="My checks"
        meta="Songs you check for yourself. Nobody else sees them unless you share a report."
        actions={
          <ButtonLink to="/check" kind="primary">
            Check a folder
          </ButtonLink>
        }
      />
      <div className="grid items-start gap-6 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        <ProjectSongs
          project={{ id: user.privateProjectId, role: 'owner' }}
          emptyTitle="No song checked yet."
        />
        <div className="flex flex-col gap-6">
          <Panel title="Working with an engineer?">
            <p className="text-ink-2">
              Their invitation comes by mail and leads to a{' '}
              <Link to="/projects" className="text-link">
                project
              </Link>{' '}
              of yours. Songs there are checked against the engineer’s own rules.
            </p>
          </Panel>
          {!hasStudio && (
            <Panel title="Mixing for others?">
              <p className="mb-4 text-ink-2">
                Found a studio, say once how files must arrive, and invite the artists you work for.
              </p>
              <ButtonLink to="/found-studio">Found a studio</ButtonLink>
            </Panel>
          )}
        </div>
      </div>
    </Page>
  );
}
