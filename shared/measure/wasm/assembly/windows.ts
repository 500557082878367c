import { granuleFrames } from './block';
import { Channel } from './channel';
import { highest, lowest, sums } from './levels';
import {
  floorShare,
  floorWindowFrames,
  fileFrames,
  soundLevel,
  soundWindowFrames,
  tailFrames,
} from './parameters';

/** Windows of whole granules: the mean of those that sound, and the level of the quiet ones. */

/** Bins by the upper bits of an f32: its exponent, from 2^-40 on, and five bits behind it. */
const binShift: i32 = 18;
const lowestBin: i32 = (127 - 40) << 5;
export const floorBins: i32 = 2048;

export function fillWindows(channel: Channel, frames: i32): void {
  for (let first = 0; first < frames; first += granuleFrames) {
    const at = (<usize>(first / granuleFrames)) << 3;
    const length = min(granuleFrames, frames - first);
    const peak = max(load<f64>(highest + at), -load<f64>(lowest + at));

    channel.windowPeak = max(channel.windowPeak, peak);
    channel.windowSum += load<f64>(sums + at);
    channel.windowFrames += length;
    if (channel.windowFrames == soundWindowFrames) endSoundWindow(channel);

    channel.floorPeak = max(channel.floorPeak, peak);
    channel.floorFrames += length;
    if (channel.floorFrames == floorWindowFrames) endFloorWindow(channel);
  }
}

export function endSoundWindow(channel: Channel): void {
  if (channel.windowPeak > soundLevel) {
    channel.soundingSum += channel.windowSum;
    channel.soundingFrames += <f64>channel.windowFrames;
  }
  channel.windowPeak = 0;
  channel.windowSum = 0;
  channel.windowFrames = 0;
}

function endFloorWindow(channel: Channel): void {
  const bits = reinterpret<i32>(<f32>channel.floorPeak) >> binShift;
  const bin = max(0, min(floorBins - 1, bits - lowestBin));
  const at = channel.floorHistogram + ((<usize>bin) << 2);
  store<u32>(at, load<u32>(at) + 1);
  channel.floorWindows += 1;
  channel.floorPeak = 0;
  channel.floorFrames = 0;
}

/** The level below which a tenth of the windows stay, to the lower end of its bin. */
export function findFloor(channel: Channel): f64 {
  let missing = Math.ceil(channel.floorWindows * floorShare);
  if (missing == 0) return 0;
  let bin = -1;
  while (missing > 0) {
    bin++;
    missing -= <f64>load<u32>(channel.floorHistogram + ((<usize>bin) << 2));
  }
  return bin == 0 ? 0 : <f64>reinterpret<f32>((bin + lowestBin) << binShift);
}

/** Peak of the file's last 50 ms, by the length its header gives. */
export function followTail<T extends number>(channel: Channel, start: f64, frames: i32): void {
  const tailStart = fileFrames - tailFrames - start;
  for (let i = <i32>Math.max(0, Math.min(tailStart, <f64>frames)); i < frames; i++) {
    const sample = <f64>load<T>(channel.samples + <usize>i * sizeof<T>());
    channel.tailPeak = max(channel.tailPeak, Math.abs(sample));
  }
}
