import type { Comparison } from '../compare/comparison.ts';
import type { SessionFormat } from '../compare/session-format.ts';
import type { StartEvidence } from '../compare/starts.ts';
import type { ArgumentsOf } from '../findings/catalogue/definitions.ts';
import type { FindingCode, FindingRange, Level, RepairKind } from '../findings/finding.ts';
import type { Measures } from '../measure/measures.ts';
import type { HouseRules } from '../rules/house-rules.ts';
import type { FileRole, SessionInformation } from '../session/session-information.ts';
import type { TrackFormat } from '../wave/track-format.ts';
import type { FileName } from './file-names.ts';
import type { JudgedReading } from './judged-session.ts';

/** A dropped file with what its name and the artist say about it. */
export type CheckedFile = {
  path: string;
  reading: JudgedReading;
  /** Both null unless the file was measured. */
  format: TrackFormat | null;
  measures: Measures | null;
  role: FileRole;
  name: FileName;
};

/** What the reader of a file can vouch for, whatever the file is for. */
export type MeasuredFile = { reading: JudgedReading; format: TrackFormat; measures: Measures };

/** A checked file whose samples were measured. */
export type CheckedTrack = CheckedFile & {
  format: TrackFormat;
  measures: Measures;
  /** Its length in frames at the session's rate. */
  framesAtSessionRate: number;
  start: StartEvidence;
};

/** What every check may look at. `tracks` are measured files that belong to the session. */
export type CheckedSession = {
  rules: HouseRules;
  information: SessionInformation;
  files: readonly CheckedFile[];
  /** How many files there are of each part, by partKey(). */
  filesOfPart: ReadonlyMap<string, number>;
  /** Measured files with the role of a track, a click or a guide. */
  tracks: readonly CheckedTrack[];
  format: SessionFormat;
  /** The set looks like clips that each begin where they begin in the song. */
  looseClips: boolean;
  /** Sound runs through the borders of many tracks: a live set cut into songs. */
  cutFromLongerRecording: boolean;
  comparison: Comparison;
};

/** What a check found, before house rules, level and answer are put to it. */
export type Found<Code extends FindingCode = FindingCode> = {
  code: Code;
  args: ArgumentsOf<Code>;
  /** Where the check knows better than the catalogue's default. */
  level?: Level;
  /** 0-based; left out where it concerns the whole file. */
  channel?: number;
  places?: number;
  ranges?: FindingRange[];
  /** Instead of the catalogue's. */
  repairs?: readonly RepairKind[];
  /** Files a session finding names; left out in findings about one file. */
  files?: string[];
};

/** Writes down what was found, with the arguments its code asks for. */
export function found<Code extends FindingCode>(
  code: Code,
  args: ArgumentsOf<Code>,
  rest: Omit<Found<Code>, 'code' | 'args'> = {},
): Found {
  return { code, args, ...rest };
}

/** Looks at any file that is or should be audio, measured or not. */
export type FileCheck = (file: CheckedFile, session: CheckedSession) => Found | null;
/** Looks at how the reading of a measured file went. */
export type ReadingCheck = (file: MeasuredFile) => Found | null;
/** Looks at one measured track. */
export type TrackCheck = (track: CheckedTrack, session: CheckedSession) => Found | null;
/** Looks at all files together. */
export type SessionCheck = (session: CheckedSession) => Found[];
