import { found, type TrackCheck } from '../check.ts';
import { peakOf } from '../track-measures.ts';

/**
 * The wave between the samples goes above 0 dBTP. Harmless in a mixing session, so house rules
 * have to ask for it; where the samples themselves go above, over-full-scale says it.
 */
export const betweenSampleOver: TrackCheck = (track) => {
  const { truePeakDbtp } = track.measures;
  if (truePeakDbtp === null || truePeakDbtp <= 0 || (peakOf(track) ?? 0) > 0) return null;
  return found('between-sample-over', { truePeakDbtp });
};
