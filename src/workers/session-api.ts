import type { RepairedSession, SessionCheck } from '#shared/check.ts';
import type { FileToRead } from './file-to-read.ts';
import type { Comparison } from '#shared/compare/comparison.ts';
import type { PackageVerification } from '#shared/pack/verify-package.ts';
import type { Judgement } from '#shared/judge/judge-session.ts';
import type { ChosenRepair, RepairPlan } from '#shared/repair/repair-plan.ts';
import type { CheckReport } from '#shared/report/check-report.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import type { MeasuredFile } from '#shared/session/measured-file.ts';
import type { ZipProblem } from '#shared/bytes/zip-source.ts';
import type { SessionInformation } from '#shared/session/session-information.ts';

/** Where the zip goes: into a file somebody picked, or through a port into a download. */
export type ZipSink =
  { kind: 'picked-file'; handle: FileSystemFileHandle } | { kind: 'port'; port: MessagePort };

export type ListedZip = { files: { path: string; size: number }[]; problems: ZipProblem[] };

export type PackOutput = {
  bytes: number;
  /** The file was read back from disk and is what was written; null where that is impossible. */
  verified: boolean | null;
};

/** Frames of a file, [startFrame, startFrame + frames). */
export type Excerpt = { startFrame: number; frames: number };

/** Where the saving is: writing, then (for a picked file) reading back. */
export type PackProgress = { step: 'writing' | 'verifying'; bytes: number };

/** What the session worker does: everything that reads files again once they are measured. */
export type SessionApi = {
  load: { input: WebAssembly.Module; progress: never; output: null };
  /** What is in a dropped zip. Throws AppError `zip-refused`. */
  listZip: { input: File; progress: never; output: ListedZip };
  /**
   * Compares the files of a zip with its own list of checksums; null where it has none. Progress is
   * bytes read so far. Throws AppError `zip-refused`.
   */
  verifyZip: { input: File; progress: number; output: PackageVerification | null };
  /** Some frames of a dropped file, one array a channel, full scale = 1. */
  excerpt: { input: Excerpt & { file: FileToRead }; progress: never; output: Float32Array[] };
  /** The same frames as they will be in the zip; null where the file is not packed as a track. */
  repairedExcerpt: {
    input: Excerpt & {
      path: string;
      files: FileToRead[];
      measured: MeasuredFile[];
      plan: RepairPlan;
    };
    progress: never;
    output: Float32Array[] | null;
  };
  /**
   * Judges what is measured so far, files of their own only, in the order of their paths. Files
   * add up from call to call until `fromStart` begins anew.
   */
  preview: {
    input: {
      fromStart: boolean;
      more: MeasuredFile[];
      rules: HouseRules;
      information: SessionInformation;
    };
    progress: never;
    output: Judgement;
  };
  compare: {
    input: { files: FileToRead[]; measured: MeasuredFile[] };
    progress: never;
    output: Comparison;
  };
  repair: {
    input: {
      files: FileToRead[];
      rules: HouseRules;
      information: SessionInformation;
      check: SessionCheck;
      chosen: ChosenRepair[];
    };
    progress: never;
    output: RepairedSession;
  };
  /** The zip's name and exact length, before a byte of it is made. */
  prepare: {
    input: {
      files: FileToRead[];
      check: SessionCheck;
      repaired: RepairedSession;
      report: CheckReport;
    };
    progress: never;
    output: { fileName: string; bytes: number };
  };
  /** Writes what `prepare` laid out. Throws AppError `disk-full`, `file-changed`, `cancelled`. */
  pack: { input: ZipSink; progress: PackProgress; output: PackOutput };
};
