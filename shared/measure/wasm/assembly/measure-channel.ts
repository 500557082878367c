import { addPlace, Channel, granuleFrames } from './channel';
import { highest, lowest, measureGranules, squares, sums } from './levels';
import { drawGranules } from './overview';
import { put, putPlaces } from './results';
import { findSound } from './sound';

/** All meters of one channel over one block, in the order in which they need each other. */
export function measureChannel<T extends number>(
  channel: Channel,
  bytes: usize,
  start: f64,
  frames: i32,
  clean: bool,
): void {
  if (!clean) findNonNumbers<T>(channel, bytes, start, frames);
  measureGranules<T>(channel.samples, frames);
  const granules = (frames + granuleFrames - 1) / granuleFrames;
  for (let granule = 0; granule < granules; granule++) {
    const at = (<usize>granule) << 3;
    channel.lowest = min(channel.lowest, load<f64>(lowest + at));
    channel.highest = max(channel.highest, load<f64>(highest + at));
    channel.sum += load<f64>(sums + at);
    channel.sumOfSquares += load<f64>(squares + at);
  }
  drawGranules<T>(channel, frames);
  findSound<T>(channel, start, frames);
}

/** Runs of NaN and infinity; runs in two blocks count as two. */
function findNonNumbers<T extends number>(
  channel: Channel,
  bytes: usize,
  start: f64,
  frames: i32,
): void {
  let runStart = -1;
  for (let i = 0; i <= frames; i++) {
    const bad = i < frames && !isFinite(load<T>(bytes + <usize>i * sizeof<T>()));
    if (bad && runStart < 0) runStart = i;
    if (!bad && runStart >= 0) {
      addPlace(channel.notANumber, start + <f64>runStart, start + <f64>i);
      runStart = -1;
    }
  }
}

export function finishChannel(channel: Channel): void {
  put(channel.lowest);
  put(channel.highest);
  put(channel.sum);
  put(channel.sumOfSquares);
  put(channel.firstSound);
  put(channel.lastSound);
  putPlaces(channel.notANumber);
  putPlaces(channel.overFullScale);
  put(<f64>channel.overview);
}
