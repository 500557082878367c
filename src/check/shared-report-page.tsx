import { useQuery } from '@tanstack/react-query';
import { useLocation } from 'react-router-dom';
import { readSharedOverviews, readSharedReport } from '#shared/api/reports.ts';
import { readOverviews } from '#shared/report/stored-overviews.ts';
import { call } from '../app/api-client.ts';
import { dayWords } from '../app/moments.ts';
import { usePageTitle } from '../app/page-title.ts';
import { Page } from '../app/shell.tsx';
import { gunzip } from '../browser/gzip.ts';
import { LoadingState } from '../ui/states.tsx';
import { noOverviews } from './report-page.tsx';
import { rulesWords, StoredReportView } from './stored-report.tsx';

/**
 * `/shared-report#token=…`: a report for whoever has the link. The token stays in the address,
 * because people keep and reload it; as a fragment it is sent to no server on the way.
 */
export function SharedReportPage() {
  const token = new URLSearchParams(useLocation().hash.slice(1)).get('token') ?? '';
  const { data: stored } = useQuery({
    queryKey: ['shared-report', token],
    queryFn: ({ signal }) => call(readSharedReport, { body: { token } }, signal),
    staleTime: Infinity,
    throwOnError: true,
  });
  const { data: overviews } = useQuery({
    queryKey: ['shared-report', token, 'overviews'],
    queryFn: async ({ signal }) => {
      const bytes = await call(readSharedOverviews, { body: { token } }, signal);
      return readOverviews(await gunzip(new Uint8Array(bytes)));
    },
    enabled: stored?.hasOverviews === true,
    staleTime: Infinity,
  });
  usePageTitle(stored?.songTitle ?? 'Report');
  if (!stored) {
    return (
      <Page>
        <LoadingState words="Loading the report…" />
      </Page>
    );
  }
  return (
    <StoredReportView
      stored={stored}
      overviews={overviews ?? noOverviews}
      provenance={`Checked on ${dayWords(stored.createdAt)}, against ${rulesWords(stored)}.`}
    />
  );
}
