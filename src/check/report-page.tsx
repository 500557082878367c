import { queryOptions, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useParams } from 'react-router-dom';
import {
  getOverviews,
  getReport,
  listSongReports,
  type StoredReport,
} from '#shared/api/reports.ts';
import type { Overview } from '#shared/measure/overview.ts';
import { compareReports } from '#shared/report/compare-reports.ts';
import { readOverviews } from '#shared/report/stored-overviews.ts';
import { call } from '../app/api-client.ts';
import { dayWords, momentWords } from '../app/moments.ts';
import { usePageTitle } from '../app/page-title.ts';
import { Page } from '../app/shell.tsx';
import { gunzip } from '../browser/gzip.ts';
import { Button } from '../ui/button.tsx';
import { LoadingState } from '../ui/states.tsx';
import { ShareReport } from './share-report.tsx';
import { rulesWords, StoredReportView } from './stored-report.tsx';

export const noOverviews: ReadonlyMap<string, Overview> = new Map();

function reportQuery(reportId: string) {
  return queryOptions({
    queryKey: ['reports', reportId],
    queryFn: ({ signal }) => call(getReport, { params: { reportId } }, signal),
    // A stored report never changes.
    staleTime: Infinity,
    throwOnError: true,
  });
}

function overviewsQuery(reportId: string, exist: boolean) {
  return queryOptions({
    queryKey: ['reports', reportId, 'overviews'],
    queryFn: async ({ signal }) => {
      const bytes = await call(getOverviews, { params: { reportId } }, signal);
      return readOverviews(await gunzip(new Uint8Array(bytes)));
    },
    enabled: exist,
    staleTime: Infinity,
  });
}

/** The stored check of the same song before this one; null for the first. */
function earlierReportQuery(stored: StoredReport | undefined) {
  return queryOptions({
    queryKey: ['reports', stored?.id, 'earlier'],
    enabled: stored !== undefined,
    queryFn: async ({ signal }): Promise<StoredReport | null> => {
      const { id, songId } = stored!;
      const { items } = await call(listSongReports, { params: { songId }, query: {} }, signal);
      const earlier = items[items.findIndex((report) => report.id === id) + 1];
      if (!earlier || items.every((report) => report.id !== id)) return null;
      return call(getReport, { params: { reportId: earlier.id } }, signal);
    },
  });
}

/** `/reports/:reportId`: a stored report, with its picture. */
export function ReportPage() {
  const { reportId = '' } = useParams();
  const { data: stored } = useQuery(reportQuery(reportId));
  const { data: overviews } = useQuery(overviewsQuery(reportId, stored?.hasOverviews === true));
  const { data: earlier } = useQuery(earlierReportQuery(stored));
  const [sharing, setSharing] = useState(false);
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
      provenance={`Checked by ${stored.createdBy.name} on ${dayWords(stored.createdAt)}, against ${rulesWords(stored)}.`}
      actions={
        <>
          <Button onClick={() => setSharing(true)}>Share</Button>
          <ShareReport reportId={reportId} open={sharing} onOpenChange={setSharing} />
        </>
      }
    >
      {earlier && <SinceEarlier earlier={earlier} later={stored} />}
    </StoredReportView>
  );
}

/** What became of the findings since the check before. */
function SinceEarlier({ earlier, later }: { earlier: StoredReport; later: StoredReport }) {
  const { fresh, mended, remaining } = compareReports(earlier.report, later.report);
  return (
    <p>
      Since the check of {momentWords(earlier.createdAt)}: {fresh.length} new, {mended.length}{' '}
      mended, {remaining.length} still there.
    </p>
  );
}
