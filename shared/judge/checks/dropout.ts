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
  const gaps = gapsOf(session);
  const own = gaps.get(track);
  if (!own) return null;
  const shared = new Set<FindingRange>();
  const sharedWith: string[] = [];
  for (const [other, { ranges }] of gaps) {
    if (other === track || sameInstrument(other.name, track.name)) continue;
    const together = atTheSameTime(track, own.ranges, other, ranges, session);
    if (together.length > 0) sharedWith.push(other.path);
    for (const range of together) shared.add(range);
  }
  const { sampleRateHz } = track.format;
  const longest = Math.max(...own.ranges.map((range) => range.endFrame - range.startFrame));
  const isStumble = [...shared].some((range) => !isOnTheBeat(range, track, session));
  return found(
    'dropout',
    {
      longestMs: (longest / sampleRateHz) * 1000,
      firstSeconds: (own.ranges[0]?.startFrame ?? 0) / sampleRateHz,
      sharedPlaces: shared.size,
      sharedWith,
    },
    { ...own, level: isStumble ? 'must-fix' : 'look' },
  );
};

type Gaps = { places: number; ranges: FindingRange[]; channel?: number };

const known = new WeakMap<CheckedSession, Map<CheckedTrack, Gaps>>();

/** The gaps of all tracks that have some, but not so many that they are a style. */
function gapsOf(session: CheckedSession): Map<CheckedTrack, Gaps> {
  const before = known.get(session);
  if (before) return before;
  const gaps = new Map<CheckedTrack, Gaps>();
  for (const track of session.tracks) {
    const own = fewGaps(track, session.rules.signal.dropoutMostPlaces);
    if (own) gaps.set(track, own);
  }
  known.set(session, gaps);
  return gaps;
}

function fewGaps({ measures }: CheckedTrack, most: number): Gaps | null {
  const hit = measures.channels.flatMap(({ dropouts }, index) =>
    dropouts.count > 0 ? [{ ...dropouts, index }] : [],
  );
  if (hit.length === 0 || hit.some(({ count }) => count > most)) return null;
  const joined = joinPlaces(hit);
  return joined.places > most ? null : { ...joined, ...onlyChannel(hit.map(({ index }) => index)) };
}

function atTheSameTime(
  track: CheckedTrack,
  own: readonly FindingRange[],
  other: CheckedTrack,
  others: readonly FindingRange[],
  { rules }: CheckedSession,
): FindingRange[] {
  // Half a sample of slack: times in seconds are not exact.
  const within = rules.signal.dropoutSimultaneousMs / 1000 + 0.5 / track.format.sampleRateHz;
  return own.filter((range) => {
    const at = range.startFrame / track.format.sampleRateHz;
    return others.some(
      ({ startFrame }) => Math.abs(startFrame / other.format.sampleRateHz - at) <= within,
    );
  });
}
