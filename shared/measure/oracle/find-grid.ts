import type { TrackFormat } from '../../wave/track-format.ts';
import { deepestGrid } from '../definitions.ts';

/**
 * How many bits the samples need: the coarsest grid of whole numbers on which all of them lie.
 * 0 if none differs from 0, null if no grid down to the deepest fits.
 */
export function findGrid(samples: Float64Array, format: TrackFormat): number | null {
  const deepest = deepestGrid(format);
  let bits = 0;
  for (const sample of samples) {
    if (sample === 0) continue;
    bits = Math.max(bits, 1);
    while (bits <= deepest && !Number.isInteger(sample * 2 ** (bits - 1))) bits++;
    if (bits > deepest) return null;
  }
  return bits;
}
