import { judgeCheck, type SessionCheck } from '#shared/check.ts';
import { emptyComparison, type Comparison } from '#shared/compare/comparison.ts';
import { AppError } from '#shared/errors.ts';
import type { Finding } from '#shared/findings/finding.ts';
import { checksumFileName } from '#shared/naming/safe-names.ts';
import { unaskedRepairs } from '#shared/repair/choose-repairs.ts';
import type { ChosenRepair, RepairPlan } from '#shared/repair/repair-plan.ts';
import { buildReport } from '#shared/report/build-report.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { inPathOrder, type MeasuredFile } from '#shared/session/measured-file.ts';
import type { AnswerKind, SessionInformation } from '#shared/session/session-information.ts';
import { readFolder, type HeldFolder } from '../browser/folder-handle.ts';
import type { FileToRead } from '../workers/file-to-read.ts';
import { makeSampleFiles } from '../workers/sample-link.ts';
import type { SessionWorker } from '../workers/session-link.ts';
import { answered, answersStillAsked, repairsStillOpen } from './answers.ts';
import {
  judgedFindings,
  unreadBench,
  waitingBench,
  type BenchState,
  type CheckedBench,
} from './bench-state.ts';
import type { ExcerptPlace } from './excerpts.ts';
import { BenchWorkers } from './bench-workers.ts';
import { isCopyOf, listIntake, zipAlone } from './intake-list.ts';
import { LatestWork } from './latest-work.ts';
import { measureFiles } from './measure-files.ts';
import { forgetSong, recallSong, rememberSong } from './remembered-songs.ts';
import { sampleSong } from './sample-session/sample-song.ts';
import { compareFileLists, isTrusted, joinFiles, joinOlder, stampOf } from './session-files.ts';
import { verifyZip } from './verify-zip.ts';
import { keepUnchanged, viewCheck, viewUnfinished } from './viewed-session.ts';

/** Typing should not render repaired files at every letter. */
const typingMs = 400;

/**
 * The check as it runs in one tab: takes a dropped folder through measuring, comparing, judging
 * and repairing, and holds what came of it. Knows no React, so it can be tested without.
 */
export class Bench {
  private state: BenchState = waitingBench;
  private readonly listeners = new Set<() => void>();
  rules: HouseRules;
  private files: FileToRead[] = [];
  /** The folder on the bench, where the browser lets it be read again. */
  private held: FileSystemDirectoryHandle | null = null;
  /** Files that were dropped beside the folder. */
  private loose: FileToRead[] = [];
  /** The name of the zip that was downloaded last. */
  private handedOver: string | null = null;
  /** What a second reading that is stopped goes back to. */
  private before: CheckedBench | null = null;
  /** What was measured, by the file's stamp: a file that did not change is not read again. */
  private measured = new Map<string, MeasuredFile>();
  private comparison: Comparison | null = null;
  private running: AbortController | null = null;
  private readonly repairing = new LatestWork();
  private readonly workers = new BenchWorkers();

  constructor(rules: HouseRules) {
    this.rules = rules;
  }

  readonly getState = (): BenchState => this.state;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  /**
   * Takes in what was dropped. A folder or a zip is a new check (or the same session exported
   * again: what did not change is not read again); loose files join the session on the bench and
   * replace files of their name.
   */
  readonly drop = (folder: HeldFolder): void => {
    const zip = zipAlone(folder);
    if (zip && this.handedOver !== null && isCopyOf(zip.name, this.handedOver)) {
      void this.verify(zip);
      return;
    }
    void this.whileRunning((signal) => this.takeIn(folder, signal));
  };

  /** Reads the same song again: the folder on the bench, or the one that was picked instead. */
  readonly exportedAgain = (picked: HeldFolder | null): void => {
    const { held } = this;
    void this.whileRunning(async (signal) => {
      const folder = picked ?? (held && (await readFolder(held)));
      if (folder) await this.takeIn(folder, signal, true);
    });
  };

  /** Makes the sample session in a worker and checks it like any other folder. */
  readonly dropSample = (): void => {
    const { artist, title, bpm } = sampleSong;
    void this.whileRunning(async (signal) => {
      this.clear();
      this.set({
        ...waitingBench,
        phase: 'making-sample',
        folderName: title,
        information: { ...waitingBench.information, artist, title, tempo: { kind: 'fixed', bpm } },
      });
      await this.check(await makeSampleFiles(signal), signal);
    });
  };

  /** Stops at once. What was checked before a second reading stays on the bench. */
  readonly cancel = (): void => {
    this.running?.abort();
    const { before } = this;
    if (!before) {
      this.clear();
      return;
    }
    this.restore(before);
    this.judge(0);
  };

  /** A zip of this name, when it is dropped, is only compared with its list of checksums. */
  readonly expectBack = (fileName: string): void => {
    this.handedOver = fileName;
  };

  /** Compares a zip with the list of checksums in it, and says what came of it. */
  readonly verify = (zip: File, signal?: AbortSignal): Promise<void> =>
    verifyZip(zip, () => this.sessionWorker(), {
      signal,
      onChange: (verification) => this.set({ verification }),
    });

