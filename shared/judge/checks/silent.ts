import { found, type TrackCheck } from '../check.ts';
import { peakOf } from '../track-measures.ts';

/** Nothing in the file: a failed export, or a muted track. */
export const silent: TrackCheck = (track, { rules }) =>
  (peakOf(track) ?? -Infinity) <= rules.signal.silentDbfs ? found('silent', {}) : null;
