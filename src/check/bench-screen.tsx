import { useEffect, useMemo, useState, useSyncExternalStore, type ReactNode } from 'react';
import type { Edition } from '#shared/api/rules.ts';
import type { Overview } from '#shared/measure/overview.ts';
import { safeRepairs } from '#shared/repair/choose-repairs.ts';
import type { ChosenRepair } from '#shared/repair/repair-plan.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { ErrorPanel } from '../app/error-panel.tsx';
import { Page } from '../app/shell.tsx';
import { Button } from '../ui/button.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import type { HeldFolder } from '../browser/folder-handle.ts';
import { BenchContext } from './bench-context.ts';
import { Bench } from './bench.ts';
import type { BenchState } from './bench-state.ts';
import { checkRulesWords, readRulesFile, rulesFileAlone, type CheckRules } from './check-rules.ts';
import { Intake, Pickers, usePageDrop } from './intake.tsx';
import { ExportedAgain } from './exported-again.tsx';
import { IntakeProblems } from './intake-problems.tsx';
import { OtherRules } from './other-rules.tsx';
import { RulesMistakes } from './rules-mistakes.tsx';
import { ReadingProgressBar } from './reading-progress.tsx';
import { ReportHeader } from './report-header.tsx';
import { ReportView } from './report-view.tsx';
import { readAgainWords } from './session-files.ts';
import { SaveBar } from './save-bar.tsx';
import { SongDetails } from './song-details.tsx';
import { SongFields } from './song-fields.tsx';
import { StoreReport } from './store-report-button.tsx';
import { allFindings, type ViewedSession } from './viewed-session.ts';

type BenchScreenProps = {
  rules: CheckRules;
  /** Where the report belongs; null: the person's own project. */
  projectId: string | null;
  /** Rules from a file; null goes back to those of the page's address. */
  onRules: (rules: CheckRules | null) => void;
};

/** The bench against one set of rules: from the empty sheet to the saved zip. */
export function BenchScreen({ rules, projectId, onRules }: BenchScreenProps) {
  const bench = useBench(rules.rules);
  const state = useSyncExternalStore(bench.subscribe, bench.getState);
  // A project is held to its edition.
  const rulesLine =
    projectId !== null && rules.edition ? (
      `Against ${checkRulesWords(rules)}.`
    ) : (
      <OtherRules current={rules} onRules={onRules} />
    );
  if (state.phase !== 'waiting' && state.view) {
    return (
      <BusyBench
        bench={bench}
        state={state}
        view={state.view}
        edition={rules.edition}
        projectId={projectId}
        rulesLine={rulesLine}
      />
    );
  }
  const takeRules = (chosen: CheckRules): void => {
    bench.fail(null);
    onRules(chosen);
  };
  const takeIn = (folder: HeldFolder): void => {
    const file = rulesFileAlone(folder);
    if (file) readRulesFile(file).then(takeRules, bench.fail);
    else bench.drop(folder);
  };
  return (
    <Page>
      <PageHeader title="Check a folder" meta={rulesLine} />
      {state.failure !== null && (
        <div className="mb-6">
          <RulesMistakes failure={state.failure} />
        </div>
      )}
      {state.phase === 'waiting' ? (
        <Intake onFolder={takeIn} onFailure={bench.fail} onSample={bench.dropSample}>
          <SongFields information={state.information} onChange={bench.setInformation} />
        </Intake>
      ) : (
        <div className="rounded-panel border border-line bg-sheet px-6 py-10">
          <ReadingProgressBar state={state} onCancel={bench.cancel} />
        </div>
      )}
    </Page>
  );
}

function useBench(rules: HouseRules): Bench {
  const [bench] = useState(() => new Bench(rules));
  useEffect(() => bench.setRules(rules), [bench, rules]);
  useEffect(() => () => bench.close(), [bench]);
  return bench;
}

