import { useEffect, useMemo, useState, useSyncExternalStore } from 'react';
import type { Edition } from '#shared/api/rules.ts';
import { safeRepairs } from '#shared/repair/choose-repairs.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { ErrorPanel } from '../app/error-panel.tsx';
import { Page } from '../app/shell.tsx';
import { Button } from '../ui/button.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { Progress } from '../ui/progress.tsx';
import { Bench, type BenchState } from './bench.ts';
import { byteWords } from './byte-words.ts';
import { Intake, Pickers, usePageDrop } from './intake.tsx';
import { allFindings } from './report-findings.ts';
import { ReportHeader } from './report-header.tsx';
import { ReportView } from './report-view.tsx';
import { SaveBar } from './save-bar.tsx';
import { SongFields } from './song-fields.tsx';
import { StoreReport } from './store-report-button.tsx';

type BenchScreenProps = {
  rules: HouseRules;
  /** The published edition the rules are; null for the default rules. */
  edition: Edition | null;
  /** Where the report belongs; null: the person's own project. */
  projectId: string | null;
};

/** The bench against one set of rules: from the empty sheet to the saved zip. */
export function BenchScreen({ rules, edition, projectId }: BenchScreenProps) {
  const bench = useBench(rules);
  const state = useSyncExternalStore(bench.subscribe, bench.getState);
  if (state.phase === 'checked' && state.report) {
    return <CheckedBench bench={bench} state={state} edition={edition} projectId={projectId} />;
  }
  return (
    <Page>
      <PageHeader
        title="Check a folder"
        meta={
          edition
            ? `Against the house rules of ${edition.studio.name}, edition ${String(edition.number)}.`
            : 'Against the default rules: what every engineer wants to know before a mix.'
        }
      />
      {state.failure !== null && (
        <div className="mb-6">
          <ErrorPanel error={state.failure} />
        </div>
      )}
      {state.phase === 'waiting' ? (
        <Intake onFolder={bench.drop} onFailure={bench.fail}>
          <p className="text-small text-ink-2">
            No session at hand?{' '}
            <button type="button" className="text-link" onClick={() => void bench.dropSample()}>
              Try it with a sample
            </button>
            : fourteen faulty little files, made on the spot.
          </p>
          <div className="w-full max-w-2xl border-t border-line pt-5">
            <SongFields information={state.information} onChange={bench.setInformation} />
          </div>
        </Intake>
      ) : (
        <Measuring state={state} onCancel={bench.cancel} />
      )}
    </Page>
  );
}

function useBench(rules: HouseRules): Bench {
  const bench = useMemo(() => new Bench(rules), [rules]);
  useEffect(() => () => bench.close(), [bench]);
  return bench;
}

function Measuring({ state, onCancel }: { state: BenchState; onCancel: () => void }) {
  const { progress, phase } = state;
  const done = progress ? progress.bytesDone / Math.max(1, progress.bytes) : undefined;
  return (
    <section
      aria-label="Progress"
      className="flex flex-col gap-5 rounded-panel border border-line bg-sheet px-6 py-10"
    >
      <p className="text-section">
        {phase === 'measuring' ? 'Listening to every file once' : 'Holding the files side by side'}
      </p>
      <Progress label="Check" value={phase === 'measuring' ? done : undefined}>
        {progress &&
          `${String(progress.filesDone)} of ${String(progress.files)} files, ${byteWords(progress.bytesDone)} of ${byteWords(progress.bytes)}`}
      </Progress>
      <div>
        <Button onClick={onCancel}>Cancel</Button>
      </div>
    </section>
  );
}

type CheckedBenchProps = {
  bench: Bench;
  state: BenchState;
  edition: Edition | null;
  projectId: string | null;
};

function CheckedBench({ bench, state, edition, projectId }: CheckedBenchProps) {
  const report = state.report!;
  usePageDrop(bench.drop, bench.fail);
  const [fieldsShown, setFieldsShown] = useState(false);
  const overviews = useMemo(
    () =>
      new Map(
        (state.check?.files ?? []).flatMap(({ path, overview }) =>
          overview ? [[path, overview] as const] : [],
        ),
      ),
    [state.check],
  );
  const open = safeRepairs(allFindings(report)).filter(
    (repair) =>
      !state.chosen.some(({ code, files }) => code === repair.code && files[0] === repair.files[0]),
  );
  const title = report.information.title ?? state.folderName ?? 'Checked files';
  return (
    <div className="flex grow flex-col">
      <ReportHeader title={title} report={report} readingMs={state.readingMs}>
        <Button aria-expanded={fieldsShown} onClick={() => setFieldsShown(!fieldsShown)}>
          Artist, song, tempo
        </Button>
        {open.length > 0 && (
          <Button kind="primary" onClick={() => bench.choose(open)}>
            {open.length === 1 ? 'Fix this one for me' : `Fix these ${String(open.length)} for me`}
          </Button>
        )}
      </ReportHeader>
      {fieldsShown && (
        <div className="max-w-3xl px-4 pb-6 sm:px-7">
          <SongFields information={state.information} onChange={bench.setInformation} />
        </div>
      )}
      {state.failure !== null && (
        <div className="px-4 pb-4 sm:px-7">
          <ErrorPanel error={state.failure} />
        </div>
      )}
      <ReportView
        report={report}
        overviews={overviews}
        chosen={state.chosen}
        onChoose={bench.choose}
        onUndo={bench.undo}
      />
      <div className="border-t border-line bg-sheet px-4 py-5 sm:px-7">
        <p className="mb-3 text-small text-ink-2">
          Another folder? Drop it anywhere, or choose it here.
        </p>
        <div className="flex justify-start">
          <Pickers onFolder={bench.drop} />
        </div>
      </div>
      <SaveBar bench={bench} report={report}>
        <StoreReport
          report={report}
          overviews={overviews}
          songTitle={title}
          edition={edition}
          projectId={projectId}
        />
      </SaveBar>
    </div>
  );
}
