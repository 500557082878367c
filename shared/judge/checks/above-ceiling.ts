import { found, type TrackCheck } from '../check.ts';
import { peakOf } from '../track-measures.ts';
import { hasFlatRuns } from '../clipped-channels.ts';

/**
 * Peaks above the ceiling of the rules. Unless the rules give it a level of its own, it is not
 * said on top of clipping and over full scale, which say more.
 */
export const aboveCeiling: TrackCheck = (track, { rules }) => {
  const { channels } = track.measures;
  const peakDbfs = peakOf(track);
  const { ceilingDbfs } = rules.signal;
  if (peakDbfs === null || peakDbfs <= ceilingDbfs) return null;
  const saidAlready = channels.some(
    (channel) => channel.overFullScale.count > 0 || hasFlatRuns(channel, rules.signal),
  );
  if (saidAlready && rules.levels['above-ceiling'] === undefined) return null;
  return found('above-ceiling', { peakDbfs, ceilingDbfs });
};
