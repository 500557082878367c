import type { Song } from '#shared/api/projects.ts';
import { listSongReports } from '#shared/api/reports.ts';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '../../app/api-client.ts';
import { ErrorPanel } from '../../app/error-panel.tsx';
import { Button } from '../../ui/button.tsx';
import { Skeleton } from '../../ui/states.tsx';
import { TapeLabel } from '../../ui/tape-label.tsx';
import { ReportLine } from './report-line.tsx';

/** How many reports a song shows before one asks for all of them. */
const firstReports = 3;

/** One song: its name on tape, its newest reports, and checking it again. */
export function SongRow({ song }: { song: Song }) {
  const [all, setAll] = useState(false);
  const reports = useQuery({
    queryKey: ['songs', song.id, 'reports'],
    queryFn: ({ signal }) =>
      call(listSongReports, { params: { songId: song.id }, query: { limit: 100 } }, signal),
  });
  const items = reports.data?.items ?? [];
  const shown = all ? items : items.slice(0, firstReports);
  return (
    <li className="px-5 py-4 sm:px-6">
      <h3>
        <TapeLabel name={song.title} size="large" wrap />
      </h3>
      <div className="mt-3">
        {reports.isPending && <Skeleton className="w-2/3" />}
        {reports.isError && (
          <ErrorPanel error={reports.error} onRetry={() => void reports.refetch()} />
        )}
        {reports.isSuccess && items.length === 0 && (
          <p className="text-small text-ink-2">No report yet.</p>
        )}
        {shown.length > 0 && (
          <ol className="divide-y divide-line border-t border-line">
            {shown.map((report) => (
              <li key={report.id}>
                <ReportLine report={report} />
              </li>
            ))}
          </ol>
        )}
        {!all && items.length > firstReports && (
          <Button
            size="small"
            className="mt-2"
            onClick={() => {
              setAll(true);
            }}
          >
            Show all {items.length} reports
          </Button>
        )}
      </div>
    </li>
  );
}
