import { judgeCheck, type RepairedSession, type SessionCheck } from '#shared/check.ts';
import type { Comparison } from '#shared/compare/comparison.ts';
import { AppError } from '#shared/errors.ts';
import type { Finding } from '#shared/findings/finding.ts';
import { unaskedRepairs } from '#shared/repair/choose-repairs.ts';
import type { ChosenRepair } from '#shared/repair/repair-plan.ts';
import { buildReport } from '#shared/report/build-report.ts';
import type { CheckReport } from '#shared/report/check-report.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { measureAll, type MeasureProgress } from '#shared/session/measure-all.ts';
import type { MeasuredFile } from '#shared/session/measured-file.ts';
import {
  emptySessionInformation,
  type SessionInformation,
} from '#shared/session/session-information.ts';
import type { DroppedFolder } from '../browser/dropped-files.ts';
import { fileOnDisk } from '../browser/file-source.ts';
import { loadMeters } from '../browser/load-meters.ts';
import { WorkerLink } from '../workers/bridge.ts';
import { createMeasurePool, type MeasurePool } from '../workers/measure-pool.ts';
import { sampleSong } from './sample-session/sample-song.ts';
import { openSessionWorker, type SessionWorker } from '../workers/session-link.ts';
import type { SampleApi } from '../workers/sample-api.ts';
import type { FileToRead } from '../workers/session-api.ts';

/** Every finding of a check, whatever it is about. */
function judgedFindings({ judgement }: SessionCheck): Finding[] {
  return [...judgement.files.flatMap(({ findings }) => findings), ...judgement.session.findings];
}

export type BenchPhase = 'waiting' | 'measuring' | 'comparing' | 'checked';

/** Everything the screen shows; a new object at every change. */
export type BenchState = {
  phase: BenchPhase;
  folderName: string | null;
  progress: MeasureProgress | null;
  /** Milliseconds the reading took; null until it is over. */
  readingMs: number | null;
  information: SessionInformation;
  chosen: ChosenRepair[];
  check: SessionCheck | null;
  /** What the chosen repairs make; null while that is worked out. */
  repaired: RepairedSession | null;
  report: CheckReport | null;
  failure: unknown;
};

const waiting: BenchState = {
  phase: 'waiting',
  folderName: null,
  progress: null,
  readingMs: null,
  information: emptySessionInformation(),
  chosen: [],
  check: null,
  repaired: null,
  report: null,
  failure: null,
};

/**
 * The check as it runs in one tab: takes a dropped folder through measuring, comparing, judging
 * and repairing, and holds what came of it. Knows no React, so it can be tested without.
 */
export class Bench {
  private state: BenchState = waiting;
  private readonly listeners = new Set<() => void>();
  private running: AbortController | null = null;
  private repairing: AbortController | null = null;
  private files: FileToRead[] = [];
  private measured: MeasuredFile[] = [];
  private comparison: Comparison | null = null;
  private module: Promise<WebAssembly.Module> | null = null;
  private pool: MeasurePool | null = null;
  private worker: SessionWorker | null = null;
  private readonly rules: HouseRules;

  constructor(rules: HouseRules) {
    this.rules = rules;
  }

  readonly getState = (): BenchState => this.state;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  /** Checks a dropped folder; what was on the bench before is put away. */
  readonly drop = (folder: DroppedFolder): void => {
    void this.run(folder);
  };

  /** Makes the sample session in a worker and checks it like any other folder. */
  readonly dropSample = async (): Promise<void> => {
    const link = new WorkerLink<SampleApi>(
      new Worker(new URL('../workers/sample.worker.ts', import.meta.url), { type: 'module' }),
    );
    const { artist, title, bpm } = sampleSong;
    this.set({
      ...waiting,
      phase: 'measuring',
      information: { ...waiting.information, artist, title, tempo: { kind: 'fixed', bpm } },
    });
    try {
      const files = await link.call('make', null);
      await this.run({ folderName: title, files });
    } catch (failure) {
      this.set({ ...waiting, failure });
    } finally {
      link.close();
    }
  };

  /** Stops at once and clears the bench. */
  readonly cancel = (): void => {
    this.running?.abort();
    this.set({ ...waiting, information: this.state.information });
  };

  readonly fail = (failure: unknown): void => {
    this.set({ failure });
  };

