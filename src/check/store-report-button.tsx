import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useMemo } from 'react';
import { Link } from 'react-router-dom';
import type { Edition } from '#shared/api/rules.ts';
import type { Overview } from '#shared/measure/overview.ts';
import type { CheckReport } from '#shared/report/check-report.ts';
import { errorText } from '../app/error-text.ts';
import { useSession } from '../app/session-query.ts';
import { Button } from '../ui/button.tsx';
import { downloadReport } from './download-report.ts';
import { storeOrWait } from './waiting-checks.ts';

type StoreReportProps = {
  report: CheckReport;
  overviews: ReadonlyMap<string, Overview>;
  songTitle: string;
  edition: Edition | null;
  projectId: string | null;
};

/** Keeps the report for both sides; a visitor is told what signing in would bring. */
export function StoreReport({
  report,
  overviews,
  songTitle,
  edition,
  projectId,
}: StoreReportProps) {
  const user = useSession().data?.user;
  const queries = useQueryClient();
  // One id a report: pressing twice, or again after a lost answer, stores it once.
  const submissionId = useMemo(() => (report ? crypto.randomUUID() : ''), [report]);
  const storing = useMutation({
    mutationFn: (toProject: string) =>
      storeOrWait({
        submissionId,
        projectId: toProject,
        songTitle,
        report,
        overviews,
        rulesEdition: edition && { studioSlug: edition.studio.slug, number: edition.number },
      }),
    onSuccess: () => queries.invalidateQueries(),
  });
  if (!user) return <Button onClick={() => downloadReport(report)}>Download the report</Button>;
  if (storing.data) {
    return (
      <span role="status" className="self-center text-small">
        Report stored.{' '}
        <Link to={`/reports/${storing.data.id}`} className="text-link">
          Open it
        </Link>
      </span>
    );
  }
  if (storing.data === null) {
    return (
      <span role="status" className="max-w-72 self-center text-small">
        The server cannot be reached. The report waits in this browser and is stored as soon as the
        bench is open with a connection.
      </span>
    );
  }
  return (
    <>
      {storing.isError && (
        <span role="alert" className="self-center text-small text-must">
          {errorText(storing.error).title}
        </span>
      )}
      <Button
        busy={storing.isPending}
        busyWords="Storing…"
        onClick={() => storing.mutate(projectId ?? user.privateProjectId)}
      >
        Store the report
      </Button>
    </>
  );
}
