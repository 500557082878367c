import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { Edition } from '#shared/api/rules.ts';
import { usePageTitle } from '../app/page-title.ts';
import { Page } from '../app/shell.tsx';
import { editionQuery } from '../routes/rules/rules.tsx';
import { LoadingState } from '../ui/states.tsx';
import { BenchScreen } from './bench-screen.tsx';
import { unpublishedRules, type CheckRules } from './check-rules.ts';
import { useOffline } from './use-offline.ts';
import { projectRulesQuery } from './project-rules.ts';

/**
 * `/check`: the bench. `?rules=<slug>/<edition>` checks against a published edition,
 * `?project=<id>` against the one the project is held to; otherwise the default rules, or those in
 * a file. What lies on the bench stays there when the rules change.
 */
export function CheckPage() {
  usePageTitle('Check a folder');
  useOffline();
  const [params] = useSearchParams();
  const projectId = params.get('project');
  const edition = useEditionOf(projectId, params.get('rules'));
  const [fromFile, setFromFile] = useState<CheckRules | null>(null);
  const published = usePublished(edition);
  if (published === undefined) {
    return (
      <Page>
        <LoadingState words="Loading the house rules…" />
      </Page>
    );
  }
  return <BenchScreen rules={fromFile ?? published} projectId={projectId} onRules={setFromFile} />;
}

/** The edition of the address: undefined while it is loaded, null where there is none. */
function useEditionOf(projectId: string | null, rules: string | null): Edition | null | undefined {
  const [slug = '', number = 'latest'] = (rules ?? '').split('/');
  const ofProject = useQuery({
    ...projectRulesQuery(projectId ?? ''),
    enabled: projectId !== null,
    placeholderData: keepPreviousData,
  });
  const ofLink = useQuery({
    ...editionQuery(slug, number === 'latest' ? number : Number(number)),
    enabled: projectId === null && rules !== null,
    placeholderData: keepPreviousData,
  });
  if (projectId !== null) return ofProject.data;
  return rules === null ? null : ofLink.data;
}

/** The same object for the same edition, so that nothing is judged again without a reason. */
function usePublished(edition: Edition | null | undefined): CheckRules | undefined {
  const [last, setLast] = useState<CheckRules>();
  if (edition === undefined) return last;
  if (edition === null) return unpublishedRules;
  if (last?.edition === edition) return last;
  const made: CheckRules = { rules: edition.rules, edition, fileName: null };
  setLast(made);
  return made;
}
