import type { Measures } from '../measure/measures.ts';
import type { TrackFormat } from '../wave/track-format.ts';
import type { Alignment, Comparison, Match } from './comparison.ts';
import { framesAtRate, type SessionFormat } from './session-format.ts';

/** What speaks for or against a track beginning at the same moment as the others. */
export type StartEvidence = {
  /** What proves that it does; null where nothing does. */
  proof: 'time-reference' | 'equal-length' | 'silent-end' | null;
  /** Frames (at the session's rate) it begins later than the others, where there is evidence. */
  shiftFrames: number | null;
  /** Time stamp minus the session's, frames at the session's rate; null without either. */
  stampDifferenceFrames: number | null;
  /** It sounds within its first 10 ms while most tracks of full length do not. */
  soundsAtOnce: boolean;
  /** It fits the others better when all end together than when all begin together. */
  fitsAtEnd: boolean;
};

export type TrackForStart = { path: string; format: TrackFormat; measures: Measures };

/** Sounding this early is sounding at once: the width of one window of the sound meter. */
const atOnceSeconds = 0.01;

/** Exports of one session can differ by this much in length: their ends were rounded. */
const roundingSeconds = 0.001;

/**
 * How much better notes must begin with those of others, and how well at least. Tried on a sampled
 * band: of parts cut at their start a third are seen by it, of parts cut at their end one in a
 * hundred is doubted.
 */
const betterAgreement = 0.15;
const leastAgreement = 0.25;

/** Parts that end together in the music do so within this time. */
const endTogetherSeconds = 0.3;
const leastEndSilenceSeconds = 0.25;

/** A track that sounds in its first 10 ms (louder than -60 dBFS). */
export function soundsAtOnce({ format, measures }: TrackForStart): boolean {
  return measures.channels.some(
    ({ firstSoundFrame }) =>
      firstSoundFrame !== null && firstSoundFrame < atOnceSeconds * format.sampleRateHz,
  );
}

/** The time stamp most tracks carry, in seconds; null where fewer than half agree. */
export function sessionTimeReferenceSeconds(tracks: readonly TrackForStart[]): number | null {
  const counts = new Map<number, number>();
  for (const { format } of tracks) {
    const seconds = timeReferenceSeconds(format);
    if (seconds !== null) counts.set(seconds, (counts.get(seconds) ?? 0) + 1);
  }
  const [most] = [...counts].sort((a, b) => b[1] - a[1] || a[0] - b[0]);
  return most && most[1] >= 2 && most[1] * 2 >= tracks.length ? most[0] : null;
}

function timeReferenceSeconds(format: TrackFormat): number | null {
  return format.timeReferenceFrames === null
    ? null
    : format.timeReferenceFrames / format.sampleRateHz;
}

/**
 * Loose clips: every track begins where its own first clip does. Seen by lengths that spread by
 * more than a fifth while at least half of the tracks sound at once. Two things speak against it:
 * a length that half of the tracks share, and many tracks that begin with a long silence, as
 * exports from a common start do when only their ends are trimmed.
 */
export function looksLikeLooseClips(
  tracks: readonly TrackForStart[],
  session: SessionFormat,
): boolean {
  if (tracks.length < 3 || session.tracksWithThatLength * 2 >= tracks.length) return false;
  const stamp = sessionTimeReferenceSeconds(tracks);
  if (stamp !== null && stamp > 0) return false;
  const seconds = tracks.map(({ format }) => format.frames / format.sampleRateHz);
  const longest = Math.max(...seconds);
  if ((longest - Math.min(...seconds)) / longest <= 0.2) return false;
  const atOnce = tracks.filter(soundsAtOnce).length;
  return atOnce * 2 >= tracks.length && tracks.filter(entersLate).length * 4 < tracks.length;
}

/** Silent for its first five seconds: a clip that was cut loose never is. */
function entersLate({ format, measures }: TrackForStart): boolean {
  const firstSounds = measures.channels
    .map((channel) => channel.firstSoundFrame)
    .filter((frame) => frame !== null);
  return firstSounds.length > 0 && Math.min(...firstSounds) > 5 * format.sampleRateHz;
}

/**
 * Works out for every track whether its start is proven. A proof is: the time stamp most tracks
 * carry; the length at least half of the tracks have; or differing from that length only at a
 * silent end, by being shorter or by a millisecond of rounding, unless it fits the others better
 * at their end. `silentEndDbfs` is the peak of the last 50 ms that still counts as silent.
 */
