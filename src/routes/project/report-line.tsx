import type { ReportSummary } from '#shared/api/reports.ts';
import { Link } from 'react-router-dom';
import { momentWords } from '../../app/moments.ts';
import { LevelMark } from '../../ui/level-mark.tsx';

const verdictWords: Record<ReportSummary['verdict'], string> = {
  ready: 'nothing left but notes',
  look: 'things to look at',
  'must-fix': 'must be fixed',
};

/** What remains in a report, in one mark. */
function Verdict({ report }: { report: ReportSummary }) {
  if (report.verdict !== 'ready')
    return <LevelMark level={report.verdict}>{verdictWords[report.verdict]}</LevelMark>;
  return (
    <span className="inline-flex items-center gap-2 font-medium text-case">
      <svg viewBox="0 0 16 16" width="16" height="16" aria-hidden="true">
        <path d="M2.5 8.5 6.5 12.5 13.5 4" fill="none" stroke="currentColor" strokeWidth="2.25" />
      </svg>
      <span className="self-baseline">{verdictWords.ready}</span>
    </span>
  );
}

/** "3 must fix, 2 look, 5 notes", leaving out what is none. */
function countWords(counts: ReportSummary['counts']): string {
  const parts = [
    counts['must-fix'] > 0 ? `${String(counts['must-fix'])} must fix` : '',
    counts.look > 0 ? `${String(counts.look)} look` : '',
    counts.note > 0 ? `${String(counts.note)} ${counts.note === 1 ? 'note' : 'notes'}` : '',
  ].filter((part) => part !== '');
  return parts.length === 0 ? 'no findings' : parts.join(', ');
}

/** One stored report as a line: when and by whom, what remains, against which rules. */
export function ReportLine({ report }: { report: ReportSummary }) {
  return (
    <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-0.5 py-2.5 text-small">
      <div className="min-w-0">
        <Link to={`/reports/${report.id}`} className="text-link">
          {momentWords(report.createdAt)}
        </Link>{' '}
        <span className="text-ink-2">by {report.createdBy.name}</span>
      </div>
      <div className="flex flex-wrap items-baseline gap-x-4">
        <Verdict report={report} />
        <span className="figures text-ink-2">{countWords(report.counts)}</span>
      </div>
      <p className="w-full text-ink-2">
        {report.rulesEdition === null
          ? 'against the default rules'
          : `against ${report.rulesEdition.studioName}, edition ${String(report.rulesEdition.number)}`}
        {report.judgedAgain === 'differs' &&
          ' · the server judges some findings differently, see the report'}
      </p>
    </div>
  );
}
