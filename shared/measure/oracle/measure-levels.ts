import type { TrackFormat } from '../../wave/track-format.ts';
import { soundLevel, windowFrames } from '../definitions.ts';

/** Peaks, sums and the mean of what sounds. */
export function measureLevels(samples: Float64Array, format: TrackFormat) {
  let lowest = 0;
  let highest = 0;
  let sum = 0;
  let sumOfSquares = 0;
  for (const sample of samples) {
    lowest = Math.min(lowest, sample);
    highest = Math.max(highest, sample);
    sum += sample;
    sumOfSquares += sample * sample;
  }
  return { lowest, highest, sum, sumOfSquares, ...sumOfSound(samples, format) };
}

/** Over the windows of about 10 ms whose peak is above -60 dBFS. */
function sumOfSound(samples: Float64Array, format: TrackFormat) {
  const length = windowFrames(10, format);
  let soundingSum = 0;
  let soundingFrames = 0;
  for (let start = 0; start < samples.length; start += length) {
    const window = samples.subarray(start, start + length);
    if (peakOf(window) <= soundLevel) continue;
    soundingSum += window.reduce((total, sample) => total + sample, 0);
    soundingFrames += window.length;
  }
  return { soundingSum, soundingFrames };
}

export function peakOf(samples: Float64Array): number {
  return samples.reduce((peak, sample) => Math.max(peak, Math.abs(sample)), 0);
}
