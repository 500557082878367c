import { memo, useCallback, useState } from 'react';
import type { Finding } from '#shared/findings/finding.ts';
import type { Overview } from '#shared/measure/overview.ts';
import { noFilter, type FindingFilter } from './finding-filter.ts';
import type { FindingActions } from './finding-item.tsx';
import { FindingsPanel } from './findings-panel.tsx';
import { SideBySide, type ShownPlace } from './side-by-side.tsx';
import type { ViewedSession } from './viewed-session.ts';

type ReportViewProps = Omit<FindingActions, 'onShow'> & {
  view: ViewedSession;
  overviews: ReadonlyMap<string, Overview>;
};

/** The picture and the findings beside it: on the bench, and of a stored report. */
export const ReportView = memo(function ReportView({
  view,
  overviews,
  ...actions
}: ReportViewProps) {
  const [filter, setFilter] = useState<FindingFilter>(noFilter);
  const [place, setPlace] = useState<ShownPlace | null>(null);
  const showInPicture = ({ code, files, ranges }: Finding): void => {
    const path = files[0]!;
    const format = view.files.find((file) => file.path === path)?.format;
    const [first] = ranges;
    const seconds = first && format ? first.startFrame / format.sampleRateHz : null;
    // A new object each time: asking again shows it again.
    setPlace({ path, code, seconds });
  };
  const showFinding = useCallback((anchor: string): void => {
    setFilter(noFilter);
    // The finding may be listed only after the filter is gone.
    requestAnimationFrame(() => bringIntoView(anchor));
  }, []);
  return (
    <div className="grid grow border-t border-line lg:grid-cols-[minmax(0,1fr)_26rem]">
      <div className="bg-sheet">
        {/* The picture stays in view while the findings beside it are read. */}
        <div className="px-4 py-6 sm:px-7 lg:sticky lg:top-0 lg:max-h-[calc(100dvh-4rem)] lg:overflow-y-auto">
          <h2 className="sr-only">Side by side</h2>
          <SideBySide view={view} overviews={overviews} place={place} onFinding={showFinding} />
        </div>
      </div>
      <aside aria-label="Findings" className="border-line bg-sheet max-lg:border-t lg:border-s">
        <FindingsPanel
          view={view}
          filter={filter}
          onFilter={setFilter}
          onShow={showInPicture}
          {...actions}
        />
      </aside>
    </div>
  );
});

/** Brings a finding's text into view and the keyboard to it. */
function bringIntoView(anchor: string): void {
  const target = document.getElementById(anchor);
  target?.scrollIntoView({ block: 'nearest' });
  target?.focus({ preventScroll: true });
}
