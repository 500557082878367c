import { joinPlaces } from '../../findings/finding-places.ts';
import { found, type TrackCheck } from '../check.ts';
import { onlyChannel, peakOf } from '../track-measures.ts';

/** Float samples above 1.0. Nothing is lost yet: the file can be turned down. */
export const overFullScale: TrackCheck = (track) => {
  const over = track.measures.channels.flatMap(({ overFullScale }, index) =>
    overFullScale.count > 0 ? [{ ...overFullScale, index }] : [],
  );
  if (over.length === 0) return null;
  return found(
    'over-full-scale',
    { samples: over.reduce((sum, { count }) => sum + count, 0), peakDbfs: peakOf(track) ?? 0 },
    { ...onlyChannel(over.map(({ index }) => index)), ...joinPlaces(over) },
  );
};
