import { found, type TrackCheck } from '../check.ts';
import { stereoPair } from '../track-measures.ts';

/** One side of a stereo file is silent while the other sounds. */
export const oneSideSilent: TrackCheck = (track, { rules }) => {
  if (!stereoPair(track)) return null;
  const [left = -Infinity, right = -Infinity] = track.measures.channels.map(
    (channel) => channel.peakDbfs ?? -Infinity,
  );
  const { oneSideSilentDbfs, otherSideSoundsDbfs } = rules.signal;
  if (Math.min(left, right) >= oneSideSilentDbfs || Math.max(left, right) <= otherSideSoundsDbfs)
    return null;
  const silentSide = left < right ? 'left' : 'right';
  return found(
    'one-side-silent',
    { silentSide, peakDbfs: Math.max(left, right) },
    { channel: silentSide === 'left' ? 0 : 1 },
  );
};
