import { sessionFormat, framesAtRate } from '../compare/session-format.ts';
import { looksLikeLooseClips, startEvidence } from '../compare/starts.ts';
import { findingDefinitions } from '../findings/catalogue/definitions.ts';
import type { Finding, Level } from '../findings/finding.ts';
import type { HouseRules } from '../rules/house-rules.ts';
import type { FileRole, SessionInformation } from '../session/session-information.ts';
import { answerBook, type AnswerBook } from './answers.ts';
import { belongsToSession } from './belongs-to-session.ts';
import { isCutFromLongerRecording } from './borders.ts';
import type { CheckedFile, CheckedSession, CheckedTrack, Found } from './check.ts';
import {
  companionChecks,
  fileChecks,
  formatChecks,
  nameChecks,
  readingChecks,
  sessionChecks,
  signalChecks,
} from './checks.ts';
import { nameFiles } from './file-names.ts';
import type { JudgedSession } from './judged-session.ts';
import { levelUnderRules } from './levels.ts';
import { countParts } from './same-part.ts';
import { inCodeOrder, shareLines } from './shared-lines.ts';
import { countLevels, verdictOf, type Verdict } from './verdict.ts';

/** Raised whenever the same measures and rules would be judged otherwise. */
export const judgeVersion = 1;

export type JudgedFileResult = {
  path: string;
  role: FileRole;
  /** Group id of the naming table; null if no instrument was recognised. */
  group: string | null;
  /** Without extension; null where no name can be proposed. */
  proposedName: string | null;
  /** About this file alone, in the order of the codes; `files` is [path]. */
  findings: Finding[];
};

export type Judgement = {
  /** In the order of the session's files. */
  files: JudgedFileResult[];
  session: {
    sampleRateHz: number | null;
    bits: number | null;
    frames: number | null;
    /** It is proven that all tracks begin at the same moment. */
    startsProven: boolean;
    /** About several files or the whole session, in the order of the codes. */
    findings: Finding[];
  };
  verdict: Verdict;
  /** Of all findings, answered or not. */
  counts: Record<Level, number>;
};

/**
 * Holds a measured session against house rules. Pure and quick, because it reads no byte: it runs
 * again at every change of a rule, a role, a name or an answer.
 */
export function judgeSession(
  session: JudgedSession,
  rules: HouseRules,
  information: SessionInformation,
): Judgement {
  const checked = prepareSession(session, rules, information);
  const answerTo = answerBook(information.answers);
  const tracks = new Map(checked.tracks.map((track) => [track.path, track]));

  const alone = checked.files.map((file) =>
    checkFile(file, tracks.get(file.path), checked).flatMap((found) =>
      toFinding(found, file, checked, answerTo),
    ),
  );
  const inSession = checked.files.filter((file) => belongsToSession(file)).length;
  const { byFile, shared } = shareLines(alone, inSession);
  const about = sessionChecks.flatMap((check) =>
    check(checked).flatMap((found) => toFinding(found, null, checked, answerTo)),
  );
  const sessionFindings = inCodeOrder([
    ...about,
    ...shared.map((line) => ({ ...line, answer: line.answer ?? answerTo(line.code, null) })),
  ]);

  const all = [...byFile.flat(), ...sessionFindings];
  return {
    files: checked.files.map(({ path, role, name }, index) => ({
      path,
      role,
      group: name.groupId,
      proposedName: name.proposedName,
      findings: inCodeOrder(byFile[index] ?? []),
    })),
    session: {
      sampleRateHz: checked.format.sampleRateHz,
      bits: checked.format.bits,
      frames: checked.format.frames,
      startsProven:
        checked.tracks.length > 0 && checked.tracks.every(({ start }) => start.proof !== null),
      findings: sessionFindings,
    },
    verdict: verdictOf(all),
    counts: countLevels(all),
  };
}

function checkFile(
  file: CheckedFile,
  track: CheckedTrack | undefined,
  session: CheckedSession,
): Found[] {
  if (file.role === 'leave-out' || file.role === 'note') return [];
  const found = fileChecks.map((check) => check(file, session));
  if (file.format && file.measures) {
    const measured = { format: file.format, measures: file.measures, reading: file.reading };
    found.push(...readingChecks.map((check) => check(measured)));
  }
  if (track) {
    found.push(...[...formatChecks, ...companionChecks].map((check) => check(track, session)));
    const heard = track.role === 'click' ? [] : signalChecks.map((check) => check(track, session));
    // A guide is replaced anyway: how it sounds is only worth a note.
    found.push(...heard.map((one) => (one && track.role === 'guide' ? asNote(one) : one)));
  }
  if (belongsToSession(file)) found.push(...nameChecks.map((check) => check(file, session)));
  return found.filter((finding) => finding !== null);
}

function asNote(found: Found): Found {
  return { ...found, level: 'note' };
}

function toFinding(
  found: Found,
  file: CheckedFile | null,
  { rules }: CheckedSession,
  answerTo: AnswerBook,
): Finding[] {
  const level = levelUnderRules(found.code, found.level, file?.name.groupId ?? null, rules);
  if (level === null) return [];
  const definition = findingDefinitions[found.code];
  const files = file ? [file.path] : (found.files ?? []);
  const answer =
    answerTo(found.code, files[0] ?? null) ?? (file ? null : answerTo(found.code, null));
  return [
    {
      code: found.code,
      level,
      files,
      // Of a mono file there is no other channel it could be about.
      channel: file?.format?.channels === 1 ? null : (found.channel ?? null),
      places: found.places ?? 0,
      ranges: found.ranges ?? [],
      args: found.args,
      rule: definition.rule,
      repairs: [...(found.repairs ?? definition.repairs)],
      answer,
    },
  ];
}

function prepareSession(
  session: JudgedSession,
  rules: HouseRules,
  information: SessionInformation,
): CheckedSession {
  const named = nameFiles(
    session.files.map(({ path, format }) => ({ path, channels: format?.channels ?? null })),
    rules.names,
    information,
  );
  const files = session.files.map((file, index): CheckedFile => {
    const name = named[index] ?? never(file.path);
    return {
      path: file.path,
      reading: file.reading,
      format: file.format,
      measures: file.measures,
      role: file.reading.kind === 'not-audio' && name.role !== 'leave-out' ? 'note' : name.role,
      name,
    };
  });
  const measured = files.flatMap((file) =>
    file.format && file.measures && belongsToSession(file)
      ? [{ ...file, format: file.format, measures: file.measures }]
      : [],
  );
  const tolerance = rules.startAndLength.lengthToleranceFrames;
  const format = sessionFormat(
    measured.map((track) => track.format),
    rules.format.sampleRatesHz,
    tolerance,
  );
  const starts = startEvidence(measured, format, session.comparison, {
    lengthToleranceFrames: tolerance,
    silentEndDbfs: rules.signal.tailDbfs,
  });
  return {
    rules,
    information,
    files,
    filesOfPart: countParts(named),
    tracks: measured.map((track, index): CheckedTrack => ({
      ...track,
      framesAtSessionRate: framesAtRate(
        track.format,
        format.sampleRateHz ?? track.format.sampleRateHz,
      ),
      start: starts[index] ?? never(track.path),
    })),
    format,
    looseClips: looksLikeLooseClips(measured, format),
    cutFromLongerRecording: isCutFromLongerRecording(measured, rules.signal),
    comparison: session.comparison,
  };
}

function never(path: string): never {
  throw new Error(`Nothing was worked out for ${path}`);
}
