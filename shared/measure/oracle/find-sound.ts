import { soundLevel } from '../definitions.ts';

/** First and last sample above -60 dBFS. */
export function findSound(samples: Float64Array) {
  const sounds = (sample: number) => Math.abs(sample) > soundLevel;
  const first = samples.findIndex(sounds);
  if (first < 0) return { firstSoundFrame: null, lastSoundFrame: null };
  return { firstSoundFrame: first, lastSoundFrame: samples.findLastIndex(sounds) };
}
