import type { RepairedSession, SessionCheck } from '#shared/check.ts';
import type { Comparison } from '#shared/compare/comparison.ts';
import type { Finding } from '#shared/findings/finding.ts';
import type { PackageVerification } from '#shared/pack/verify-package.ts';
import type { ChosenRepair } from '#shared/repair/repair-plan.ts';
import type { CheckReport } from '#shared/report/check-report.ts';
import {
  emptySessionInformation,
  type SessionInformation,
} from '#shared/session/session-information.ts';
import type { MeasuredFile } from '#shared/session/measured-file.ts';
import type { FileToRead } from '../workers/file-to-read.ts';
import type { ReadAgain } from './session-files.ts';
import type { ViewedSession } from './viewed-session.ts';

export type BenchPhase = 'waiting' | 'making-sample' | 'measuring' | 'comparing' | 'checked';

export type ReadingProgress = {
  bytesDone: number;
  bytes: number;
  filesDone: number;
  files: number;
  startedAt: number;
  /** Bytes read of the files whose turn it is, by path. */
  current: ReadonlyMap<string, number>;
};

/** Something that was dropped and could not be taken in, with the reason in words. */
export type IntakeProblem = { path: string; reason: string };

/** Everything the screen shows; a new object at every change. */
export type BenchState = {
  phase: BenchPhase;
  folderName: string | null;
  problems: readonly IntakeProblem[];
  progress: ReadingProgress | null;
  /** Milliseconds the last reading took and bytes it read; null until it is over. */
  reading: { ms: number; bytes: number } | null;
  /** Whether the folder can be read again without being picked again. */
  canReadAgain: boolean;
  verification: ZipVerification | null;
  /** What the last reading of a session that was there already found; null for a first one. */
  readAgain: ReadAgain | null;
  information: SessionInformation;
  /** How often a song was forgotten here. */
  forgotten: number;
  chosen: readonly ChosenRepair[];
  /** What is found so far; complete once the phase is `checked`. */
  check: SessionCheck | null;
  view: ViewedSession | null;
  /** What the chosen repairs make, and the report of it; null while that is worked out. */
  repaired: RepairedSession | null;
  report: CheckReport | null;
  failure: unknown;
};

/** A zip that is, or was, compared with its own list of checksums. */
export type ZipVerification = { fileName: string } & (
  | { step: 'reading'; bytesRead: number; bytes: number }
  /** null: there is no list in it. */
  | { step: 'done'; found: PackageVerification | null }
  | { step: 'failed'; failure: unknown }
);

export const waitingBench: BenchState = {
  phase: 'waiting',
  folderName: null,
  problems: [],
  progress: null,
  reading: null,
  canReadAgain: false,
  verification: null,
  readAgain: null,
  information: emptySessionInformation(),
  forgotten: 0,
  chosen: [],
  check: null,
  view: null,
  repaired: null,
  report: null,
  failure: null,
};

/** What a reading under way has not said yet. */
export const unreadBench = {
  reading: null,
  repaired: null,
  report: null,
  readAgain: null,
} as const;

/** A finished check, as it was before the files are read again. */
export type CheckedBench = {
  state: BenchState;
  files: FileToRead[];
  measured: Map<string, MeasuredFile>;
  comparison: Comparison;
};

/** Every finding of a check, whatever it is about. */
export function judgedFindings({ judgement }: SessionCheck): Finding[] {
  return [...judgement.files.flatMap(({ findings }) => findings), ...judgement.session.findings];
}