  readonly fail = (failure: unknown): void => this.set({ failure });

  readonly setInformation = (change: Partial<SessionInformation>): void => {
    this.set({ information: { ...this.state.information, ...change } });
    rememberSong(this.state.folderName, this.state.information);
    if (this.state.phase === 'checked') this.judge(typingMs);
  };

  /** Clears what was said about the song, here and in the browser's memory. The check stays. */
  readonly forget = (): void => {
    if (this.state.folderName !== null) forgetSong(this.state.folderName);
    const { information } = waitingBench;
    this.set({ information, chosen: [], forgotten: this.state.forgotten + 1 });
    this.judge(0);
  };

  /** Other rules: what is measured stays, only the findings are worked out anew. */
  readonly setRules = (rules: HouseRules): void => {
    if (rules === this.rules) return;
    this.rules = rules;
    this.judge(0);
  };

  /** What the artist says about a finding; null takes it back. */
  readonly answer = (finding: Finding, answer: AnswerKind | null): void => {
    this.setInformation({ answers: answered(this.state.information.answers, finding, answer) });
  };

  /** Takes repairs on; each can be taken back. */
  readonly choose = (repairs: readonly ChosenRepair[]): void => {
    this.set({ chosen: [...this.state.chosen, ...repairs] });
    this.judge(0);
  };

  readonly undo = (repairs: readonly ChosenRepair[]): void => {
    this.set({ chosen: this.state.chosen.filter((chosen) => !repairs.includes(chosen)) });
    this.judge(0);
  };

  /** The dropped file behind a path, to look at or listen to a part of it. */
  fileAt(path: string): FileToRead | undefined {
    return this.files.find((file) => file.path === path);
  }

  /** Names the version of a file, so that what was read of it is read again when it changes. */
  stampAt(path: string): string {
    const file = this.fileAt(path);
    return file ? stampOf(file) : path;
  }

  /** Frames of a file as they will be in the zip; null where it is not packed as a track. */
  async repairedExcerpt(
    place: ExcerptPlace,
    plan: RepairPlan,
    signal: AbortSignal,
  ): Promise<Float32Array[] | null> {
    const worker = await this.sessionWorker();
    const input = { ...place, files: this.files, measured: this.measuredFiles(), plan };
    return worker.call('repairedExcerpt', input, { signal });
  }

  /** Lays the zip out: its name and exact size, before a byte is made. */
  readonly prepare = async (): Promise<{ fileName: string; bytes: number }> => {
    // A repair that was chosen just now may still be worked out.
    await this.repairing.settled();
    const { check, repaired, report, failure } = this.state;
    if (!check || !repaired || !report) {
      throw failure instanceof Error ? failure : new AppError('conflict');
    }
    const worker = await this.sessionWorker();
    return worker.call('prepare', { files: this.files, check, repaired, report });
  };

  readonly sessionWorker = (): Promise<SessionWorker> => this.workers.session();

  close(): void {
    this.running?.abort();
    this.repairing.stop();
    this.workers.close();
  }

  private set(change: Partial<BenchState>): void {
    const { failure } = change;
    // Expected failures are said on screen; a bug also belongs where bugs are looked for.
    if (failure != null && !(failure instanceof AppError)) reportError(failure);
    this.state = { ...this.state, ...change };
    for (const listener of this.listeners) listener();
  }

  private clear(): void {
    this.files = [];
    this.loose = [];
    this.held = null;
    this.set({ ...waitingBench, information: this.state.information });
  }

  private restore({ state, files, measured, comparison }: CheckedBench): void {
    this.files = files;
    this.measured = measured;
    this.comparison = comparison;
    this.before = null;
    this.set({ ...state, information: this.state.information });
  }

  private startSong(folderName: string | null): void {
    const { artist, title, tempo } = this.state.information;
    // What was typed before the drop is about this song.
    const said = { ...(artist && { artist }), ...(title && { title }), ...(tempo && { tempo }) };
    const information = { ...(recallSong(folderName) ?? waitingBench.information), ...said };
    this.before = null;
    this.set({ ...waitingBench, folderName, information });
  }

  private async takeIn(dropped: HeldFolder, signal: AbortSignal, again = false): Promise<void> {
    const intake = await listIntake(dropped, () => this.sessionWorker(), signal);
    const known = this.files;
    const joins = intake.folderName === null && known.length > 0;
    const folderName = joins ? this.state.folderName : intake.folderName;
    const sameSong = joins || again || folderName === this.state.folderName;
    if (joins) this.loose = joinFiles(this.loose, intake.files);
    else {
      this.held = dropped.handle;
      if (!sameSong) this.loose = [];
    }
    if (!sameSong) this.startSong(folderName);
    const files = joins ? joinFiles(known, intake.files) : joinOlder(intake.files, this.loose);
    this.set({ folderName, problems: intake.problems, canReadAgain: this.held !== null });
    const zip = zipAlone(dropped);
    if (zip && intake.files.some(({ path }) => path === checksumFileName))
      void this.verify(zip, signal);
    else this.set({ verification: null });
    await this.check(files, signal);
    if (!sameSong || known.length === 0) return;
    this.set({ readAgain: compareFileLists(known, files) });
    this.forgetWhatIsGone();
  }

