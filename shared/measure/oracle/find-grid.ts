import type { TrackFormat } from '../../wave/track-format.ts';
import { deepestGrid } from '../definitions.ts';

/**
 * How many bits the samples need: the coarsest grid of whole numbers on which all of them lie.
 * 0 if none differs from 0, null if no grid down to the deepest fits.
 */
export function findGrid(samples: Float64Array, format: TrackFormat): number | null {
  const deepest = deepestGrid(format);
  if (samples.every((sample) => sample === 0)) return 0;
  let bits = 1;
  let scale = 1;
  for (const sample of samples) {
    while (!Number.isInteger(sample * scale)) {
      if (bits === deepest) return null;
      bits++;
      scale *= 2;
    }
  }
  return bits;
}
