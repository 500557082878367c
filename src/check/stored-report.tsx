import { useMemo, useState, type ReactNode } from 'react';
import type { SharedReport } from '#shared/api/reports.ts';
import type { Overview } from '#shared/measure/overview.ts';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import { Button } from '../ui/button.tsx';
import { Dialog } from '../ui/dialog.tsx';
import { ErrorNotice } from '../ui/states.tsx';
import { downloadReport } from './download-report.ts';
import { PackingList } from './packing-list.tsx';
import { ReportHeader } from './report-header.tsx';
import { ReportView } from './report-view.tsx';
import { inGroupOrder } from './viewed-session.ts';

type StoredReportProps = {
  stored: SharedReport;
  overviews: ReadonlyMap<string, Overview>;
  /** Who checked it, when, against what. */
  provenance: string;
  actions?: ReactNode;
  children?: ReactNode;
};

/** A report as it was stored: figures, what the server says to it, picture, findings. */
export function StoredReportView({
  stored,
  overviews,
  provenance,
  actions,
  children,
}: StoredReportProps) {
  const { report } = stored;
  const [listShown, setListShown] = useState(false);
  const view = useMemo(
    () => ({ ...report, files: inGroupOrder(report.files, defaultRules) }),
    [report],
  );
  return (
    <div className="flex grow flex-col">
      <ReportHeader title={stored.songTitle} view={view} />
      <div className="flex flex-wrap items-start justify-between gap-x-8 gap-y-3 px-4 pb-6 sm:px-7">
        <div className="max-w-prose text-small text-ink-2">
          <p>{provenance}</p>
          <Differences stored={stored} />
          {children}
        </div>
        <div className="flex flex-wrap gap-2 print:hidden">
          <Button onClick={() => setListShown(true)}>Packing list</Button>
          <Button onClick={() => downloadReport(report)}>Download</Button>
          <Button onClick={() => print()}>Print</Button>
          {actions}
        </div>
      </div>
      <ReportView view={view} overviews={overviews} />
      <Dialog
        wide
        open={listShown}
        onOpenChange={setListShown}
        title="Packing list"
        description="What went into the zip, under which name."
      >
        <PackingList report={report} />
      </Dialog>
    </div>
  );
}

/** What the server found when it judged the same measures itself. */
function Differences({ stored }: { stored: SharedReport }): ReactNode {
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

/** The rules a stored report was checked against, in words. */
export function rulesWords({ rulesEdition }: Pick<SharedReport, 'rulesEdition'>): string {
  return rulesEdition
    ? `the house rules of ${rulesEdition.studioName}, edition ${String(rulesEdition.number)}`
    : 'rules that no studio published';
}
