import { maxPlaces } from '../measures.ts';
import type { RawPlaces } from '../raw-measures.ts';

/** Runs of samples for which `isOutlier` holds. */
export function findOutliers(
  samples: Float64Array,
  isOutlier: (sample: number) => boolean,
): RawPlaces {
  const places: RawPlaces = { count: 0, ranges: [] };
  for (let i = 0; i < samples.length; i++) {
    if (!isOutlier(samples[i]!)) continue;
    const startFrame = i;
    while (i < samples.length && isOutlier(samples[i]!)) i++;
    places.count++;
    if (places.ranges.length < maxPlaces) places.ranges.push({ startFrame, endFrame: i });
  }
  return places;
}
