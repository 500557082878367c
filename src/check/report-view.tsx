import { memo } from 'react';
import type { Finding } from '#shared/findings/finding.ts';
import type { AnswerKind } from '#shared/session/session-information.ts';
import type { Overview } from '#shared/measure/overview.ts';
import type { ChosenRepair } from '#shared/repair/repair-plan.ts';
import { anchorOf, FindingsPanel } from './findings-panel.tsx';
import { SideBySide } from './side-by-side.tsx';
import type { ViewedSession } from './viewed-session.ts';

type ReportViewProps = {
  view: ViewedSession;
  overviews: ReadonlyMap<string, Overview>;
  chosen?: readonly ChosenRepair[];
  onChoose?: (repairs: readonly ChosenRepair[]) => void;
  onUndo?: (repairs: readonly ChosenRepair[]) => void;
  onAnswer?: (finding: Finding, answer: AnswerKind | null) => void;
};

/** The picture and the findings beside it: on the bench, and of a stored report. */
export const ReportView = memo(function ReportView({
  view,
  overviews,
  ...repairs
}: ReportViewProps) {
  return (
    <div className="grid grow border-t border-line lg:grid-cols-[minmax(0,1fr)_26rem]">
      <div className="bg-sheet">
        {/* The picture stays in view while the findings beside it are read. */}
        <div className="px-4 py-6 sm:px-7 lg:sticky lg:top-0 lg:max-h-[calc(100dvh-4rem)] lg:overflow-y-auto">
          <h2 className="sr-only">Side by side</h2>
          <SideBySide view={view} overviews={overviews} onFinding={showFinding} />
        </div>
      </div>
      <aside aria-label="Findings" className="border-line bg-sheet max-lg:border-t lg:border-s">
        <FindingsPanel view={view} {...repairs} />
      </aside>
    </div>
  );
});

/** Brings a finding's text into view and the keyboard to it. */
function showFinding(path: string, code: string): void {
  const target = document.getElementById(
    anchorOf({ code, files: [path] } as Parameters<typeof anchorOf>[0]),
  );
  target?.scrollIntoView({ block: 'nearest' });
  target?.focus({ preventScroll: true });
}
