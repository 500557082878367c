import { useId, useMemo, type ReactNode } from 'react';
import { nextStep } from '#shared/findings/catalogue/describe-finding.ts';
import { nextSteps, type NextStep } from '#shared/findings/catalogue/definition.ts';
import { levels, type Finding, type Level } from '#shared/findings/finding.ts';
import { FindingFilterBar } from './finding-filter-bar.tsx';
import { filterFindings, type FindingFilter } from './finding-filter.ts';
import { FindingItem, type FindingActions } from './finding-item.tsx';
import { allFindings, findingKey, type ViewedSession } from './viewed-session.ts';

/** Headings of the groups, in the order in which things are best done. */
const stepHeadings: Record<NextStep, string> = {
  'we-can-fix': 'We can fix',
  'export-again': 'Export again',
  decide: 'To decide',
  know: 'Good to know',
};

const stepOrder: readonly NextStep[] = ['we-can-fix', 'export-again', 'decide', 'know'];

/** Fewer findings than this are read faster than filtered. */
const fewestToFilter = 6;

type FindingsPanelProps = FindingActions & {
  view: ViewedSession;
  filter: FindingFilter;
  onFilter: (filter: FindingFilter) => void;
};

/** All findings, or those a filter leaves, grouped by what somebody does next about them. */
export function FindingsPanel({ filter, onFilter, ...props }: FindingsPanelProps) {
  const { view } = props;
  const all = useMemo(() => allFindings(view), [view]);
  const shown = filterFindings(all, filter);
  if (all.length === 0) {
    return (
      <p className="px-5 py-6 text-ink-2">
        None of these checks found anything. That is no guarantee: ears still decide.
      </p>
    );
  }
  return (
    <>
      {all.length >= fewestToFilter && (
        <FindingFilterBar findings={all} shown={shown.length} filter={filter} onFilter={onFilter} />
      )}
      {stepOrder.map((step) => {
        const group = shown.filter((finding) => nextStep(finding) === step);
        return group.length > 0 && <FindingGroup key={step} step={step} group={group} {...props} />;
      })}
    </>
  );
}

function FindingGroup({
  step,
  group,
  ...props
}: FindingActions & { view: ViewedSession; step: NextStep; group: Finding[] }): ReactNode {
  const headingId = useId();
  return (
    <section aria-labelledby={headingId}>
      <header className="flex items-baseline justify-between border-b border-line bg-paper px-5 py-3">
        <h2 id={headingId} className="text-small font-semibold text-ink-2">
          {stepHeadings[step]}
        </h2>
        <span className="figures text-small text-ink-2">{group.length}</span>
      </header>
      <ul>
        {group.map((finding) => (
          <FindingItem key={findingKey(finding)} finding={finding} {...props} />
        ))}
      </ul>
    </section>
  );
}

/** "2 to export again, 3 we can fix, 2 to decide": what there is to do, in a line. */
export function stepCounts(
  view: ViewedSession,
): { step: NextStep; count: number; words: string; level: Level }[] {
  const findings = allFindings(view);
  const words: Record<NextStep, string> = {
    'export-again': 'to export again',
    'we-can-fix': 'we can fix',
    decide: 'to decide',
    know: 'good to know',
  };
  return nextSteps.flatMap((step) => {
    const group = findings.filter((finding) => nextStep(finding) === step);
    const level = levels.find((candidate) => group.some((finding) => finding.level === candidate));
    return level ? [{ step, count: group.length, words: words[step], level }] : [];
  });
}
