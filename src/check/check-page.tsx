import { useQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import type { Edition } from '#shared/api/rules.ts';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import { usePageTitle } from '../app/page-title.ts';
import { Page } from '../app/shell.tsx';
import { editionQuery } from '../routes/rules/rules.tsx';
import { LoadingState } from '../ui/states.tsx';
import { BenchScreen } from './bench-screen.tsx';
import { projectRulesQuery } from './project-rules.ts';

/**
 * `/check`: the bench. `?rules=<slug>/<edition>` checks against a published edition,
 * `?project=<id>` against the one the project is held to; otherwise the default rules.
 */
export function CheckPage() {
  usePageTitle('Check a folder');
  const [params] = useSearchParams();
  const projectId = params.get('project');
  const rules = params.get('rules');
  if (projectId !== null) return <ProjectBench projectId={projectId} songId={params.get('song')} />;
  if (rules !== null) return <EditionBench rules={rules} />;
  return <BenchScreen rules={defaultRules} edition={null} projectId={null} />;
}

function EditionBench({ rules }: { rules: string }) {
  const [slug = '', number = 'latest'] = rules.split('/');
  const { data } = useQuery(editionQuery(slug, number === 'latest' ? number : Number(number)));
  return data ? <WithEdition edition={data} projectId={null} /> : <LoadingRules />;
}

function ProjectBench({ projectId }: { projectId: string; songId: string | null }) {
  const { data } = useQuery(projectRulesQuery(projectId));
  if (data === undefined) return <LoadingRules />;
  if (data === null)
    return <BenchScreen rules={defaultRules} edition={null} projectId={projectId} />;
  return <WithEdition edition={data} projectId={projectId} />;
}

function WithEdition({ edition, projectId }: { edition: Edition; projectId: string | null }) {
  return <BenchScreen rules={edition.rules} edition={edition} projectId={projectId} />;
}

function LoadingRules() {
  return (
    <Page>
      <LoadingState words="Loading the house rules…" />
    </Page>
  );
}
