import { granuleFrames } from './block';
import { Channel } from './channel';
import { blockPeak, highest, lowest } from './levels';
import { soundLevel } from './parameters';

/** First and last sample above -60 dBFS. */

export function findSound<T extends number>(channel: Channel, start: f64, frames: i32): void {
  if (blockPeak <= soundLevel) return;
  const granules = (frames + granuleFrames - 1) / granuleFrames;
  if (channel.firstSound < 0) {
    for (let granule = 0; granule < granules; granule++) {
      if (!sounds(granule)) continue;
      let i = granule * granuleFrames;
      while (!isSound(sampleAt<T>(channel, i))) i++;
      channel.firstSound = start + <f64>i;
      break;
    }
  }
  for (let granule = granules - 1; granule >= 0; granule--) {
    if (!sounds(granule)) continue;
    let i = min((granule + 1) * granuleFrames, frames) - 1;
    while (!isSound(sampleAt<T>(channel, i))) i--;
    channel.lastSound = start + <f64>i;
    return;
  }
}

function sampleAt<T extends number>(channel: Channel, index: i32): f64 {
  return <f64>load<T>(channel.samples + <usize>index * sizeof<T>());
}

function isSound(sample: f64): bool {
  return Math.abs(sample) > soundLevel;
}

function sounds(granule: i32): bool {
  const at = (<usize>granule) << 3;
  return load<f64>(highest + at) > soundLevel || load<f64>(lowest + at) < -soundLevel;
}
