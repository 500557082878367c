import { larger } from './extremes';
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
  let windowPeak = channel.windowPeak;
  let windowSum = channel.windowSum;
  let windowFrames = channel.windowFrames;
  let floorPeak = channel.floorPeak;
  let floorFrames = channel.floorFrames;
  for (let first = 0; first < frames; first += granuleFrames) {
    const at = (<usize>(first / granuleFrames)) << 3;
    const length = min(granuleFrames, frames - first);
    const peak = larger(load<f64>(highest + at), -load<f64>(lowest + at));
    windowPeak = larger(windowPeak, peak);
    windowSum += load<f64>(sums + at);
    windowFrames += length;
    if (windowFrames == soundWindowFrames) {
      endSoundWindow(channel, windowPeak, windowSum, windowFrames);
      windowPeak = 0;
      windowSum = 0;
      windowFrames = 0;
    }
    floorPeak = larger(floorPeak, peak);
    floorFrames += length;
    if (floorFrames == floorWindowFrames) {
      endFloorWindow(channel, floorPeak);
      floorPeak = 0;
      floorFrames = 0;
    }
  }
  channel.windowPeak = windowPeak;
  channel.windowSum = windowSum;
  channel.windowFrames = windowFrames;
  channel.floorPeak = floorPeak;
  channel.floorFrames = floorFrames;
}

/** The last window may be shorter and counts; of the floor's windows only whole ones do. */
export function endWindows(channel: Channel): void {
  endSoundWindow(channel, channel.windowPeak, channel.windowSum, channel.windowFrames);
}

function endSoundWindow(channel: Channel, peak: f64, sum: f64, frames: i32): void {
  if (peak <= soundLevel) return;
  channel.soundingSum += sum;
  channel.soundingFrames += <f64>frames;
}

function endFloorWindow(channel: Channel, peak: f64): void {
  const bits = reinterpret<i32>(<f32>peak) >> binShift;
  const bin = max(0, min(floorBins - 1, bits - lowestBin));
  const at = channel.floorHistogram + ((<usize>bin) << 2);
  store<u32>(at, load<u32>(at) + 1);
  channel.floorWindows += 1;
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
    channel.tailPeak = larger(channel.tailPeak, Math.abs(sample));
  }
}
