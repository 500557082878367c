import { found, type TrackCheck } from '../check.ts';
import { highest, onlyChannel } from '../track-measures.ts';
import { hasFlatRuns, isClipped } from '../clipped-channels.ts';

/** Flat in nearly every cycle: fuzz, a square wave, clipped on purpose. Worth knowing, no fault. */
export const flatTops: TrackCheck = (track, { rules }) => {
  const { channels } = track.measures;
  if (channels.some((channel) => isClipped(channel, track, rules.signal))) return null;
  const flat = channels.flatMap((channel, index) =>
    hasFlatRuns(channel, rules.signal) ? [{ channel, index }] : [],
  );
  if (flat.length === 0) return null;
  const share = Math.max(...flat.map(({ channel }) => channel.clipping.flatCycleShare));
  return found(
    'flat-tops',
    {
      flatCyclePercent: Math.round(share * 100),
      ceilingDbfs: highest(flat.map(({ channel }) => channel.clipping.ceilingDbfs)) ?? 0,
    },
    onlyChannel(flat.map(({ index }) => index)),
  );
};
