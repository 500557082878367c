import { queryOptions, useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { useParams } from 'react-router-dom';
import { getOverviews, getReport, type StoredReport } from '#shared/api/reports.ts';
import type { Overview } from '#shared/measure/overview.ts';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import { readOverviews } from '#shared/report/stored-overviews.ts';
import { call } from '../app/api-client.ts';
import { dayWords } from '../app/moments.ts';
import { usePageTitle } from '../app/page-title.ts';
import { Page } from '../app/shell.tsx';
import { gunzip } from '../browser/gzip.ts';
import { ErrorNotice, LoadingState } from '../ui/states.tsx';
import { ReportHeader } from './report-header.tsx';
import { ReportView } from './report-view.tsx';
import { inGroupOrder } from './viewed-session.ts';

const noOverviews: ReadonlyMap<string, Overview> = new Map();

function reportQuery(reportId: string) {
  return queryOptions({
    queryKey: ['reports', reportId],
    queryFn: ({ signal }) => call(getReport, { params: { reportId } }, signal),
    // A stored report never changes.
    staleTime: Infinity,
    throwOnError: true,
  });
}

function overviewsQuery(reportId: string) {
  return queryOptions({
    queryKey: ['reports', reportId, 'overviews'],
    queryFn: async ({ signal }) =>
      readOverviews(
        await gunzip(new Uint8Array(await call(getOverviews, { params: { reportId } }, signal))),
      ),
    staleTime: Infinity,
  });
}

/** `/reports/:reportId`: a stored report, with its picture. */
export function ReportPage() {
  const { reportId = '' } = useParams();
  const { data: stored } = useQuery(reportQuery(reportId));
  const { data: overviews } = useQuery({
    ...overviewsQuery(reportId),
    enabled: stored?.hasOverviews === true,
  });
  usePageTitle(stored?.songTitle ?? 'Report');
  const view = useMemo(
    () =>
      stored && {
        ...stored.report,
        files: inGroupOrder(stored.report.files, defaultRules),
      },
    [stored],
  );
  if (!stored || !view) {
    return (
      <Page>
        <LoadingState words="Loading the report…" />
      </Page>
    );
  }
  return (
    <div className="flex grow flex-col">
      <ReportHeader title={stored.songTitle} view={view} />
      <div className="px-4 pb-6 text-small text-ink-2 sm:px-7">
        <p>{provenance(stored)}</p>
        <Differences stored={stored} />
      </div>
      <ReportView view={view} overviews={overviews ?? noOverviews} />
    </div>
  );
}

function provenance({ createdBy, createdAt, rulesEdition }: StoredReport): string {
  const rules = rulesEdition
    ? `the house rules of ${rulesEdition.studioName}, edition ${String(rulesEdition.number)}`
    : 'rules that no studio published';
  return `Checked by ${createdBy.name} on ${dayWords(createdAt)}, against ${rules}.`;
}

/** What the server found when it judged the same measures itself. */
function Differences({ stored }: { stored: StoredReport }) {
  if (stored.judgedAgain === 'same') return <p>Judged again here, with the same result.</p>;
  if (stored.judgedAgain === 'not-compared') {
    return <p>Made by another version of Flightcase, so it was not judged again.</p>;
  }
  return (
    <ErrorNotice title="This report says something else than its own measures.">
      <ul className="list-disc ps-5">
        {stored.differences.map(({ code, files, sentLevel, judgedLevel }) => (
          <li key={`${code} ${files.join()}`}>
            {code.replaceAll('-', ' ')} {files.join(', ')}: sent as{' '}
            {sentLevel?.replace('-', ' ') ?? 'nothing'}, judged as{' '}
            {judgedLevel?.replace('-', ' ') ?? 'nothing'}
          </li>
        ))}
      </ul>
    </ErrorNotice>
  );
}