  readonly setInformation = (change: Partial<SessionInformation>): void => {
    this.set({ information: { ...this.state.information, ...change } });
    if (this.state.phase === 'checked') void this.judge();
  };

  /** Takes repairs on; each can be taken back. */
  readonly choose = (repairs: readonly ChosenRepair[]): void => {
    this.set({ chosen: [...this.state.chosen, ...repairs] });
    void this.judge();
  };

  readonly undo = (repairs: readonly ChosenRepair[]): void => {
    this.set({ chosen: this.state.chosen.filter((chosen) => !repairs.includes(chosen)) });
    void this.judge();
  };

  /** Lays the zip out: its name and exact size, before a byte is made. */
  readonly prepare = async (): Promise<{ fileName: string; bytes: number }> => {
    const { check, repaired, report } = this.state;
    if (!check || !repaired || !report) throw new AppError('conflict');
    const worker = await this.sessionWorker();
    return worker.call('prepare', { files: this.files, check, repaired, report });
  };

  readonly sessionWorker = async (): Promise<SessionWorker> => {
    this.worker ??= await openSessionWorker(await this.meters());
    return this.worker;
  };

  close(): void {
    this.running?.abort();
    this.repairing?.abort();
    this.pool?.close();
    this.worker?.close();
  }

  private set(change: Partial<BenchState>): void {
    const { failure } = change;
    // Expected failures are said on screen; a bug also belongs where bugs are looked for.
    if (failure != null && !(failure instanceof AppError)) reportError(failure);
    this.state = { ...this.state, ...change };
    for (const listener of this.listeners) listener();
  }

  private meters(): Promise<WebAssembly.Module> {
    this.module ??= loadMeters();
    return this.module;
  }

  private async run({ folderName, files }: DroppedFolder): Promise<void> {
    this.running?.abort();
    const running = new AbortController();
    this.running = running;
    this.files = files;
    this.set({ ...waiting, phase: 'measuring', folderName, information: this.state.information });
    const startedAt = performance.now();
    try {
      this.measured = await this.measure(running.signal);
      this.set({ phase: 'comparing', readingMs: performance.now() - startedAt });
      const worker = await this.sessionWorker();
      this.comparison = await worker.call(
        'compare',
        { files: this.files, measured: this.measured },
        { signal: running.signal },
      );
      await this.judge();
      const { failure } = this.state;
      if (running.signal.aborted) return;
      this.set(failure === null ? { phase: 'checked' } : { ...waiting, failure });
    } catch (failure) {
      if (!running.signal.aborted) this.set({ ...waiting, failure });
    }
  }

  private measure(signal: AbortSignal): Promise<MeasuredFile[]> {
    const { files } = this;
    if (files.length === 0) throw new AppError('nothing-to-check');
    const byPath = new Map(files.map(({ path, file }) => [path, file]));
    this.pool ??= createMeasurePool(() => this.meters());
    const pool = this.pool;
    return measureAll(
      files.map(({ path, file }) => fileOnDisk(path, file)),
      ({ path }, options) => {
        let readBytes = 0;
        return pool.measure(
          { path, file: byPath.get(path)! },
          {
            signal: options.signal,
            onProgress: (bytes) => {
              options.onBytes?.(bytes - readBytes);
              readBytes = bytes;
            },
          },
        );
      },
      { atOnce: pool.size, signal, onProgress: (progress) => this.set({ progress }) },
    );
  }

  /** Judges again and works out what the chosen repairs make; a later call overtakes. */
  private async judge(): Promise<void> {
    const { comparison, measured, rules, files } = this;
    if (!comparison) return;
    this.repairing?.abort();
    const repairing = new AbortController();
    this.repairing = repairing;
    const { information, chosen } = this.state;
    const check = judgeCheck({ files: measured, comparison }, rules, information);
    this.set({ check, repaired: null });
    try {
      const worker = await this.sessionWorker();
      const repaired = await worker.call(
        'repair',
        {
          files,
          rules,
          information,
          check,
          chosen: [...unaskedRepairs(judgedFindings(check)), ...chosen],
        },
        { signal: repairing.signal },
      );
      const report = await buildReport({ check, repaired, rules, information, engine: 'wasm' });
      if (!repairing.signal.aborted) this.set({ repaired, report, failure: null });
    } catch (failure) {
      if (!repairing.signal.aborted) this.set({ failure });
    }
  }
}
