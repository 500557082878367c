import { found, type TrackCheck } from '../check.ts';
import { isReturnOrEffect } from '../part-kinds.ts';
import { peakOf } from '../track-measures.ts';

/** Hardly anything in the file. Returns and effects are often that quiet, so not for them. */
export const nearlySilent: TrackCheck = (track, { rules }) => {
  const peakDbfs = peakOf(track);
  const { silentDbfs, nearlySilentDbfs } = rules.signal;
  if (peakDbfs === null || peakDbfs <= silentDbfs || peakDbfs >= nearlySilentDbfs) return null;
  if (isReturnOrEffect(track.name)) return null;
  return found('nearly-silent', { peakDbfs, floorDbfs: nearlySilentDbfs });
};