export function startEvidence(
  tracks: readonly TrackForStart[],
  session: SessionFormat,
  { matches, alignments = [] }: Comparison,
  rules: { lengthToleranceFrames: number; silentEndDbfs: number },
): StartEvidence[] {
  const sessionRateHz = session.sampleRateHz ?? 48_000;
  const sessionFrames = session.frames ?? 0;
  const loose = looksLikeLooseClips(tracks, session);
  const stamp = loose ? null : sessionTimeReferenceSeconds(tracks);
  const halfShareLength =
    session.tracksWithThatLength >= 2 && session.tracksWithThatLength * 2 >= tracks.length;
  const framesOf = new Map(
    tracks.map(({ path, format }) => [path, framesAtRate(format, sessionRateHz)]),
  );
  const hasSessionLength = (track: TrackForStart): boolean =>
    sameLength(track.format, session, rules.lengthToleranceFrames);
  const fullLength = tracks.filter(hasSessionLength);
  const endSilences = fullLength.map(endSilenceSeconds);
  const startsAtOnceAnyway = fullLength.filter(soundsAtOnce).length * 2 >= fullLength.length;

  return tracks.map((track) => {
    const ownStamp = timeReferenceSeconds(track.format);
    const stampDifferenceFrames =
      stamp === null || ownStamp === null ? null : Math.round((ownStamp - stamp) * sessionRateHz);
    const frames = framesOf.get(track.path) ?? 0;
    const atOnce = !startsAtOnceAnyway && soundsAtOnce(track);
    const evidence: StartEvidence = {
      proof: null,
      shiftFrames: null,
      stampDifferenceFrames,
      soundsAtOnce: atOnce,
      fitsAtEnd:
        !hasSessionLength(track) &&
        (keepsTimeAtEnd(track.path, alignments) ||
          endsWithOthers(track, endSilences, (sessionFrames - frames) / sessionRateHz)),
    };
    if (stampDifferenceFrames === 0) evidence.proof = 'time-reference';
    else if (halfShareLength && hasSessionLength(track)) evidence.proof = 'equal-length';
    else if (fitsAt(stampDifferenceFrames, frames, sessionFrames, sessionRateHz))
      evidence.shiftFrames = stampDifferenceFrames;
    else {
      evidence.shiftFrames = shiftByTwin(track, matches, framesOf);
      if (
        evidence.shiftFrames === null &&
        !stampDifferenceFrames &&
        halfShareLength &&
        frames - sessionFrames <= roundingSeconds * sessionRateHz &&
        !atOnce &&
        !evidence.fitsAtEnd &&
        endsSilent(track.measures, rules.silentEndDbfs)
      )
        evidence.proof = 'silent-end';
    }
    return evidence;
  });
}

/** Whether a file has the session's length; a change of rate costs up to two frames in rounding. */
export function sameLength(
  format: TrackFormat,
  session: SessionFormat,
  toleranceFrames: number,
): boolean {
  if (session.frames === null || session.sampleRateHz === null) return true;
  const rounding = format.sampleRateHz === session.sampleRateHz ? 0 : 2;
  const difference = framesAtRate(format, session.sampleRateHz) - session.frames;
  return Math.abs(difference) <= toleranceFrames + rounding;
}

/** A later stamp that puts a shorter file inside the session: it was cut at its start. */
function fitsAt(
  stampDifferenceFrames: number | null,
  frames: number,
  sessionFrames: number,
  sampleRateHz: number,
): boolean {
  return (
    stampDifferenceFrames !== null &&
    stampDifferenceFrames > 0 &&
    stampDifferenceFrames + frames <= sessionFrames + 0.05 * sampleRateHz
  );
}

/**
 * The same sound in a longer file, later there by just what this one lacks: this one's start was
 * cut off.
 */
function shiftByTwin(
  track: TrackForStart,
  matches: readonly Match[],
  framesOf: ReadonlyMap<string, number>,
): number | null {
  const own = framesOf.get(track.path) ?? 0;
  for (const match of matches) {
    if (match.first !== track.path && match.second !== track.path) continue;
    const other = match.first === track.path ? match.second : match.first;
    const otherIsLaterBy = match.first === track.path ? match.shiftFrames : -match.shiftFrames;
    const lacking = (framesOf.get(other) ?? own) - own;
    if (lacking > 0 && Math.abs(otherIsLaterBy - lacking) <= 2) return lacking;
  }
  return null;
}

/** Its notes begin with those of the others when all end together, and not when all begin so. */
function keepsTimeAtEnd(path: string, alignments: readonly Alignment[]): boolean {
  const alignment = alignments.find((one) => one.path === path);
  if (!alignment) return false;
  const { agreementFromStart, agreementFromEnd } = alignment;
  return (
    agreementFromEnd >= leastAgreement && agreementFromEnd - agreementFromStart >= betterAgreement
  );
}

/**
 * It is silent for as long at its end as a fifth of the tracks of full length are: placed at the
 * common end it would end with them. Trimming an end leaves less silence than that.
 */
function endsWithOthers(
  track: TrackForStart,
  endSilences: readonly number[],
  lackingSeconds: number,
): boolean {
  const own = endSilenceSeconds(track);
  // So little can be missing at either end without anything showing here.
  if (own < leastEndSilenceSeconds || lackingSeconds < 2 * endTogetherSeconds) return false;
  const alike = endSilences.filter((other) => Math.abs(other - own) <= endTogetherSeconds).length;
  return alike >= Math.max(2, endSilences.length / 5);
}

/** Seconds from the last sound (louder than -60 dBFS) to the end; all of a silent file. */
function endSilenceSeconds({ format, measures }: TrackForStart): number {
  const last = Math.max(-1, ...measures.channels.map(({ lastSoundFrame }) => lastSoundFrame ?? -1));
  return (measures.frames - 1 - last) / format.sampleRateHz;
}

function endsSilent(measures: Measures, silentEndDbfs: number): boolean {
  return measures.channels.every(
    ({ tailPeakDbfs }) => tailPeakDbfs === null || tailPeakDbfs <= silentEndDbfs,
  );
}
