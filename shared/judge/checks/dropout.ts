import { joinPlaces } from '../../findings/finding-places.ts';
import type { FindingRange } from '../../findings/finding.ts';
import { found, type CheckedSession, type CheckedTrack, type TrackCheck } from '../check.ts';
import { isOnTheBeat } from '../beat-grid.ts';
import { sameInstrument } from '../same-part.ts';
import { onlyChannel } from '../track-measures.ts';

/**
 * A short abrupt silence inside running sound. Many of them in one file are chops, stutters or a
 * gate, so a style. A few are a look; at the same moment in another part they are the recording
 * that stopped for an instant, unless it stopped and went on with the beat.
 */
export const dropout: TrackCheck = (track, session) => {
  const places = placesOf(track, session);
  if (!places) return null;
  const shared = new Set<FindingRange>();
  const sharedWith: string[] = [];
  for (const other of session.tracks) {
    if (other.path === track.path || sameInstrument(other.name, track.name)) continue;
    const together = atTheSameTime(track, places.ranges, other, session);
    if (together.length === 0) continue;
    sharedWith.push(other.path);
    for (const range of together) shared.add(range);
  }
  const { sampleRateHz } = track.format;
  const longest = Math.max(...places.ranges.map((range) => range.endFrame - range.startFrame));
  return found(
    'dropout',
    {
      longestMs: (longest / sampleRateHz) * 1000,
      firstSeconds: (places.ranges[0]?.startFrame ?? 0) / sampleRateHz,
      sharedPlaces: shared.size,
      sharedWith,
    },
    {
      ...places,
      level: [...shared].some((range) => !isOnTheBeat(range, track, session)) ? 'must-fix' : 'look',
    },
  );
};

function placesOf(
  { measures }: CheckedTrack,
  { rules }: CheckedSession,
): { places: number; ranges: FindingRange[]; channel?: number } | null {
  const most = rules.signal.dropoutMostPlaces;
  if (measures.channels.some(({ dropouts }) => dropouts.count > most)) return null;
  const hit = measures.channels.flatMap(({ dropouts }, index) =>
    dropouts.count > 0 ? [{ ...dropouts, index }] : [],
  );
  if (hit.length === 0) return null;
  const joined = joinPlaces(hit);
  if (joined.places > most) return null;
  return { ...joined, ...onlyChannel(hit.map(({ index }) => index)) };
}

function atTheSameTime(
  track: CheckedTrack,
  ranges: readonly FindingRange[],
  other: CheckedTrack,
  session: CheckedSession,
): FindingRange[] {
  const others = placesOf(other, session)?.ranges ?? [];
  // Half a sample of slack: times in seconds are not exact.
  const within =
    session.rules.signal.dropoutSimultaneousMs / 1000 + 0.5 / track.format.sampleRateHz;
  return ranges.filter((range) => {
    const at = range.startFrame / track.format.sampleRateHz;
    return others.some(
      ({ startFrame }) => Math.abs(startFrame / other.format.sampleRateHz - at) <= within,
    );
  });
}