  /** After new exports: repairs and answers whose finding is gone fall away. */
  private forgetWhatIsGone(): void {
    const { check, chosen, information } = this.state;
    if (!check) return;
    const findings = judgedFindings(check);
    this.set({ chosen: repairsStillOpen(chosen, findings) });
    this.setInformation({ answers: answersStillAsked(information.answers, findings) });
  }

  private async whileRunning(work: (signal: AbortSignal) => Promise<void>): Promise<void> {
    this.running?.abort();
    const running = new AbortController();
    this.running = running;
    try {
      await work(running.signal);
    } catch (failure) {
      if (running.signal.aborted) return;
      // A second reading that fails leaves what was there.
      if (this.before) this.restore(this.before);
      const phase = this.state.check && this.comparison ? 'checked' : 'waiting';
      this.set({ phase, failure });
      if (phase === 'checked' && !this.state.repaired) this.judge(0, failure);
    }
  }

  private async check(files: FileToRead[], signal: AbortSignal): Promise<void> {
    if (files.length === 0) throw new AppError('nothing-to-check');
    if (this.comparison && this.state.check) {
      const { state, measured, comparison } = this;
      this.before = { state, files: this.files, measured, comparison };
    }
    this.files = files;
    this.comparison = null;
    this.repairing.stop();
    this.set({ phase: 'measuring', failure: null, ...unreadBench });
    const startedAt = performance.now();
    const bytes = await this.measure(files, signal);
    const measured = this.measuredFiles();
    if (measured.every(({ reading }) => reading.kind === 'not-audio')) {
      if (!this.before) this.clear();
      throw new AppError('nothing-to-check');
    }
    this.set({ phase: 'comparing', reading: { ms: performance.now() - startedAt, bytes } });
    const worker = await this.sessionWorker();
    this.comparison = await worker.call('compare', { files, measured }, { signal });
    this.before = null;
    this.set({ phase: 'checked', progress: null });
    this.judge(0);
  }

  /** Measures what is new or changed; answers how many bytes that was. */
  private measure(files: readonly FileToRead[], signal: AbortSignal): Promise<number> {
    const kept = new Map(
      files.flatMap((file) => {
        const known = this.measured.get(stampOf(file));
        return known && isTrusted(known) ? [[stampOf(file), known] as const] : [];
      }),
    );
    this.measured = kept;
    const waiting = files.filter((file) => !kept.has(stampOf(file)));
    return measureFiles(waiting, this.workers.measuring(), {
      signal,
      onMeasured: (file, measured) => kept.set(stampOf(file), measured),
      onProgress: (progress) => this.set({ progress }),
      onPreview: this.previews(signal),
    });
  }

  private measuredFiles(): MeasuredFile[] {
    return inPathOrder(this.files.flatMap((file) => this.measured.get(stampOf(file)) ?? []));
  }

  /**
   * Answers a function that shows what can be said of the files measured so far. Judged in the
   * session worker, so that the page stays free; only what is new goes there.
   */
  private previews(signal: AbortSignal): () => Promise<void> {
    const shown = new Set<MeasuredFile>();
    return async () => {
      const files = this.measuredFiles();
      const more = files.filter((file) => !shown.has(file));
      if (more.length === 0) return;
      const { rules } = this;
      const { information } = this.state;
      const worker = await this.sessionWorker();
      const input = { fromStart: shown.size === 0, more, rules, information };
      for (const file of more) shown.add(file);
      const judgement = await worker.call('preview', input, { signal });
      if (signal.aborted || this.state.phase !== 'measuring') return;
      const check = { files, comparison: emptyComparison(), judgement };
      const view = viewUnfinished(check, information, rules);
      this.set({ check, view: keepUnchanged(this.state.view, view) });
    };
  }

  /** Judges at once, and works out what the chosen repairs make after a pause. */
  private judge(pauseMs: number, failure: unknown = null): void {
    if (!this.comparison) return;
    const { rules, comparison } = this;
    const { information, chosen } = this.state;
    const measured = { files: this.measuredFiles(), comparison };
    const check = judgeCheck(measured, rules, information);
    this.set({ check, view: viewCheck(check, information, rules), repaired: null });
    this.repairing.start(pauseMs, (signal) =>
      this.repair(check, information, chosen, signal, failure),
    );
  }

  private async repair(
    check: SessionCheck,
    information: SessionInformation,
    chosen: readonly ChosenRepair[],
    signal: AbortSignal,
    earlierFailure: unknown,
  ): Promise<void> {
    const { rules, files } = this;
    try {
      const worker = await this.sessionWorker();
      const all = [...unaskedRepairs(judgedFindings(check)), ...chosen];
      const input = { files, rules, information, check, chosen: all };
      const repaired = await worker.call('repair', input, { signal });
      const report = await buildReport({ check, repaired, rules, information, engine: 'wasm' });
      if (!signal.aborted) this.set({ repaired, report, failure: earlierFailure });
    } catch (failure) {
      if (!signal.aborted) this.set({ failure });
    }
  }
}