type BusyBenchProps = {
  bench: Bench;
  state: BenchState;
  view: ViewedSession;
  edition: Edition | null;
  projectId: string | null;
  rulesLine: ReactNode;
};

/** Something is on the bench: being read, or checked. */
function BusyBench({ bench, state, view, edition, projectId, rulesLine }: BusyBenchProps) {
  usePageDrop(bench.drop, bench.fail);
  const [fieldsShown, setFieldsShown] = useState(false);
  const overviews = useMemo(() => overviewsOf(state.check), [state.check]);
  const title = state.information.title ?? state.folderName ?? 'Checked files';
  const checked = state.phase === 'checked';
  const open = checked ? openRepairs(view, state.chosen) : [];
  return (
    <div className="flex grow flex-col">
      <ReportHeader title={title} view={view} reading={state.reading}>
        <Button aria-expanded={fieldsShown} onClick={() => setFieldsShown(!fieldsShown)}>
          Song details
        </Button>
        {checked && <ExportedAgain bench={bench} canReadAgain={state.canReadAgain} />}
        {open.length > 0 && (
          <Button kind="primary" onClick={() => bench.choose(open)}>
            {open.length === 1 ? 'Fix this one for me' : `Fix these ${String(open.length)} for me`}
          </Button>
        )}
      </ReportHeader>
      <p className="px-4 pb-4 text-small text-ink-2 sm:px-7">{rulesLine}</p>
      {fieldsShown && (
        <div className="px-4 pb-6 sm:px-7">
          <SongDetails
            // Fields that keep what is typed begin anew once the song is forgotten.
            key={state.forgotten}
            information={state.information}
            rules={bench.rules}
            tracks={view.files.filter(({ role }) => role === 'track').map(({ path }) => path)}
            onForget={bench.forget}
            onChange={bench.setInformation}
          />
        </div>
      )}
      {!checked && (
        <div className="px-4 pb-5 sm:px-7">
          <ReadingProgressBar state={state} onCancel={bench.cancel} />
        </div>
      )}
      {state.failure !== null && (
        <div className="px-4 pb-4 sm:px-7">
          <ErrorPanel error={state.failure} />
        </div>
      )}
      {state.readAgain && (
        <p role="status" className="px-4 pb-4 text-small sm:px-7">
          {readAgainWords(state.readAgain)}
        </p>
      )}
      <IntakeProblems problems={state.problems} />
      <BenchContext value={bench}>
        <ReportView
          view={view}
          overviews={overviews}
          chosen={state.chosen}
          {...(checked && { onChoose: bench.choose, onUndo: bench.undo, onAnswer: bench.answer })}
        />
      </BenchContext>
      <div className="flex flex-wrap items-center gap-x-6 gap-y-3 border-t border-line bg-sheet px-4 py-5 sm:px-7">
        <p className="text-small text-ink-2">
          One more file, or another take of one? Drop it anywhere: a file of the same name takes the
          old one’s place.
        </p>
        <Pickers onFolder={bench.drop} onFailure={bench.fail} quiet />
      </div>
      {checked && state.report && (
        <SaveBar bench={bench} report={state.report} verification={state.verification}>
          <StoreReport
            report={state.report}
            overviews={overviews}
            songTitle={title}
            edition={edition}
            projectId={projectId}
          />
        </SaveBar>
      )}
    </div>
  );
}

function overviewsOf(check: BenchState['check']): ReadonlyMap<string, Overview> {
  return new Map(
    (check?.files ?? []).flatMap(({ path, overview }) =>
      overview ? [[path, overview] as const] : [],
    ),
  );
}

/** Safe repairs that nobody has taken yet. */
function openRepairs(view: ViewedSession, chosen: readonly ChosenRepair[]): ChosenRepair[] {
  return safeRepairs(allFindings(view)).filter(
    (repair) =>
      !repair.files.every((path) =>
        chosen.some(({ code, files }) => code === repair.code && files.includes(path)),
      ),
  );
}
